import { data, Form, href, redirect } from "react-router";
import { z } from "zod";
import { requirePermission } from "~/auth/require.server";
import { Button, ButtonLink } from "~/components/ui/button";
import { Field, FormProblem, Select, TextArea } from "~/components/ui/field";
import { EmptyState, Page, Sheet } from "~/components/ui/page";
import { scopeContext } from "~/context";
import { env } from "~/env.server";
import { parseForm, refuse } from "~/forms/parse-form";
import { assignable, assignLesson, shopToday } from "~/training/assign-lesson.server";
import { daysLater, readLocalDate } from "~/training/local-date";
import type { LessonId, UserId } from "#drizzle/schema/ids";
import type { Route } from "./+types/assign";

const Order = z.object({
  lesson: z
    .string("Choose a lesson.")
    .min(1, "Choose a lesson.")
    .transform((id) => id as LessonId),
  person: z
    .union([z.string().transform((id) => [id]), z.array(z.string())], "Choose at least one person.")
    .transform((ids) => ids as UserId[]),
  dueOn: z
    .string()
    .transform(
      (text, context) =>
        readLocalDate(text) ??
        (context.addIssue({ code: "custom", message: "Choose the day it is due." }), z.NEVER),
    ),
  note: z.string().trim().max(500, "Keep the note under 500 characters.").default(""),
});

export function meta() {
  return [{ title: "Assign training · Castlenut" }];
}

export function loader({ context, url }: Route.LoaderArgs) {
  const scope = context.get(scopeContext);
  requirePermission(scope, "training:assign");
  const today = shopToday(scope, Date.now());
  return {
    ...assignable(scope),
    today,
    inTwoWeeks: daysLater(today, 14),
    lesson: url.searchParams.get("lesson") ?? "",
    preselected: url.searchParams.getAll("person"),
  };
}

export async function action({ request, context }: Route.ActionArgs) {
  const scope = context.get(scopeContext);
  requirePermission(scope, "training:assign");
  const fields = await request.formData();
  const chosen = fields.getAll("person").map(String);
  const form = parseForm(Order, fields);
  if (!form.ok) return data({ ...form, chosen }, { status: 400 });
  const { lesson, person, dueOn, note } = form.value;
  const result = assignLesson(
    scope,
    { lessonId: lesson, userIds: person, dueOn, note },
    env().PUBLIC_ORIGIN,
    Date.now(),
  );
  if (!result.ok) {
    const field = result.field === "people" ? "person" : result.field;
    return data({ ...refuse(fields, { [field]: result.sentence }), chosen }, { status: 400 });
  }
  return redirect(`${href("/skills")}?assigned=${result.assigned}&moved=${result.moved}&lesson=${lesson}`);
}

export default function Assign({ loaderData, actionData }: Route.ComponentProps) {
  const { lessons, people, today, inTwoWeeks } = loaderData;
  const chosen = new Set(actionData ? actionData.chosen : loaderData.preselected);
  const personError = actionData?.errors.person;
  if (lessons.length === 0)
    return (
      <Page title="Assign training" narrow>
        <EmptyState title="No lesson is published yet">
          <p>A lesson can be assigned once it is published.</p>
          <ButtonLink to="/bench">Go to the bench</ButtonLink>
        </EmptyState>
      </Page>
    );
  return (
    <Page title="Assign training" narrow>
      <Form method="post" className="grid gap-5">
        <FormProblem refusal={actionData} />
        <Sheet className="grid gap-5 p-5">
          <Select
            label="Lesson"
            name="lesson"
            refusal={actionData}
            defaultValue={loaderData.lesson}
            options={[
              { value: "", label: "Choose a lesson" },
              ...lessons.map(({ id, title }) => ({ value: id, label: title })),
            ]}
          />
          <fieldset aria-describedby={personError ? "person-error" : undefined}>
            <legend className="text-sm font-semibold text-ink-soft">People</legend>
            <div className="mt-1 grid gap-x-6 sm:grid-cols-2">
              {people.map(({ id, name, role }) => (
                <label key={id} className="flex min-h-11 items-center gap-3">
                  <input
                    type="checkbox"
                    name="person"
                    value={id}
                    defaultChecked={chosen.has(id)}
                    className="size-5 accent-enamel"
                  />
                  {name} <span className="text-sm text-ink-soft">{role}</span>
                </label>
              ))}
            </div>
            {personError ? (
              <p id="person-error" className="text-sm font-semibold text-error">
                {personError}
              </p>
            ) : null}
          </fieldset>
          <Field
            label="Due on"
            name="dueOn"
            type="date"
            min={today}
            defaultValue={inTwoWeeks}
            refusal={actionData}
            hint="In your shop's time zone. Who has the lesson already gets the new day."
          />
          <TextArea label="Note for the mail (optional)" name="note" refusal={actionData} maxLength={500} />
        </Sheet>
        <div>
          <Button>Assign</Button>
        </div>
      </Form>
    </Page>
  );
}
