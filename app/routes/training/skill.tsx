import { data, Form, href, Link, redirect } from "react-router";
import { z } from "zod";
import { notFound, readId, requirePermission } from "~/auth/require.server";
import { CastleNut, nutWords } from "~/components/plates/castle-nut";
import { Button, ButtonLink } from "~/components/ui/button";
import { Field } from "~/components/ui/field";
import { Page, Sheet } from "~/components/ui/page";
import { scopeContext } from "~/context";
import { env } from "~/env.server";
import { parseForm } from "~/forms/parse-form";
import { withdrawAssignment } from "~/training/assign-lesson.server";
import { dueWords, formatLocalDate, localDateAt } from "~/training/local-date";
import { revokeSignOff } from "~/training/sign-off.server";
import { LEVEL_WORDS, PRESENCE_WORDS } from "~/training/sign-off";
import { skillDetail } from "~/training/skills-table.server";
import type { AssignmentId, SignOffId } from "#drizzle/schema/ids";
import type { Route } from "./+types/skill";

const Intent = z.discriminatedUnion("intent", [
  z.object({ intent: z.literal("withdraw"), assignment: z.string().transform((id) => id as AssignmentId) }),
  z.object({
    intent: z.literal("revoke"),
    signOff: z.string().transform((id) => id as SignOffId),
    reason: z
      .string()
      .trim()
      .min(5, "Say why, in a few words.")
      .max(500, "Keep the reason under 500 characters."),
  }),
]);

export function meta() {
  return [{ title: "Who has shown what · Castlenut" }];
}

export function loader({ params, context }: Route.LoaderArgs) {
  const scope = context.get(scopeContext);
  requirePermission(scope, "training:see-all");
  const userId = readId<"user">(params.userId, "person");
  const lessonId = readId<"lesson">(params.lessonId, "lesson");
  const detail = skillDetail(scope, userId, lessonId, Date.now()) ?? notFound("person");
  return { ...detail, own: scope.userId === userId };
}

export async function action({ request, params, context }: Route.ActionArgs) {
  const scope = context.get(scopeContext);
  const form = parseForm(Intent, await request.formData());
  requirePermission(scope, form.ok && form.value.intent === "withdraw" ? "training:assign" : "sign-off:give");
  if (!form.ok) return data(form, { status: 400 });
  if (form.value.intent === "withdraw") {
    if (!withdrawAssignment(scope, form.value.assignment, Date.now())) notFound("assignment");
  } else if (!revokeSignOff(scope, form.value.signOff, form.value.reason, env().PUBLIC_ORIGIN, Date.now()))
    notFound("sign-off");
  return redirect(href("/skills/:userId/:lessonId", params));
}

export default function Skill({ loaderData, actionData }: Route.ComponentProps) {
  const { person, lesson, skill, attempts, signOffs, assignment, waiting, today, shownJobs, timeZone, own } =
    loaderData;
  const state = {
    seen: skill?.seen ?? false,
    answered: skill?.answered ?? false,
    shown: skill?.shown ?? false,
    changedSince: skill?.changedSince ?? false,
  };
  const begun =
    !state.seen &&
    !state.answered &&
    !state.shown &&
    ((skill?.shownCount ?? 0) > 0 || (skill?.coverage ?? 0) > 0 || attempts.length > 0);
  const ids = { userId: person.id, lessonId: lesson.id };
  return (
    <Page
      title={person.name}
      under={<Link to={`/lessons/${lesson.id}`}>{lesson.title}</Link>}
      actions={
        <>
          <ButtonLink to={`/training/assign?lesson=${lesson.id}&person=${person.id}`} look="ghost">
            {assignment ? "Change the due date" : "Assign"}
          </ButtonLink>
          {own ? null : (
            <ButtonLink to={href("/training/people/:userId/lessons/:lessonId/sign-off", ids)}>
              Sign off
            </ButtonLink>
          )}
        </>
      }
      narrow
    >
      <Sheet className="flex items-center gap-4 p-5">
        <CastleNut state={state} size={56} />
        <div>
          <p className="text-lg font-semibold">{begun ? "begun" : nutWords(state)}</p>
          <p className="text-sm text-ink-soft">
            Watched {Math.round((skill?.coverage ?? 0) * 100)} % of the lesson. Shown on{" "}
            {skill?.shownCount ?? 0} of {shownJobs} {shownJobs === 1 ? "day" : "different days"} that fill the
            third slot.
            {waiting ? " Asks for a sign-off." : ""}
          </p>
        </div>
      </Sheet>

      <h2 className="mt-8 mb-2 text-2xl">Assignment</h2>
      <Sheet className="flex flex-wrap items-center justify-between gap-3 p-5">
        {assignment ? (
          <>
            <p>
              {dueWords(assignment.dueOn, today)}
              {assignment.note ? `. ${assignment.note}` : ""}
            </p>
            <Form method="post">
              <input type="hidden" name="assignment" value={assignment.id} />
              <Button name="intent" value="withdraw" look="quiet">
                Withdraw the assignment
              </Button>
            </Form>
          </>
        ) : (
          <p className="text-ink-soft">Not assigned.</p>
        )}
      </Sheet>

      <h2 className="mt-8 mb-2 text-2xl">Quiz</h2>
      <Sheet>
        {attempts.length === 0 ? (
          <p className="p-5 text-ink-soft">No attempt yet.</p>
        ) : (
          <ul>
            {attempts.map((attempt) => (
              <li key={attempt.id} className="border-b border-line px-5 py-3 last:border-b-0">
                <Link to={`/training/attempts/${attempt.id}/result`}>
                  {formatLocalDate(localDateAt(attempt.submittedAt ?? 0, timeZone))}
                </Link>
                : {attempt.rightCount} of {attempt.askedCount} right,{" "}
                {attempt.passed ? "passed" : "not passed"}
              </li>
            ))}
          </ul>
        )}
      </Sheet>

      <h2 className="mt-8 mb-2 text-2xl">Sign-offs</h2>
      <Sheet>
        {signOffs.length === 0 ? (
          <p className="p-5 text-ink-soft">None yet.</p>
        ) : (
          <ul>
            {signOffs.map((row) => (
              <li key={row.id} className="grid gap-2 border-b border-line px-5 py-4 last:border-b-0">
                <p className={row.takenBack === null ? "" : "line-through"}>
                  {LEVEL_WORDS[row.level]}, shown {formatLocalDate(row.shownOn)} to {row.by}.{" "}
                  {PRESENCE_WORDS[row.presence]}.
                </p>
                {row.valuesSet ? (
                  <p className="text-sm whitespace-pre-line text-ink-soft">{row.valuesSet}</p>
                ) : null}
                {row.note ? <p className="text-sm">{row.note}</p> : null}
                {row.takenBack === null ? (
                  <details>
                    <summary className="flex min-h-11 cursor-pointer items-center text-sm font-semibold">
                      Take it back
                    </summary>
                    <Form method="post" className="mt-2 grid gap-3">
                      <input type="hidden" name="signOff" value={row.id} />
                      <Field label="Reason" name="reason" refusal={actionData} required />
                      <div>
                        <Button name="intent" value="revoke" look="ghost">
                          Take the sign-off back
                        </Button>
                      </div>
                    </Form>
                  </details>
                ) : (
                  <p className="text-sm text-ink-soft">Taken back: {row.takenBack}</p>
                )}
              </li>
            ))}
          </ul>
        )}
      </Sheet>
    </Page>
  );
}
