import { href, Link } from "react-router";
import { requirePermission } from "~/auth/require.server";
import { UploadList } from "~/components/upload/upload-list";
import { Page } from "~/components/ui/page";
import { scopeContext } from "~/context";
import type { Route } from "./+types/upload";

export function meta() {
  return [{ title: "Upload recordings · Castlenut" }];
}

export function loader({ context }: Route.LoaderArgs) {
  requirePermission(context.get(scopeContext), "recording:upload");
  return null;
}

export default function Upload() {
  return (
    <Page title="Upload recordings" under={<Link to={href("/bench/recordings")}>Recordings</Link>} narrow>
      <noscript>
        <p className="mb-4 font-semibold">
          Uploading needs JavaScript: files go to storage in parts, so that a lost network loses nothing.
        </p>
      </noscript>
      <UploadList />
    </Page>
  );
}
