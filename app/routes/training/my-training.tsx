import { data, Form, href, Link, redirect } from "react-router";
import { z } from "zod";
import { requirePermission } from "~/auth/require.server";
import { CastleNut } from "~/components/plates/castle-nut";
import { Button, ButtonLink } from "~/components/ui/button";
import { EmptyState, Page, Sheet } from "~/components/ui/page";
import { scopeContext } from "~/context";
import { parseForm } from "~/forms/parse-form";
import { dueWords, formatLocalDate } from "~/training/local-date";
import { myTraining } from "~/training/my-training.server";
import { progressWords } from "~/training/progress-words";
import { withdrawRequest } from "~/training/sign-off.server";
import { LEVEL_WORDS } from "~/training/sign-off";
import { NO_SKILL, type SkillState } from "~/training/skill-state";
import type { SignOffRequestId } from "#drizzle/schema/ids";
import type { Route } from "./+types/my-training";

const Withdraw = z.object({ request: z.string().transform((id) => id as SignOffRequestId) });

export function meta() {
  return [{ title: "My training · Castlenut" }];
}

export function loader({ context }: Route.LoaderArgs) {
  const scope = context.get(scopeContext);
  requirePermission(scope, "records:own");
  return myTraining(scope, Date.now());
}

export async function action({ request, context }: Route.ActionArgs) {
  const scope = context.get(scopeContext);
  requirePermission(scope, "sign-off:request");
  const form = parseForm(Withdraw, await request.formData());
  if (!form.ok) return data(form, { status: 400 });
  withdrawRequest(scope, form.value.request, Date.now());
  return redirect(href("/training"));
}

/** Overdue shows as a clock with a notch and the word, never as a colour. */
function ClockNotch() {
  return (
    <svg viewBox="0 0 16 16" width={16} height={16} aria-hidden="true" className="inline align-[-2px]">
      <path
        d="M8 1a7 7 0 1 0 7 7h-3.2L8 8z"
        className="fill-none stroke-ink"
        strokeWidth={1.6}
        strokeLinejoin="round"
      />
    </svg>
  );
}

/** The next thing to do: watch, then the quiz, then a sign-off. */
function NextStep({ lessonId, state }: { lessonId: string; state: SkillState }) {
  if (!state.seen) return <ButtonLink to={`/lessons/${lessonId}`}>Watch</ButtonLink>;
  if (!state.answered || state.changedSince)
    return <ButtonLink to={`/lessons/${lessonId}/quiz`}>Take the quiz</ButtonLink>;
  if (!state.shown)
    return (
      <ButtonLink look="ghost" to={`/training/sign-off-requests/new?lesson=${lessonId}`}>
        Ask for a sign-off
      </ButtonLink>
    );
  return null;
}

function Row({
  lessonId,
  title,
  skill,
  children,
}: {
  lessonId: string;
  title: string;
  skill: SkillState | undefined;
  children?: React.ReactNode;
}) {
  const state = skill ?? NO_SKILL;
  return (
    <li className="flex flex-wrap items-center gap-x-4 gap-y-2 border-b border-line px-5 py-4 last:border-b-0">
      <CastleNut state={state} />
      <div className="min-w-0 flex-1 basis-56">
        <Link to={`/lessons/${lessonId}`} className="font-semibold">
          {title}
        </Link>
        <div className="text-sm text-ink-soft">
          {progressWords(state)}
          {children}
        </div>
      </div>
      <NextStep lessonId={lessonId} state={state} />
    </li>
  );
}

export default function MyTraining({
  loaderData: { today, assigned, begun, requests, signOffs },
}: Route.ComponentProps) {
  const nothing = assigned.length + begun.length + requests.length + signOffs.length === 0;
  return (
    <Page title="My training">
      {nothing ? (
        <EmptyState title="Nothing is assigned to you yet">
          <p>Lessons that you are assigned, or that you start yourself, stand here.</p>
          <ButtonLink to={href("/")}>Look through the library</ButtonLink>
        </EmptyState>
      ) : (
        <div className="grid gap-8">
          {assigned.length > 0 ? (
            <section aria-labelledby="assigned">
              <h2 id="assigned" className="mb-2 text-2xl">
                Assigned
              </h2>
              <Sheet>
                <ul>
                  {assigned.map((row) => (
                    <Row key={row.id} {...row}>
                      {row.skill?.answered && row.skill.seen && !row.skill.changedSince ? null : (
                        <strong className="ml-2 text-ink">
                          {row.dueOn < today ? <ClockNotch /> : null} {dueWords(row.dueOn, today)}
                        </strong>
                      )}
                      {row.note ? <div>{row.note}</div> : null}
                    </Row>
                  ))}
                </ul>
              </Sheet>
            </section>
          ) : null}
          {begun.length > 0 ? (
            <section aria-labelledby="begun">
              <h2 id="begun" className="mb-2 text-2xl">
                Started by yourself
              </h2>
              <Sheet>
                <ul>
                  {begun.map((row) => (
                    <Row key={row.lessonId} {...row} />
                  ))}
                </ul>
              </Sheet>
            </section>
          ) : null}
          {requests.length > 0 ? (
            <section aria-labelledby="requests">
              <h2 id="requests" className="mb-2 text-2xl">
                Waiting for a sign-off
              </h2>
              <Sheet>
                <ul>
                  {requests.map((row) => (
                    <li
                      key={row.id}
                      className="flex flex-wrap items-center justify-between gap-3 border-b border-line px-5 py-4 last:border-b-0"
                    >
                      <span>
                        {row.title}, done {formatLocalDate(row.doneOn)}
                      </span>
                      <Form method="post">
                        <input type="hidden" name="request" value={row.id} />
                        <Button look="quiet">Withdraw the request</Button>
                      </Form>
                    </li>
                  ))}
                </ul>
              </Sheet>
            </section>
          ) : null}
          {signOffs.length > 0 ? (
            <section aria-labelledby="signed">
              <h2 id="signed" className="mb-2 text-2xl">
                Signed off
              </h2>
              <Sheet>
                <ul>
                  {signOffs.map((row) => (
                    <li key={row.id} className="border-b border-line px-5 py-4 last:border-b-0">
                      <span className={row.takenBack === null ? "" : "line-through"}>
                        {row.lesson}: {LEVEL_WORDS[row.level]}, shown {formatLocalDate(row.shownOn)} to{" "}
                        {row.by}
                      </span>
                      {row.takenBack === null ? null : (
                        <div className="text-sm text-ink-soft">Taken back: {row.takenBack}</div>
                      )}
                    </li>
                  ))}
                </ul>
              </Sheet>
            </section>
          ) : null}
          <p className="text-sm text-ink-soft">
            Each slot of the nut fills in turn: seen the lesson, answered the quiz, shown it on a car. A
            dashed ring means that the lesson changed since. These are the shop's own records.
          </p>
        </div>
      )}
    </Page>
  );
}
