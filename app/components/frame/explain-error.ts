import { isRouteErrorResponse } from "react-router";

export type Wrong = Readonly<{ status: number; sentence: string }>;

const BROKE = "Something broke on our side. Your work up to the last save is kept. Try again.";
const USUAL: Readonly<Record<number, string>> = {
  404: "There is no page at this address.",
  405: "This address does not take what was sent. Go back, open the page again and repeat it there.",
};

/** What a boundary says: the sentence of our own refusals; for everything else a plain one, never technical words. */
export function explainError(error: unknown): Wrong {
  if (!isRouteErrorResponse(error) || error.status >= 500) return { status: 500, sentence: BROKE };
  const { status } = error;
  // The framework's own refusals carry an Error's text.
  const own = typeof error.data === "string" && error.data !== "" && !error.data.startsWith("Error:");
  const usual = USUAL[status] ?? "That request could not be read. Go back and try again.";
  return { status, sentence: own ? String(error.data) : usual };
}
