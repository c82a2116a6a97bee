import { redirect } from "react-router";
import { notFound, readId, requirePermission } from "~/auth/require.server";
import { scopeContext } from "~/context";
import { playbackLink } from "~/recordings/playback-link.server";
import type { Route } from "./+types/play";

/** The way to the recording for a page without JavaScript: rights first, then to storage. */
export async function loader({ params, context }: Route.LoaderArgs) {
  const scope = context.get(scopeContext);
  requirePermission(scope, "lesson:watch");
  const link =
    (await playbackLink(scope, readId<"recording">(params.recordingId, "recording"), Date.now())) ??
    notFound("recording");
  return redirect(link.url, { headers: { "Cache-Control": "private, no-store" } });
}
