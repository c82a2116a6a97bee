import { Form, href, redirect, useNavigation } from "react-router";
import { ulid } from "ulid";
import { requirePermission } from "~/auth/require.server";
import { LessonFields } from "~/components/bench/lesson-fields";
import { Button, ButtonLink } from "~/components/ui/button";
import { Checkbox, Field, FormProblem } from "~/components/ui/field";
import { EmptyState, Page, Sheet } from "~/components/ui/page";
import { scopeContext } from "~/context";
import { parseForm } from "~/forms/parse-form";
import { createLesson } from "~/lessons/create-lesson.server";
import { NewLessonForm } from "~/lessons/lesson-form";
import { listReadyRecordings } from "~/lessons/list-bench.server";
import { formatTimecode } from "~/lessons/timecode";
import { listVehicles } from "~/lessons/vehicles.server";
import { refusedDraft, refusedForm } from "./answer-draft.server";
import type { Route } from "./+types/lesson-new";

export function meta() {
  return [{ title: "New lesson · Castlenut" }];
}

export function loader({ context, request }: Route.LoaderArgs) {
  const scope = context.get(scopeContext);
  requirePermission(scope, "lesson:edit");
  const chosen = new URL(request.url).searchParams.getAll("recording");
  return { recordings: listReadyRecordings(scope), vehicles: listVehicles(scope), chosen, lessonId: ulid() };
}

export async function action({ context, request }: Route.ActionArgs) {
  const scope = context.get(scopeContext);
  requirePermission(scope, "lesson:edit");
  const form = await request.formData();
  const lesson = parseForm(NewLessonForm, form);
  if (!lesson.ok) return refusedForm(lesson);
  const made = createLesson(scope, lesson.value, Date.now());
  if (!made.ok) return refusedDraft(form, made);
  return redirect(href("/bench/lessons/:lessonId", { lessonId: made.lessonId }));
}

export default function NewLesson({ loaderData, actionData: refusal }: Route.ComponentProps) {
  const { recordings, vehicles, chosen, lessonId } = loaderData;
  const sending = useNavigation().state !== "idle";
  const order = new Map(
    [...recordings]
      .filter((recording) => chosen.includes(recording.id))
      .map((recording, n) => [recording.id, n + 1]),
  );
  if (recordings.length === 0)
    return (
      <Page title="New lesson" narrow>
        <EmptyState title="No recording is ready yet">
          <p>
            A lesson is made of one or more recordings. Upload one, or wait until the last upload has been
            looked through.
          </p>
          <ButtonLink to={href("/bench/recordings/upload")}>Upload a recording</ButtonLink>
        </EmptyState>
      </Page>
    );
  return (
    <Page title="New lesson" narrow under="One job, of one or more recordings.">
      <Sheet className="p-4 sm:p-6">
        <Form method="post" className="grid gap-5">
          <input type="hidden" name="lessonId" value={refusal?.typed["lessonId"] ?? lessonId} />
          <FormProblem refusal={refusal} />
          <fieldset
            className="grid gap-1 rounded border border-line px-4 pt-2 pb-4"
            aria-describedby="recordings-error"
          >
            <legend className="px-1 font-semibold">Recordings</legend>
            <p className="text-sm text-ink-soft">With several, the numbers say in which order they play.</p>
            {refusal?.errors["recordings"] ? (
              <p id="recordings-error" className="text-sm font-semibold text-error">
                {refusal.errors["recordings"]}
              </p>
            ) : null}
            {recordings.map((recording) => (
              <div key={recording.id} className="flex flex-wrap items-center justify-between gap-x-4">
                <Checkbox
                  name={`recording-${recording.id}`}
                  label={`${recording.title}, ${formatTimecode(recording.durationMs)}${recording.used ? ", already in a lesson" : ""}`}
                  defaultChecked={chosen.includes(recording.id)}
                  refusal={refusal}
                />
                {recordings.length > 1 ? (
                  <label className="flex items-center gap-2 text-sm text-ink-soft">
                    Place
                    <span className="sr-only">of {recording.title}</span>
                    <input
                      name={`place-${recording.id}`}
                      type="number"
                      min={1}
                      max={99}
                      defaultValue={refusal?.typed[`place-${recording.id}`] ?? order.get(recording.id) ?? ""}
                      className="min-h-11 w-18 rounded border border-line-strong bg-sheet px-2"
                    />
                  </label>
                ) : null}
              </div>
            ))}
          </fieldset>
          <LessonFields fields={{}} chosen={[]} vehicles={vehicles} refusal={refusal} />
          <Field
            label="Name of the first chapter"
            name="chapterTitle"
            defaultValue="Step 1"
            refusal={refusal}
            hint="It covers the whole recording until you split it on the bench."
          />
          <div className="flex flex-wrap gap-3">
            <Button disabled={sending}>Make the lesson</Button>
            <ButtonLink look="ghost" to={href("/bench")}>
              Back to the bench
            </ButtonLink>
          </div>
        </Form>
      </Sheet>
    </Page>
  );
}
