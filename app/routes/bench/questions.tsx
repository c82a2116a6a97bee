import { data, Form, href, Link, redirect } from "react-router";
import { z } from "zod";
import { notFound, readId, requirePermission } from "~/auth/require.server";
import { Button, ButtonLink } from "~/components/ui/button";
import { EmptyState, Page, Sheet } from "~/components/ui/page";
import { scopeContext } from "~/context";
import { parseForm } from "~/forms/parse-form";
import { listQuestions, retireQuestion } from "~/quizzes/list-questions.server";
import type { QuestionId } from "#drizzle/schema/ids";
import type { Route } from "./+types/questions";

const Intent = z.object({
  intent: z.enum(["retire", "bring-back"]),
  question: z.string().transform((id) => id as QuestionId),
});

export function meta() {
  return [{ title: "Questions · Castlenut" }];
}

export function loader({ params, context }: Route.LoaderArgs) {
  const scope = context.get(scopeContext);
  requirePermission(scope, "lesson:edit");
  const lessonId = readId<"lesson">(params.lessonId, "lesson");
  return { lessonId, ...(listQuestions(scope, lessonId) ?? notFound("lesson")) };
}

export async function action({ request, params, context }: Route.ActionArgs) {
  const scope = context.get(scopeContext);
  requirePermission(scope, "lesson:edit");
  const lessonId = readId<"lesson">(params.lessonId, "lesson");
  const form = parseForm(Intent, await request.formData());
  if (!form.ok) return data(form, { status: 400 });
  const { intent, question } = form.value;
  if (!retireQuestion(scope, lessonId, question, intent === "retire", Date.now())) notFound("quiz");
  return redirect(href("/bench/lessons/:lessonId/questions", { lessonId }));
}

export default function Questions({
  loaderData: { lessonId, title, revision, questions },
}: Route.ComponentProps) {
  return (
    <Page
      title="Questions"
      under={
        <Link to={`/bench/lessons/${lessonId}`}>{revision ? `${title}, revision ${revision}` : title}</Link>
      }
      actions={
        revision ? (
          <ButtonLink look="ghost" to={href("/lessons/:lessonId/quiz", { lessonId })}>
            Try the quiz
          </ButtonLink>
        ) : null
      }
      narrow
    >
      {questions.length === 0 ? (
        <EmptyState title="No questions yet">
          <p>
            Publishing makes questions out of torque, tool and measure values. Observed readings are not
            asked.
          </p>
        </EmptyState>
      ) : (
        <Sheet>
          <ul>
            {questions.map((question) => (
              <li key={question.id} className="grid gap-2 border-b border-line px-5 py-4 last:border-b-0">
                <p className={`font-semibold ${question.retired ? "line-through" : ""}`}>{question.prompt}</p>
                {question.choices ? (
                  <ul className="text-sm">
                    {question.choices.map((choice) => (
                      <li key={choice.text}>
                        {choice.text}{" "}
                        <span className="text-ink-soft">{choice.why === null ? "right" : choice.why}</span>
                      </li>
                    ))}
                  </ul>
                ) : (
                  <p className="text-sm">Expected: {question.expected}</p>
                )}
                <Form method="post" className="flex flex-wrap items-center gap-x-4">
                  <input type="hidden" name="question" value={question.id} />
                  <Button
                    name="intent"
                    value={question.retired ? "bring-back" : "retire"}
                    look="quiet"
                    className="-ml-4"
                  >
                    {question.retired ? "Ask it again" : "Stop asking it"}
                  </Button>
                  {question.safetyCritical ? (
                    <span className="text-sm text-ink-soft">safety-critical: must be right</span>
                  ) : null}
                </Form>
              </li>
            ))}
          </ul>
        </Sheet>
      )}
    </Page>
  );
}
