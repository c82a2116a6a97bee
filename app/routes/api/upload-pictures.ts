import { readId, requirePermission } from "~/auth/require.server";
import { scopeContext } from "~/context";
import { keepPictures } from "~/recordings/keep-pictures.server";
import type { Route } from "./+types/upload-pictures";

/** Two pictures of at most 2 MB and the peaks. */
const MOST_FORM_BYTES = 5 * 1024 * 1024;

async function bytesOf(entry: FormDataEntryValue | null): Promise<Uint8Array> {
  return entry instanceof Blob ? new Uint8Array(await entry.arrayBuffer()) : new Uint8Array();
}

/** Poster, storyboard and peaks that the browser made, for a server without a converter. */
export async function action({ request, params, context }: Route.ActionArgs) {
  const scope = context.get(scopeContext);
  requirePermission(scope, "recording:upload");
  const recordingId = readId<"recording">(params.recordingId, "recording");
  // Read only when its length is known and small: a form is held in memory as a whole.
  const length = Number(request.headers.get("Content-Length") ?? Number.NaN);
  if (!(length <= MOST_FORM_BYTES))
    return Response.json({ error: "These pictures are too large." }, { status: 413 });
  const form = await request.formData().catch(() => new FormData());
  const peaks = form.get("peaks");
  const result = await keepPictures(scope, recordingId, {
    poster: await bytesOf(form.get("poster")),
    storyboard: await bytesOf(form.get("storyboard")),
    peaks: typeof peaks === "string" ? peaks : null,
  });
  return result.ok
    ? Response.json(result)
    : Response.json({ error: result.sentence }, { status: result.status });
}
