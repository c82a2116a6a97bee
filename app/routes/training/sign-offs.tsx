import { href } from "react-router";
import { requirePermission } from "~/auth/require.server";
import { ButtonLink } from "~/components/ui/button";
import { EmptyState, Page, Sheet } from "~/components/ui/page";
import { scopeContext } from "~/context";
import { formatLocalDate } from "~/training/local-date";
import { openRequests } from "~/training/sign-off.server";
import type { Route } from "./+types/sign-offs";

export function meta() {
  return [{ title: "Sign-offs asked for · Castlenut" }];
}

export function loader({ context }: Route.LoaderArgs) {
  const scope = context.get(scopeContext);
  requirePermission(scope, "sign-off:give");
  return { requests: openRequests(scope), own: scope.userId as string };
}

export default function SignOffs({ loaderData: { requests, own } }: Route.ComponentProps) {
  return (
    <Page title="Sign-offs asked for" under="Oldest first" narrow>
      {requests.length === 0 ? (
        <EmptyState title="Nobody waits for a sign-off">
          <ButtonLink to={href("/skills")} look="ghost">
            Who has shown what
          </ButtonLink>
        </EmptyState>
      ) : (
        <Sheet>
          <ul>
            {requests.map((row) => (
              <li
                key={row.id}
                className="flex flex-wrap items-center justify-between gap-3 border-b border-line px-5 py-4 last:border-b-0"
              >
                <div className="min-w-0 flex-1 basis-64">
                  <p className="font-semibold">
                    {row.name}: {row.lesson}
                  </p>
                  <p className="text-sm text-ink-soft">
                    Done {formatLocalDate(row.doneOn)}
                    {row.note ? `. ${row.note}` : ""}
                  </p>
                </div>
                {row.userId === own ? (
                  <p className="text-sm text-ink-soft">Your own: another instructor answers it.</p>
                ) : (
                  <ButtonLink
                    to={href("/training/people/:userId/lessons/:lessonId/sign-off", {
                      userId: row.userId,
                      lessonId: row.lessonId,
                    })}
                  >
                    Answer
                  </ButtonLink>
                )}
              </li>
            ))}
          </ul>
        </Sheet>
      )}
    </Page>
  );
}
