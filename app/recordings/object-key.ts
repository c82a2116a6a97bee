/** Where a recording lives in the bucket. Written here and nowhere else, so that a key can always be read back. */
export function recordingKey(shopId: string, recordingId: string): string {
  return `shops/${shopId}/recordings/${recordingId}/source`;
}

export type MadeFrom = "converted" | "poster" | "storyboard";

/** Where what was made from a recording lives. */
export function madeKey(shopId: string, recordingId: string, what: MadeFrom): string {
  return `shops/${shopId}/recordings/${recordingId}/${what}`;
}

/** Which recording of which shop a key belongs to; undefined for any other key. */
export function readRecordingKey(
  key: string,
): { shopId: string; recordingId: string; what: "source" | MadeFrom } | undefined {
  const found = /^shops\/([^/]+)\/recordings\/([^/]+)\/(source|converted|poster|storyboard)$/.exec(key);
  return found
    ? { shopId: found[1] ?? "", recordingId: found[2] ?? "", what: found[3] as "source" | MadeFrom }
    : undefined;
}
