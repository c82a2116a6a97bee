import { z } from "zod";
import { gradeAnswer, type Asked } from "~/quizzes/grade-answer";
import { prepareAsked } from "~/quizzes/asked";

const given = z.object({ value: z.number(), unit: z.string() });
const Question = z.object({
  asked: z.object({
    text: z.string().optional(),
    kind: z.string().default("measure"),
    value: z.number().nullish(),
    min: z.number().nullish(),
    max: z.number().nullish(),
    unit: z.string(),
    tolerance: z.number().nullish(),
    angleDeg: z.number().nullish(),
    stages: z.array(given).nullish(),
    others: z.array(given.extend({ component: z.string().default("another fastener") })).nullish(),
    superseded: z.array(given).nullish(),
  }),
  answer: z.string(),
  country: z.string().optional(),
});

/** `grade JSON`: prints `{outcome, factor?, text}`; a question that cannot be read prints `{error}` and exits with 1. */
function main(argument: string | undefined): void {
  if (argument === undefined) return refuse('Give one JSON argument: {"asked":{…},"answer":"88 Nm"}');
  let json: unknown;
  try {
    json = JSON.parse(argument);
  } catch {
    return refuse("The argument is not JSON.");
  }
  const question = Question.safeParse(json);
  if (!question.success) return refuse(z.prettifyError(question.error));
  const { asked: raw, answer, country } = question.data;
  const asked = Object.fromEntries(
    Object.entries(raw).filter(([, value]) => value !== null && value !== undefined),
  ) as unknown as Asked;
  const prepared = prepareAsked(asked, country);
  if (!prepared.ok) return refuse(prepared.error);
  console.log(JSON.stringify(gradeAnswer(asked, answer, country ? { country } : {})));
}

function refuse(error: string): void {
  console.log(JSON.stringify({ error }));
  process.exitCode = 1;
}

main(process.argv[2]);
