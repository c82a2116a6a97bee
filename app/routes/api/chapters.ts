import { notFound, readId } from "~/auth/require.server";
import { scopeContext } from "~/context";
import { chapterFile } from "~/lessons/caption-file.server";
import type { Route } from "./+types/chapters";

/** The chapters of a lesson as a caption file: in lesson time, or with ?recording= in the time of that file. */
export function loader({ context, params, url }: Route.LoaderArgs) {
  const recording = url.searchParams.get("recording");
  const file = chapterFile(
    context.get(scopeContext),
    readId<"lesson">(params.lessonId, "lesson"),
    recording === null ? undefined : readId<"recording">(recording, "recording"),
  );
  if (file === undefined) notFound("lesson");
  return new Response(file, {
    headers: { "Content-Type": "text/vtt; charset=utf-8", "Cache-Control": "private, no-cache" },
  });
}
