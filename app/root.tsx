import { Links, Meta, Outlet, Scripts, ScrollRestoration } from "react-router";
import { database } from "~/db.server";
import { env } from "~/env.server";
import { requireSameOrigin } from "~/auth/same-origin.server";
import { requireForm } from "~/forms/require-form.server";
import { anonymousContext } from "~/context";
import { ErrorPage } from "~/components/frame/error-page";
import { explainError } from "~/components/frame/explain-error";
import type { Route } from "./+types/root";
import "./app.css";

export const middleware: Route.MiddlewareFunction[] = [
  ({ request, context, url }) => {
    requireSameOrigin(request, env().PUBLIC_ORIGIN);
    requireForm(request, url.pathname);
    context.set(anonymousContext, { db: database().db });
  },
];

export function meta() {
  return [{ title: "Castlenut" }];
}

export function Layout({ children }: { children: React.ReactNode }) {
  return (
    <html lang="en">
      <head>
        <meta charSet="utf-8" />
        <meta name="viewport" content="width=device-width, initial-scale=1" />
        <meta name="color-scheme" content="light dark" />
        <meta name="theme-color" content="#1d3f35" />
        <link rel="icon" href="/favicon.svg" type="image/svg+xml" />
        <link rel="manifest" href="/manifest.webmanifest" />
        <Meta />
        <Links />
      </head>
      <body>
        {children}
        <ScrollRestoration />
        <Scripts />
      </body>
    </html>
  );
}

export default function Root() {
  return <Outlet />;
}

export function ErrorBoundary({ error }: Route.ErrorBoundaryProps) {
  return <ErrorPage {...explainError(error)} />;
}
