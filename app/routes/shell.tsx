import { data, href, Outlet, redirect, useRouteLoaderData } from "react-router";
import { readSession } from "~/auth/session.server";
import { explainError } from "~/components/frame/explain-error";
import { ErrorPage, WhatWentWrong } from "~/components/frame/error-page";
import { Frame } from "~/components/frame/frame";
import { anonymousContext, scopeContext, sessionContext, viewerContext } from "~/context";
import type { Route } from "./+types/shell";

export const middleware: Route.MiddlewareFunction[] = [
  async ({ request, context, url }, next) => {
    const signedIn = await readSession(context.get(anonymousContext), request, Date.now());
    if (!signedIn) {
      if (url.pathname.startsWith("/api/")) throw data("Sign in first.", { status: 401 });
      const wanted = request.method === "GET" ? url.pathname.replace(/\.data$/, "") + url.search : "/";
      throw redirect(`${href("/sign-in")}?to=${encodeURIComponent(wanted)}`);
    }
    context.set(scopeContext, signedIn.scope);
    context.set(viewerContext, signedIn.viewer);
    context.set(sessionContext, signedIn.sessionId);
    const answer = await next();
    if (!signedIn.renewedCookie) return answer;
    // A copy, because the headers of some answers are closed.
    const renewed = new Response(answer.body, answer);
    renewed.headers.append("Set-Cookie", signedIn.renewedCookie);
    return renewed;
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

/** Keeps the frame around what went wrong, so that the way on stays at hand; without it when nobody is known. */
export function ErrorBoundary({ error }: Route.ErrorBoundaryProps) {
  const known = useRouteLoaderData<typeof loader>("routes/shell");
  const wrong = explainError(error);
  if (!known) return <ErrorPage {...wrong} />;
  return (
    <Frame viewer={known.viewer}>
      <WhatWentWrong {...wrong} />
    </Frame>
  );
}
