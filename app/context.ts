import { createContext } from "react-router";
import type { SessionId } from "#drizzle/schema/ids";
import type { Anonymous, Scope } from "~/auth/scope.server";
import type { Viewer } from "~/auth/viewer";

/** Who is asking, set by the sign-in middleware of the shell. */
export const scopeContext = createContext<Scope>();

/** The signed-in person and shop as pages show them. */
export const viewerContext = createContext<Viewer>();

/** For pages before sign-in. */
export const anonymousContext = createContext<Anonymous>();

/** The session of this device. */
export const sessionContext = createContext<SessionId>();
