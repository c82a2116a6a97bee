import { data, href, Outlet, redirect } from "react-router";
import { readSession } from "~/auth/session.server";
import { Frame } from "~/components/frame/frame";
import { anonymousContext, scopeContext, sessionContext, viewerContext } from "~/context";
import type { Route } from "./+types/shell";

export const middleware: Route.MiddlewareFunction[] = [
  async ({ request, context, url }) => {
    const signedIn = await readSession(context.get(anonymousContext), request, Date.now());
    if (!signedIn) {
      if (url.pathname.startsWith("/api/")) throw data("Sign in first.", { status: 401 });
      const wanted = request.method === "GET" ? url.pathname.replace(/\.data$/, "") + url.search : "/";
      throw redirect(`${href("/sign-in")}?to=${encodeURIComponent(wanted)}`);
    }
    context.set(scopeContext, signedIn.scope);
    context.set(viewerContext, signedIn.viewer);
    context.set(sessionContext, signedIn.sessionId);
  },
];

// A loader of its own makes the framework run the middleware on every visit inside the shell.
export function loader({ context }: Route.LoaderArgs) {
  return { viewer: context.get(viewerContext) };
}

export default function Shell({ loaderData: { viewer } }: Route.ComponentProps) {
  return (
    <Frame viewer={viewer}>
      <Outlet />
    </Frame>
  );
}
