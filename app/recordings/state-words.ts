import type { recordings } from "#drizzle/schema/index";

/** The state of a recording as it is printed. */
export const STATE_WORDS: Readonly<Record<(typeof recordings.$inferSelect)["state"], string>> = {
  uploading: "Uploading",
  checking: "Being checked",
  preparing: "Being prepared",
  ready: "Ready",
  "needs-converting": "Needs converting",
  converting: "Being converted",
  refused: "Refused",
};
