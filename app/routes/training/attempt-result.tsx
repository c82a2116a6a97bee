import { Form, href, Link } from "react-router";
import { notFound, readId, requirePermission } from "~/auth/require.server";
import { ScaleDrawing } from "~/components/plates/scale-drawing";
import { Button, ButtonLink } from "~/components/ui/button";
import { Page, Sheet } from "~/components/ui/page";
import { scopeContext } from "~/context";
import { lessonTime } from "~/lessons/lesson-time";
import { readSnapshot } from "~/lessons/snapshot";
import { formatTimecode, momentParam } from "~/lessons/timecode";
import { answerScale } from "~/quizzes/answer-scale";
import { answerLine } from "~/quizzes/answer-text";
import { resultOf } from "~/quizzes/attempts.server";
import { OUTCOME_WORDS } from "~/quizzes/outcome-words";
import type { Route } from "./+types/attempt-result";

export function meta() {
  return [{ title: "Quiz result · Castlenut" }];
}

export function loader({ params, context }: Route.LoaderArgs) {
  const scope = context.get(scopeContext);
  requirePermission(scope, "quiz:take");
  const result = resultOf(scope, readId<"attempt">(params.attemptId, "attempt")) ?? notFound("attempt");
  const { clips } = readSnapshot(result.snapshot);
  return {
    own: result.own,
    name: result.name,
    lessonId: result.lessonId,
    title: result.title,
    rightCount: result.rightCount,
    askedCount: result.askedCount,
    passMark: result.passMark,
    passed: result.passed,
    leftOut: result.leftOut,
    safetyWrong: result.answers.filter(({ safetyCritical, right }) => safetyCritical && !right).length,
    answers: result.answers.map((answer) => ({
      versionId: answer.versionId,
      prompt: answer.prompt,
      line: answer.kind === "choice" ? answer.text : answerLine(answer),
      outcome: answer.outcome,
      right: answer.right,
      feedback: answer.feedback,
      scale: answer.kind === "numeric" && !answer.right ? answerScale(answer.asked, answer) : null,
      momentMs: lessonTime(clips, answer.recordingId, answer.atMs),
    })),
  };
}

type Row = Route.ComponentProps["loaderData"]["answers"][number];

/** A tick or a cross as a shape; the word stands beside it. */
function Verdict({ right }: { right: boolean }) {
  return (
    <svg viewBox="0 0 20 20" width={20} height={20} aria-hidden="true" className="shrink-0 stroke-ink">
      <path d={right ? "M3 11l5 5L17 4" : "M4 4l12 12M16 4L4 16"} fill="none" strokeWidth={2.5} />
    </svg>
  );
}

function AnswerRow({ row, n, lessonId }: { row: Row; n: number; lessonId: string }) {
  return (
    <li className="grid gap-2 border-b border-line px-5 py-5 last:border-b-0">
      <p className="text-sm text-ink-soft">
        {n}. {row.prompt}
      </p>
      <p className="font-figure text-2xl font-semibold">{row.line}</p>
      <p className="flex items-center gap-2 font-semibold">
        <Verdict right={row.right} />
        {OUTCOME_WORDS[row.outcome]}
      </p>
      <p>{row.feedback}</p>
      {row.scale ? <ScaleDrawing scale={row.scale} /> : null}
      {row.momentMs !== null ? (
        <Link
          to={`/lessons/${lessonId}?t=${momentParam(row.momentMs)}`}
          className="inline-flex min-h-11 items-center justify-self-start font-semibold"
        >
          See it at {formatTimecode(row.momentMs)}
        </Link>
      ) : null}
    </li>
  );
}

export default function Result({ loaderData }: Route.ComponentProps) {
  const {
    own,
    name,
    lessonId,
    title,
    rightCount,
    askedCount,
    passMark,
    passed,
    leftOut,
    safetyWrong,
    answers,
  } = loaderData;
  return (
    <Page
      title={passed ? "Passed" : "Not passed yet"}
      under={
        <>
          {own ? null : `${name}: `}
          <Link to={`/lessons/${lessonId}`}>{title}</Link>
        </>
      }
      narrow
    >
      <Sheet className="mb-5 grid gap-3 p-5">
        <p className="font-figure text-4xl font-semibold">
          {rightCount} of {askedCount} right
        </p>
        <p>
          {Math.round(passMark * 100)} % must be right.
          {safetyWrong > 0
            ? ` ${safetyWrong === 1 ? "A safety-critical value was" : `${safetyWrong} safety-critical values were`} not right, and those must all be.`
            : ""}
          {leftOut > 0
            ? ` ${leftOut} ${leftOut === 1 ? "question was" : "questions were"} left out: the value waits for a check or is in doubt.`
            : ""}
        </p>
        {own ? (
          <div className="flex flex-wrap gap-3">
            {passed ? (
              <ButtonLink to={href("/training")}>My training</ButtonLink>
            ) : (
              <Form method="post" action={href("/lessons/:lessonId/quiz", { lessonId })}>
                <Button>Try again</Button>
              </Form>
            )}
            <ButtonLink to={`/lessons/${lessonId}`} look="ghost">
              Watch the lesson
            </ButtonLink>
          </div>
        ) : null}
      </Sheet>
      <Sheet>
        <ol>
          {answers.map((row, n) => (
            <AnswerRow key={row.versionId} row={row} n={n + 1} lessonId={lessonId} />
          ))}
        </ol>
      </Sheet>
    </Page>
  );
}
