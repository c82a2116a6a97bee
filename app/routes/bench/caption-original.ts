import { notFound, readId, requirePermission } from "~/auth/require.server";
import { scopeContext } from "~/context";
import { findOriginal } from "~/lessons/caption-file.server";
import type { Route } from "./+types/caption-original";

/** The caption file as it was uploaded. */
export function loader({ context, params }: Route.LoaderArgs) {
  const scope = context.get(scopeContext);
  requirePermission(scope, "lesson:edit");
  const lessonId = readId<"lesson">(params.lessonId, "captions");
  const track = findOriginal(scope, lessonId, readId<"captionTrack">(params.trackId, "captions"));
  if (!track) notFound("captions");
  const plain = track.fileName.replace(/[^\w. -]/g, "_");
  return new Response(track.original, {
    headers: {
      "Content-Type": "text/vtt; charset=utf-8",
      "Content-Disposition": `attachment; filename="${plain}"; filename*=UTF-8''${encodeURIComponent(track.fileName)}`,
      "X-Content-Type-Options": "nosniff",
    },
  });
}
