import { Form, href, Link, redirect } from "react-router";
import { notFound, readId, requirePermission } from "~/auth/require.server";
import { Button } from "~/components/ui/button";
import { Page, Remark, Sheet } from "~/components/ui/page";
import { scopeContext } from "~/context";
import { answerLine } from "~/quizzes/answer-text";
import { reviewOf, submitAttempt } from "~/quizzes/attempts.server";
import type { Route } from "./+types/attempt-review";

export function meta() {
  return [{ title: "Look over your answers · Castlenut" }];
}

export function loader({ params, context }: Route.LoaderArgs) {
  const scope = context.get(scopeContext);
  requirePermission(scope, "quiz:take");
  const review = reviewOf(scope, readId<"attempt">(params.attemptId, "attempt")) ?? notFound("attempt");
  if (review.submitted) throw redirect(href("/training/attempts/:attemptId/result", params));
  if (review.stale) throw redirect(href("/lessons/:lessonId/quiz", { lessonId: review.lessonId }));
  return {
    attemptId: review.id,
    lessonId: review.lessonId,
    title: review.title,
    rows: review.questions.map(({ versionId, prompt, answer, again }) => ({
      versionId,
      prompt,
      again,
      line: answer ? answerLine(answer) : "",
    })),
  };
}

export function action({ params, context }: Route.ActionArgs) {
  const scope = context.get(scopeContext);
  requirePermission(scope, "quiz:take");
  const attemptId = readId<"attempt">(params.attemptId, "attempt");
  const submitted = submitAttempt(scope, attemptId, Date.now()) ?? notFound("attempt");
  return redirect(
    submitted.ok
      ? href("/training/attempts/:attemptId/result", { attemptId })
      : href("/training/attempts/:attemptId/review", { attemptId }),
  );
}

export default function Review({ loaderData: { attemptId, lessonId, title, rows } }: Route.ComponentProps) {
  const again = rows.filter((row) => row.again !== null).length;
  return (
    <Page title="Look over your answers" under={<Link to={`/lessons/${lessonId}`}>{title}</Link>} narrow>
      <Sheet>
        <ol>
          {rows.map((row, n) => (
            <li key={row.versionId} className="grid gap-1 border-b border-line px-5 py-4 last:border-b-0">
              <p className="text-sm text-ink-soft">
                {n + 1}. {row.prompt}
              </p>
              <div className="flex flex-wrap items-center justify-between gap-3">
                <p className="font-figure text-2xl font-semibold">{row.line || "–"}</p>
                <Link
                  to={`${href("/training/attempts/:attemptId", { attemptId })}?question=${n + 1}`}
                  className="inline-flex min-h-11 items-center font-semibold"
                  aria-label={`${row.line ? "Change" : "Answer"} question ${n + 1}`}
                >
                  {row.line ? "Change" : "Answer"}
                </Link>
              </div>
              {row.again ? <p className="text-sm font-semibold">{row.again}</p> : null}
            </li>
          ))}
        </ol>
      </Sheet>
      <div className="mt-5 grid gap-4">
        {again > 0 ? (
          <Remark>
            {again === 1 ? "One answer is" : `${again} answers are`} missing or not readable. That costs no
            try: answer {again === 1 ? "it" : "them"}, then submit.
          </Remark>
        ) : (
          <Form method="post">
            <Button className="min-h-14 w-full text-lg sm:w-auto">Submit the answers</Button>
          </Form>
        )}
      </div>
    </Page>
  );
}
