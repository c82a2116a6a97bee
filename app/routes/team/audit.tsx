import { href, Link } from "react-router";
import { listAudit } from "~/auth/list-audit.server";
import { requirePermission } from "~/auth/require.server";
import { ButtonLink } from "~/components/ui/button";
import { localTime } from "~/components/ui/local-time";
import { EmptyState, Page, Sheet } from "~/components/ui/page";
import { scopeContext, viewerContext } from "~/context";
import type { Route } from "./+types/audit";

export function meta() {
  return [{ title: "Who did what · Castlenut" }];
}

export function loader({ context, url }: Route.LoaderArgs) {
  const scope = context.get(scopeContext);
  requirePermission(scope, "shop:edit");
  const wanted = Number(url.searchParams.get("page") ?? 1);
  const page = Number.isInteger(wanted) && wanted > 0 && wanted < 100_000 ? wanted : 1;
  return { page, ...listAudit(scope, page), timeZone: context.get(viewerContext).timeZone };
}

export default function Audit({ loaderData: { page, rows, more, timeZone } }: Route.ComponentProps) {
  return (
    <Page title="Who did what" under={<Link to={href("/settings")}>Shop settings</Link>} narrow>
      {rows.length === 0 ? (
        <EmptyState title="Nothing here" />
      ) : (
        <Sheet>
          <ul>
            {rows.map((row) => (
              <li key={row.id} className="border-b border-line px-5 py-3 last:border-b-0">
                {row.actor} {row.action} {row.noun}
                {row.detail ? `: ${row.detail}` : ""}
                <span className="block text-sm text-ink-soft">{localTime(row.at, timeZone)}</span>
              </li>
            ))}
          </ul>
        </Sheet>
      )}
      <nav aria-label="Pages" className="mt-4 flex gap-3">
        {page > 1 ? (
          <ButtonLink look="ghost" to={`${href("/settings/audit")}?page=${page - 1}`}>
            Newer
          </ButtonLink>
        ) : null}
        {more ? (
          <ButtonLink look="ghost" to={`${href("/settings/audit")}?page=${page + 1}`}>
            Older
          </ButtonLink>
        ) : null}
      </nav>
    </Page>
  );
}
