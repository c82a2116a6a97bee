import { notFound, readId } from "~/auth/require.server";
import { scopeContext } from "~/context";
import { captionFile } from "~/lessons/caption-file.server";
import type { Route } from "./+types/caption-track";

/** One caption track of a lesson, as the player reads it. */
export function loader({ context, params }: Route.LoaderArgs) {
  const lessonId = readId<"lesson">(params.lessonId, "captions");
  const file = captionFile(
    context.get(scopeContext),
    lessonId,
    readId<"captionTrack">(params.trackId, "captions"),
  );
  if (file === undefined) notFound("captions");
  return new Response(file, {
    headers: { "Content-Type": "text/vtt; charset=utf-8", "Cache-Control": "private, max-age=300" },
  });
}
