import { useEffect } from "react";
import { data, Form, href, redirect, useRevalidator } from "react-router";
import { z } from "zod";
import { notFound, requirePermission } from "~/auth/require.server";
import { Button, ButtonLink } from "~/components/ui/button";
import { Field, FormProblem } from "~/components/ui/field";
import { localTime } from "~/components/ui/local-time";
import { EmptyState, Page, Sheet } from "~/components/ui/page";
import { scopeContext, viewerContext } from "~/context";
import { parseForm, refuse } from "~/forms/parse-form";
import { lengthWords } from "~/lessons/steps";
import { deleteRecording } from "~/recordings/delete-recording.server";
import { sizeWords } from "~/recordings/limits";
import { listRecordings, renameRecording } from "~/recordings/list-recordings.server";
import { STATE_WORDS } from "~/recordings/state-words";
import type { RecordingId } from "#drizzle/schema/ids";
import type { Route } from "./+types/recordings";

const recording = z.string().transform((id) => id as RecordingId);
const Intent = z.discriminatedUnion("intent", [
  z.object({ intent: z.literal("delete"), recording }),
  z.object({
    intent: z.literal("rename"),
    recording,
    title: z.string().trim().min(1, "Give it a title.").max(120, "Keep the title under 120 characters."),
  }),
]);

export function meta() {
  return [{ title: "Recordings · Castlenut" }];
}

export function loader({ context }: Route.LoaderArgs) {
  const scope = context.get(scopeContext);
  requirePermission(scope, "recording:upload");
  return { recordings: listRecordings(scope), timeZone: context.get(viewerContext).timeZone };
}

export async function action({ request, context }: Route.ActionArgs) {
  const scope = context.get(scopeContext);
  requirePermission(scope, "recording:upload");
  const fields = await request.formData();
  const form = parseForm(Intent, fields);
  if (!form.ok) return data(form, { status: 400 });
  if (form.value.intent === "rename") {
    if (!renameRecording(scope, form.value.recording, form.value.title)) notFound("recording");
    return redirect(href("/bench/recordings"));
  }
  const deleted = deleteRecording(scope, form.value.recording, Date.now());
  if (deleted.ok) return redirect(href("/bench/recordings"));
  return deleted.reason === "missing"
    ? notFound("recording")
    : data(refuse(fields, { "": deleted.sentence }), { status: 409 });
}

type Row = Route.ComponentProps["loaderData"]["recordings"][number];

function RecordingRow({
  row,
  timeZone,
  refusal,
}: {
  row: Row;
  timeZone: string;
  refusal: Route.ComponentProps["actionData"];
}) {
  const mine = refusal && refusal.typed.recording === row.id ? refusal : undefined;
  const sentences = [
    row.stateReason,
    row.stopped
      ? "The work on it stopped with a fault. The owner finds it under Shop settings, failed background tasks."
      : "",
    row.lessonTitle ? `In the lesson “${row.lessonTitle}”.` : "",
  ].filter(Boolean);
  return (
    <li className="flex flex-wrap gap-4 border-b border-line px-5 py-4 last:border-b-0">
      {row.hasPoster ? (
        <img
          src={`/recordings/${row.id}/poster`}
          alt=""
          width={160}
          height={90}
          className="h-[90px] w-40 rounded bg-graphite object-cover"
          loading="lazy"
        />
      ) : (
        <div className="h-[90px] w-40 rounded bg-graphite" aria-hidden="true" />
      )}
      <div className="grid min-w-0 flex-1 basis-64 content-start gap-1">
        <p className="font-semibold">{row.title}</p>
        <p className="text-sm wrap-anywhere text-ink-soft">
          {row.fileName}, {sizeWords(row.sizeBytes)}
          {row.durationMs ? `, ${lengthWords(row.durationMs)}` : ""}
          {row.width && row.height ? `, ${row.width} × ${row.height}` : ""}
        </p>
        <p className="text-sm text-ink-soft">
          {row.uploadedBy}, {localTime(row.createdAt, timeZone)}
        </p>
        <p>
          <strong>{STATE_WORDS[row.state]}</strong>
          {sentences.length > 0 ? `. ${sentences.join(" ")}` : ""}
        </p>
        <div className="empty:hidden">
          <FormProblem refusal={mine} />
        </div>
        <div className="flex flex-wrap items-start gap-3">
          {row.state === "ready" ? (
            <ButtonLink to={`/bench/lessons/new?recording=${row.id}`}>Make a lesson</ButtonLink>
          ) : null}
          {row.state === "uploading" && row.mine ? (
            <ButtonLink to={href("/bench/recordings/upload")} look="ghost">
              Go on uploading
            </ButtonLink>
          ) : null}
          <details>
            <summary className="flex min-h-11 cursor-pointer items-center px-2 text-sm font-semibold">
              Rename
            </summary>
            <Form method="post" className="flex flex-wrap items-end gap-2 py-2">
              <input type="hidden" name="recording" value={row.id} />
              <Field label="Title" name="title" defaultValue={row.title} refusal={mine} />
              <Button name="intent" value="rename" look="ghost">
                Save
              </Button>
            </Form>
          </details>
          <details>
            <summary className="flex min-h-11 cursor-pointer items-center px-2 text-sm font-semibold">
              Delete
            </summary>
            <Form method="post" className="grid gap-2 py-2">
              <input type="hidden" name="recording" value={row.id} />
              <p className="max-w-72 text-sm">The file leaves storage for good.</p>
              <Button name="intent" value="delete" look="ghost">
                Delete this recording
              </Button>
            </Form>
          </details>
        </div>
      </div>
    </li>
  );
}

export default function Recordings({
  loaderData: { recordings, timeZone },
  actionData,
}: Route.ComponentProps) {
  const { revalidate } = useRevalidator();
  const working = recordings.some((row) => row.working);
  useEffect(() => {
    if (!working) return;
    const timer = setInterval(() => void revalidate(), 2500);
    return () => clearInterval(timer);
  }, [working, revalidate]);
  return (
    <Page
      title="Recordings"
      actions={<ButtonLink to={href("/bench/recordings/upload")}>Upload recordings</ButtonLink>}
    >
      {recordings.length === 0 ? (
        <EmptyState title="No recordings yet">
          <p>Film the next job with a phone, then upload it here. A lesson is made from it.</p>
        </EmptyState>
      ) : (
        <Sheet>
          <ul>
            {recordings.map((row) => (
              <RecordingRow key={row.id} row={row} timeZone={timeZone} refusal={actionData} />
            ))}
          </ul>
        </Sheet>
      )}
    </Page>
  );
}
