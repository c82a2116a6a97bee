import { href, Link } from "react-router";
import { requirePermission } from "~/auth/require.server";
import { Page } from "~/components/ui/page";
import { UnfinishedUploads } from "~/components/upload/unfinished-uploads";
import { UploadList } from "~/components/upload/upload-list";
import { scopeContext, viewerContext } from "~/context";
import { converterIsThere } from "~/recordings/ffmpeg.server";
import { unfinishedUploads } from "~/recordings/list-recordings.server";
import type { Route } from "./+types/upload";

export function meta() {
  return [{ title: "Upload recordings · Castlenut" }];
}

export async function loader({ context }: Route.LoaderArgs) {
  const scope = context.get(scopeContext);
  requirePermission(scope, "recording:upload");
  const { timeZone, userId } = context.get(viewerContext);
  return { unfinished: unfinishedUploads(scope), converter: await converterIsThere(), timeZone, userId };
}

export default function Upload({
  loaderData: { unfinished, converter, timeZone, userId },
}: Route.ComponentProps) {
  return (
    <Page title="Upload recordings" under={<Link to={href("/bench/recordings")}>Recordings</Link>} narrow>
      <noscript>
        <p className="mb-4 font-semibold">
          Uploading needs JavaScript: files go to storage in parts, so that a lost network loses nothing.
        </p>
      </noscript>
      <UploadList userId={userId} converter={converter} />
      <UnfinishedUploads uploads={unfinished} timeZone={timeZone} />
    </Page>
  );
}
