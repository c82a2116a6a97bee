import { data, Form, href, Link, redirect } from "react-router";
import { z } from "zod";
import { notFound, readId, requirePermission } from "~/auth/require.server";
import { Button, ButtonLink } from "~/components/ui/button";
import { Page } from "~/components/ui/page";
import { scopeContext } from "~/context";
import { parseForm } from "~/forms/parse-form";
import { unitLabel } from "~/quantities/format";
import { unitChoices } from "~/quizzes/answer-text";
import { openAttempt, saveAnswer } from "~/quizzes/attempts.server";
import type { QuestionVersionId } from "#drizzle/schema/ids";
import type { Route } from "./+types/attempt";

const Answer = z.object({
  question: z.string().transform((id) => id as QuestionVersionId),
  text: z.string().max(200, "An answer has 200 characters at most.").default(""),
  unit: z.string().max(20).default(""),
  next: z.string().regex(/^(?:review|\d{1,3})$/),
});

export function meta() {
  return [{ title: "Quiz · Castlenut" }];
}

export function loader({ params, context, url }: Route.LoaderArgs) {
  const scope = context.get(scopeContext);
  requirePermission(scope, "quiz:take");
  const attempt = openAttempt(scope, readId<"attempt">(params.attemptId, "attempt")) ?? notFound("attempt");
  if (attempt.submitted) throw redirect(href("/training/attempts/:attemptId/result", params));
  if (attempt.stale || attempt.questions.length === 0)
    throw redirect(href("/lessons/:lessonId/quiz", { lessonId: attempt.lessonId }));
  const wanted = Number(url.searchParams.get("question") ?? 1);
  const n = Math.min(Math.max(1, Number.isInteger(wanted) ? wanted : 1), attempt.questions.length);
  const question = attempt.questions[n - 1] ?? notFound("attempt");
  return {
    attemptId: attempt.id,
    lessonId: attempt.lessonId,
    title: attempt.title,
    n,
    count: attempt.questions.length,
    // The expected value and the reasons of the choices stay on the server.
    question: {
      versionId: question.versionId,
      prompt: question.prompt,
      safetyCritical: question.safetyCritical,
      choices: question.choices?.map(({ text }) => text) ?? null,
      units:
        question.kind === "numeric"
          ? unitChoices(question.asked).map((unit) => ({
              unit,
              label: unit === "deg" ? "degrees" : unitLabel(unit),
            }))
          : [],
    },
    typed: attempt.typed[question.versionId] ?? { text: "", unit: "" },
  };
}

export async function action({ request, params, context }: Route.ActionArgs) {
  const scope = context.get(scopeContext);
  requirePermission(scope, "quiz:take");
  const attemptId = readId<"attempt">(params.attemptId, "attempt");
  const form = parseForm(Answer, await request.formData());
  if (!form.ok) return data(form, { status: 400 });
  const { question, text, unit, next } = form.value;
  const attempt = openAttempt(scope, attemptId) ?? notFound("attempt");
  // Nothing to keep: graded already, or the lesson changed meanwhile. The pages say so.
  if (!attempt.submitted && !attempt.stale && !saveAnswer(scope, attemptId, question, { text, unit }))
    notFound("attempt");
  return redirect(
    next === "review"
      ? href("/training/attempts/:attemptId/review", { attemptId })
      : `${href("/training/attempts/:attemptId", { attemptId })}?question=${next}`,
  );
}

export default function Attempt({ loaderData, actionData }: Route.ComponentProps) {
  const { attemptId, lessonId, title, n, count, question, typed } = loaderData;
  const error = actionData?.errors.text;
  return (
    <Page title={`Question ${n} of ${count}`} under={<Link to={`/lessons/${lessonId}`}>{title}</Link>} narrow>
      <progress
        value={n - 1}
        max={count}
        aria-label="Questions gone through"
        className="h-2 w-full accent-enamel"
      />
      <Form method="post" key={question.versionId} className="mt-6 grid gap-6" autoComplete="off">
        <input type="hidden" name="question" value={question.versionId} />
        {question.choices ? (
          <fieldset className="grid gap-3">
            <legend className="mb-3 font-figure text-3xl font-semibold">{question.prompt}</legend>
            {question.choices.map((choice) => (
              <label
                key={choice}
                className="flex min-h-14 items-center gap-4 rounded border border-line-strong bg-sheet px-4 has-checked:border-2 has-checked:border-enamel has-checked:bg-enamel-tint"
              >
                <input
                  type="radio"
                  name="text"
                  value={choice}
                  defaultChecked={typed.text === choice}
                  className="size-5 accent-enamel"
                />
                <span className="font-figure text-2xl font-semibold">{choice}</span>
              </label>
            ))}
          </fieldset>
        ) : (
          <div className="grid gap-3">
            <label htmlFor="answer" className="font-figure text-3xl font-semibold">
              {question.prompt}
            </label>
            <div className="flex flex-wrap gap-3">
              <input
                id="answer"
                name="text"
                defaultValue={typed.text}
                maxLength={200}
                inputMode={question.units.length > 0 ? "decimal" : "text"}
                aria-describedby={error ? "answer-hint answer-error" : "answer-hint"}
                {...(error ? { "aria-invalid": true as const } : {})}
                className="min-h-14 min-w-0 flex-1 basis-40 rounded border border-line-strong bg-sheet px-4 font-figure text-3xl font-semibold"
              />
              {question.units.length > 0 ? (
                <select
                  name="unit"
                  aria-label="Unit"
                  defaultValue={typed.unit}
                  className="min-h-14 rounded border border-line-strong bg-sheet px-3 font-figure text-2xl font-semibold"
                >
                  <option value="">unit</option>
                  {question.units.map(({ unit, label }) => (
                    <option key={unit} value={unit}>
                      {label}
                    </option>
                  ))}
                </select>
              ) : null}
            </div>
            <p id="answer-hint" className="text-sm text-ink-soft">
              {question.units.length > 0
                ? "Choose the unit, or type it behind the figure."
                : "Type the figures with their units, in order: 20 N·m, 40 N·m + 90°."}
            </p>
            {error ? (
              <p id="answer-error" className="text-sm font-semibold text-error">
                {error}
              </p>
            ) : null}
          </div>
        )}
        {question.safetyCritical ? (
          <p className="text-sm font-semibold">Safety-critical: this one must be right.</p>
        ) : null}
        {/* Enter presses the first button of a form: forward stands first and is drawn on the right. */}
        <div className="flex flex-row-reverse flex-wrap gap-3">
          <Button
            name="next"
            value={n < count ? String(n + 1) : "review"}
            className="min-h-14 flex-[2] basis-56 text-lg"
          >
            {n < count ? "Next question" : "Look it over"}
          </Button>
          {n > 1 ? (
            <Button
              look="ghost"
              name="next"
              value={String(n - 1)}
              className="min-h-14 flex-1 basis-32 text-lg"
            >
              Back
            </Button>
          ) : null}
        </div>
        <ButtonLink
          to={href("/training/attempts/:attemptId/review", { attemptId })}
          look="quiet"
          className="justify-self-start"
        >
          All questions
        </ButtonLink>
      </Form>
    </Page>
  );
}
