import { data, Form, href, redirect } from "react-router";
import { z } from "zod";
import { notFound, readId, requirePermission } from "~/auth/require.server";
import { Button } from "~/components/ui/button";
import { Field, FormProblem, TextArea } from "~/components/ui/field";
import { Page, Sheet } from "~/components/ui/page";
import { scopeContext } from "~/context";
import { env } from "~/env.server";
import { parseForm, refuse } from "~/forms/parse-form";
import { findLearnerLesson } from "~/lessons/learner-lesson.server";
import { shopToday } from "~/training/assign-lesson.server";
import { readLocalDate } from "~/training/local-date";
import { requestSignOff } from "~/training/sign-off.server";
import type { Route } from "./+types/sign-off-request";

const Ask = z.object({
  doneOn: z
    .string()
    .transform(
      (text, context) =>
        readLocalDate(text) ??
        (context.addIssue({ code: "custom", message: "Name the day you did the job." }), z.NEVER),
    ),
  note: z.string().trim().max(500, "Keep the note under 500 characters.").default(""),
});

export function meta() {
  return [{ title: "Ask for a sign-off · Castlenut" }];
}

export function loader({ context, url }: Route.LoaderArgs) {
  const scope = context.get(scopeContext);
  requirePermission(scope, "sign-off:request");
  const lessonId = readId<"lesson">(url.searchParams.get("lesson") ?? undefined, "lesson");
  const lesson = findLearnerLesson(scope, lessonId) ?? notFound("lesson");
  return { title: lesson.snapshot.title, today: shopToday(scope, Date.now()) };
}

export async function action({ request, context, url }: Route.ActionArgs) {
  const scope = context.get(scopeContext);
  requirePermission(scope, "sign-off:request");
  const lessonId = readId<"lesson">(url.searchParams.get("lesson") ?? undefined, "lesson");
  const fields = await request.formData();
  const form = parseForm(Ask, fields);
  if (!form.ok) return data(form, { status: 400 });
  const result = requestSignOff(scope, { lessonId, ...form.value }, env().PUBLIC_ORIGIN, Date.now());
  if (!result.ok) {
    if (result.field === "lesson") notFound("lesson");
    return data(refuse(fields, { [result.field]: result.sentence }), { status: 400 });
  }
  return redirect(href("/training"));
}

export default function SignOffRequest({ loaderData: { title, today }, actionData }: Route.ComponentProps) {
  return (
    <Page title="Ask for a sign-off" under={title} narrow>
      <Form method="post" className="grid gap-5">
        <FormProblem refusal={actionData} />
        <Sheet className="grid gap-5 p-5">
          <p>
            The instructors get a mail. One who was there at the critical steps answers on a device of their
            own. Until then, do this job only with an instructor present.
          </p>
          <Field
            label="Day you did the job"
            name="doneOn"
            type="date"
            max={today}
            defaultValue={today}
            refusal={actionData}
          />
          <TextArea
            label="Note (optional)"
            name="note"
            hint="Which car, who was there."
            refusal={actionData}
            maxLength={500}
          />
        </Sheet>
        <div>
          <Button>Ask for a sign-off</Button>
        </div>
      </Form>
    </Page>
  );
}
