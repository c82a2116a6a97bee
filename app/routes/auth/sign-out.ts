import { href, redirect } from "react-router";
import { endSession } from "~/auth/session.server";
import { anonymousContext } from "~/context";
import type { Route } from "./+types/sign-out";

export function loader() {
  return redirect(href("/"));
}

/** Ends this device's session; the cookie is worth nothing afterwards. */
export async function action({ request, context }: Route.ActionArgs) {
  const cookie = await endSession(context.get(anonymousContext), request);
  return redirect(href("/sign-in"), { headers: { "Set-Cookie": cookie } });
}
