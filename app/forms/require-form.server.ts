import { data } from "react-router";

/** Pages take forms; whatever else is sent to one is refused with a sentence before anybody tries to read it. */
export function requireForm(request: Request, pathname: string): void {
  if (request.method === "GET" || request.method === "HEAD" || request.method === "OPTIONS") return;
  // Signing out needs no field; the rest under /api/ reads its own bodies.
  if (pathname.startsWith("/api/") || pathname === "/sign-out") return;
  const type = request.headers.get("Content-Type") ?? "";
  if (/^(?:application\/x-www-form-urlencoded|multipart\/form-data)\b/i.test(type)) return;
  throw data("This address takes a form. Open the page and send it from there.", { status: 415 });
}
