import { href, Link } from "react-router";
import { requirePermission } from "~/auth/require.server";
import { ButtonLink } from "~/components/ui/button";
import { EmptyState, Page, Sheet } from "~/components/ui/page";
import { scopeContext, viewerContext } from "~/context";
import { momentDay } from "~/components/plates/plate-words";
import { listDoubts } from "~/publishing/doubts.server";
import type { Route } from "./+types/doubts";

export function meta() {
  return [{ title: "Values in doubt · Castlenut" }];
}

export function loader({ context }: Route.LoaderArgs) {
  const scope = context.get(scopeContext);
  requirePermission(scope, "value:stop");
  return { ...listDoubts(scope), timeZone: context.get(viewerContext).timeZone };
}

export default function Doubts({ loaderData: { open, cleared, timeZone } }: Route.ComponentProps) {
  return (
    <Page title="Values in doubt" under="“This looks wrong”, until a named person clears it" narrow>
      <div className="grid gap-7">
        {open.length === 0 ? (
          <EmptyState title="No value is in doubt">
            <p>“This looks wrong” stands on every plate. What is said there comes here.</p>
          </EmptyState>
        ) : (
          <Sheet>
            <ul>
              {open.map((doubt) => (
                <li
                  key={doubt.id}
                  className="flex flex-wrap items-center justify-between gap-3 border-b border-line px-5 py-4 last:border-b-0"
                >
                  <div className="min-w-0 flex-1 basis-64">
                    <p className="font-semibold">
                      {doubt.value}, {doubt.lesson}
                    </p>
                    <p>
                      <strong>{doubt.stops ? "Stopped" : "Warns beside the value"}</strong>. {doubt.reason}
                    </p>
                    <p className="text-sm text-ink-soft">
                      {momentDay(doubt.at, timeZone)}, {doubt.by}
                    </p>
                  </div>
                  <ButtonLink look="ghost" to={href("/bench/doubts/:doubtId", { doubtId: doubt.id })}>
                    Look into it<span className="sr-only">: {doubt.value}</span>
                  </ButtonLink>
                </li>
              ))}
            </ul>
          </Sheet>
        )}
        {cleared.length > 0 ? (
          <section className="grid gap-2">
            <h2 className="text-2xl">Cleared last</h2>
            <ul className="grid gap-2">
              {cleared.map((doubt) => (
                <li key={doubt.id}>
                  <Link
                    to={href("/bench/doubts/:doubtId", { doubtId: doubt.id })}
                    className="inline-flex min-h-11 items-center"
                  >
                    {doubt.value}, {doubt.lesson}
                  </Link>
                  <span className="block text-sm text-ink-soft">
                    {doubt.cleared
                      ? `${momentDay(doubt.cleared.at, timeZone)}, ${doubt.cleared.by}: ${doubt.cleared.reason}`
                      : ""}
                  </span>
                </li>
              ))}
            </ul>
          </section>
        ) : null}
      </div>
    </Page>
  );
}
