import { notFound, readId, requirePermission } from "~/auth/require.server";
import { scopeContext } from "~/context";
import { playbackLink } from "~/recordings/playback-link.server";
import type { Route } from "./+types/recording-link";

/** A link to play a recording, for 15 minutes; the player renews it. */
export async function loader({ params, context }: Route.LoaderArgs) {
  const scope = context.get(scopeContext);
  requirePermission(scope, "lesson:watch");
  const link =
    (await playbackLink(scope, readId<"recording">(params.recordingId, "recording"), Date.now())) ??
    notFound("recording");
  return Response.json(link, { headers: { "Cache-Control": "private, no-store" } });
}
