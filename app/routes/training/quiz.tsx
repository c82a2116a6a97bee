import { data, Form, href, Link, redirect } from "react-router";
import { notFound, readId, requirePermission } from "~/auth/require.server";
import { Button, ButtonLink } from "~/components/ui/button";
import { EmptyState, Page, Sheet } from "~/components/ui/page";
import { scopeContext } from "~/context";
import { quizOf, startAttempt } from "~/quizzes/attempts.server";
import { formatLocalDate, localDateAt } from "~/training/local-date";
import type { Route } from "./+types/quiz";

export function meta({ loaderData }: Route.MetaArgs) {
  return [{ title: `Quiz: ${loaderData?.title ?? ""} · Castlenut` }];
}

export function loader({ params, context }: Route.LoaderArgs) {
  const scope = context.get(scopeContext);
  requirePermission(scope, "quiz:take");
  const lessonId = readId<"lesson">(params.lessonId, "lesson");
  return { lessonId, ...(quizOf(scope, lessonId) ?? notFound("lesson")) };
}

export function action({ params, context }: Route.ActionArgs) {
  const scope = context.get(scopeContext);
  requirePermission(scope, "quiz:take");
  const started =
    startAttempt(scope, readId<"lesson">(params.lessonId, "lesson"), Date.now()) ?? notFound("lesson");
  if (!started.ok) return data({ sentence: started.sentence }, { status: 409 });
  return redirect(href("/training/attempts/:attemptId", { attemptId: started.attemptId }));
}

export default function Quiz({ loaderData, actionData }: Route.ComponentProps) {
  const { lessonId, title, revision, questionCount, waiting, passMark, timeZone, open, past } = loaderData;
  return (
    <Page
      title="Quiz"
      under={<Link to={`/lessons/${lessonId}`}>{`${title}, revision ${revision}`}</Link>}
      narrow
    >
      {actionData ? (
        <p role="alert" className="mb-4 font-semibold">
          {actionData.sentence}
        </p>
      ) : null}
      {questionCount === 0 ? (
        <EmptyState title="No questions yet">
          <p>
            {waiting > 0
              ? "The values of this lesson wait for their check. Questions come with it."
              : "This lesson has no values to ask about."}
          </p>
          <ButtonLink to={`/lessons/${lessonId}`}>Back to the lesson</ButtonLink>
        </EmptyState>
      ) : (
        <Sheet className="grid gap-4 p-5">
          <p>
            {questionCount} {questionCount === 1 ? "question" : "questions"}. {Math.round(passMark * 100)} %
            must be right, and every safety-critical value. Type the figure with its unit, any unit you like:
            it is converted. There is no time limit, and what you typed is kept if you leave.
          </p>
          {waiting > 0 ? (
            <p className="text-sm text-ink-soft">
              {waiting} {waiting === 1 ? "value waits" : "values wait"} for a check and{" "}
              {waiting === 1 ? "is" : "are"} not asked.
            </p>
          ) : null}
          <Form method="post">
            <Button>{open ? "Go on with the quiz" : "Start the quiz"}</Button>
          </Form>
        </Sheet>
      )}
      {past.length > 0 ? (
        <>
          <h2 className="mt-8 mb-2 text-2xl">Your attempts</h2>
          <Sheet>
            <ul>
              {past.map((attempt) => (
                <li key={attempt.id} className="border-b border-line px-5 py-3 last:border-b-0">
                  <Link to={href("/training/attempts/:attemptId/result", { attemptId: attempt.id })}>
                    {formatLocalDate(localDateAt(attempt.submittedAt ?? 0, timeZone))}
                  </Link>
                  : {attempt.rightCount} of {attempt.askedCount} right,{" "}
                  {attempt.passed ? "passed" : "not passed"}
                </li>
              ))}
            </ul>
          </Sheet>
        </>
      ) : null}
    </Page>
  );
}
