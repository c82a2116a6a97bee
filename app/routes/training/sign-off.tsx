import { data, Form, href, redirect } from "react-router";
import { z } from "zod";
import { notFound, readId, requirePermission } from "~/auth/require.server";
import { Button } from "~/components/ui/button";
import { Field, FormProblem, Select, TextArea } from "~/components/ui/field";
import { Page, Sheet } from "~/components/ui/page";
import { scopeContext } from "~/context";
import { env } from "~/env.server";
import { parseForm, refuse } from "~/forms/parse-form";
import { findLearnerLesson } from "~/lessons/learner-lesson.server";
import { shopToday } from "~/training/assign-lesson.server";
import { readLocalDate } from "~/training/local-date";
import { findPerson, giveSignOff, openRequests } from "~/training/sign-off.server";
import { LEVEL_WORDS, LEVELS, PRESENCE_WORDS, PRESENCES } from "~/training/sign-off";
import type { Route } from "./+types/sign-off";

const Order = z.object({
  presence: z.enum(PRESENCES, "Say how much of the job you saw."),
  level: z.enum(LEVELS, "Say how they did it."),
  shownOn: z
    .string()
    .transform(
      (text, context) =>
        readLocalDate(text) ??
        (context.addIssue({ code: "custom", message: "Name the day the job was shown." }), z.NEVER),
    ),
  valuesSet: z.string().trim().max(2000, "Keep this under 2,000 characters.").default(""),
  note: z.string().trim().max(1000, "Keep the note under 1,000 characters.").default(""),
});

export function meta() {
  return [{ title: "Sign off · Castlenut" }];
}

function readParams(params: { userId: string; lessonId: string }) {
  return {
    userId: readId<"user">(params.userId, "person"),
    lessonId: readId<"lesson">(params.lessonId, "lesson"),
  };
}

export function loader({ params, context }: Route.LoaderArgs) {
  const scope = context.get(scopeContext);
  requirePermission(scope, "sign-off:give");
  const { userId, lessonId } = readParams(params);
  const person = findPerson(scope, userId) ?? notFound("person");
  const lesson = findLearnerLesson(scope, lessonId) ?? notFound("lesson");
  const request = openRequests(scope).find((row) => row.userId === userId && row.lessonId === lessonId);
  return {
    name: person.name,
    own: userId === scope.userId,
    title: lesson.snapshot.title,
    revision: lesson.n,
    // Component names only: what was set is written by hand, never copied from the plate.
    torques: [
      ...new Set(lesson.marks.filter(({ mark }) => mark.kind === "torque").map(({ mark }) => mark.component)),
    ],
    today: shopToday(scope, Date.now()),
    doneOn: request?.doneOn ?? null,
    asked: request?.note ?? null,
  };
}

export async function action({ request, params, context }: Route.ActionArgs) {
  const scope = context.get(scopeContext);
  requirePermission(scope, "sign-off:give");
  const { userId, lessonId } = readParams(params);
  if (!findPerson(scope, userId)) notFound("person");
  const fields = await request.formData();
  const form = parseForm(Order, fields);
  if (!form.ok) return data(form, { status: 400 });
  const result = giveSignOff(scope, { userId, lessonId, ...form.value }, env().PUBLIC_ORIGIN, Date.now());
  if (!result.ok) return data(refuse(fields, { [result.field]: result.sentence }), { status: 400 });
  return redirect(href("/skills/:userId/:lessonId", { userId, lessonId }));
}

export default function SignOff({ loaderData, actionData }: Route.ComponentProps) {
  const { name, own, title, revision, torques, today, doneOn, asked } = loaderData;
  if (own)
    return (
      <Page title="Sign off" under={title} narrow>
        <p>Nobody signs off their own work. Ask another instructor.</p>
      </Page>
    );
  const choice = (value: string, label: string) => ({ value, label });
  return (
    <Page title={`Sign off ${name}`} under={`${title}, revision ${revision}`} narrow>
      <Form method="post" className="grid gap-5">
        <FormProblem refusal={actionData} />
        <Sheet className="grid gap-5 p-5">
          {asked ? <p className="border-l-4 border-line-strong pl-4">“{asked}”</p> : null}
          <Select
            label="How much of the job did you see?"
            name="presence"
            refusal={actionData}
            options={[
              choice("", "Choose"),
              ...PRESENCES.map((value) => choice(value, PRESENCE_WORDS[value])),
            ]}
          />
          <Select
            label="How did they do it?"
            name="level"
            refusal={actionData}
            hint="With help is recorded and does not count as shown."
            options={[choice("", "Choose"), ...LEVELS.map((value) => choice(value, LEVEL_WORDS[value]))]}
          />
          <Field
            label="Day it was shown"
            name="shownOn"
            type="date"
            max={today}
            defaultValue={doneOn ?? today}
            refusal={actionData}
          />
          <TextArea
            label="What was set, and how it was tightened"
            name="valuesSet"
            rows={Math.max(3, torques.length + 1)}
            defaultValue={torques.map((component) => `${component}: `).join("\n")}
            refusal={actionData}
            hint="For each torque value: the wrench, what it was set to, each stage and angle, the paint mark. For an electronic wrench, the peak shown. Do not pull a fastener again to find out."
          />
          <TextArea label="Note (optional)" name="note" refusal={actionData} />
        </Sheet>
        <div>
          <Button>Sign off</Button>
        </div>
      </Form>
    </Page>
  );
}
