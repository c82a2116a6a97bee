import { redirect } from "react-router";
import { notFound, readId, requirePermission } from "~/auth/require.server";
import { scopeContext } from "~/context";
import { pictureLink } from "~/recordings/playback-link.server";
import type { Route } from "./+types/picture";

/** Poster or storyboard of a recording: rights first, then to storage. */
export async function loader({ params, context }: Route.LoaderArgs) {
  const scope = context.get(scopeContext);
  requirePermission(scope, "lesson:watch");
  const what = params.what === "poster" || params.what === "storyboard" ? params.what : notFound("page");
  const link =
    (await pictureLink(scope, readId<"recording">(params.recordingId, "recording"), what, Date.now())) ??
    notFound("recording");
  // Well inside the life of the link that it leads to.
  return redirect(link.url, { headers: { "Cache-Control": "private, max-age=600" } });
}
