import type { Probe } from "~/recordings/judge-video";
import { readProbe } from "~/recordings/read-probe";

/** What a chosen file is, read in the browser before a byte is sent; null when it is no video that can be read. */
export async function probeFile(file: File): Promise<Probe | null> {
  // Only this page needs it, so it comes when a file is chosen.
  const { BlobSource, Input, MATROSKA, MP4, QTFF, WEBM } = await import("mediabunny");
  const input = new Input({ source: new BlobSource(file), formats: [MP4, QTFF, WEBM, MATROSKA] });
  try {
    return await readProbe(input);
  } catch {
    return null;
  } finally {
    input.dispose();
  }
}
