import { data } from "react-router";

/** A request that changes something must come from our own pages. */
export function requireSameOrigin(request: Request, publicOrigin: string): void {
  if (request.method === "GET" || request.method === "HEAD" || request.method === "OPTIONS") return;
  const origin = request.headers.get("Origin");
  if (origin !== null && origin === new URL(publicOrigin).origin) return;
  if (request.headers.get("Sec-Fetch-Site") === "same-origin") return;
  throw data(
    "This request did not come from Castlenut's own pages. Open the page again and repeat it there.",
    {
      status: 403,
    },
  );
}
