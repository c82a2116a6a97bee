import { data, Form, href, Link, redirect } from "react-router";
import { notFound, readId, requirePermission } from "~/auth/require.server";
import { CaptionForm } from "~/captions/caption-form.server";
import { plainText } from "~/captions/cue-text";
import { importCaptions } from "~/captions/import-captions.server";
import { LANGUAGES } from "~/captions/languages";
import { currentTracks, trackCues } from "~/captions/load-tracks.server";
import { Button, ButtonLink } from "~/components/ui/button";
import { Field, FormProblem, Select, TextArea, type Refusal } from "~/components/ui/field";
import { EmptyState, Page, Remark, Sheet } from "~/components/ui/page";
import { scopeContext, viewerContext } from "~/context";
import { parseForm, refuse } from "~/forms/parse-form";
import { loadDraft } from "~/lessons/load-draft.server";
import { formatTimecode } from "~/lessons/timecode";
import { formatLocalDate, localDateAt } from "~/training/local-date";
import type { Route } from "./+types/captions";

const CUES_SHOWN = 300;
/** A file of 2 MB, pasted text beside it and the rest of the form. */
const MOST_FORM_BYTES = 5_000_000;

export function meta({ loaderData }: Route.MetaArgs) {
  return [{ title: `Captions: ${loaderData?.title ?? ""} · Castlenut` }];
}

export function loader({ context, params }: Route.LoaderArgs) {
  const scope = context.get(scopeContext);
  requirePermission(scope, "lesson:edit");
  const draft = loadDraft(scope, readId<"lesson">(params.lessonId, "lesson"));
  if (!draft) notFound("lesson");
  const { timeZone } = context.get(viewerContext);
  const recordings = [...new Map(draft.clips.map((clip) => [clip.recordingId, clip])).values()];
  const tracks = currentTracks(
    scope,
    recordings.map((clip) => clip.recordingId),
  );
  return {
    lessonId: draft.lesson.id,
    title: draft.lesson.title,
    recordings: recordings.map(({ recordingId, title, durationMs }) => ({
      recordingId,
      title,
      durationMs,
      tracks: tracks
        .filter((track) => track.recordingId === recordingId)
        .map((track) => ({
          ...track,
          importedOn: formatLocalDate(localDateAt(track.createdAt, timeZone)),
          cues: trackCues(scope, track.id)
            .slice(0, CUES_SHOWN)
            .map(({ id, startMs, endMs, text }) => ({
              id,
              startMs,
              text: plainText(text),
              late: durationMs !== null && endMs > durationMs,
            })),
        })),
    })),
  };
}

export async function action({ request, context, params }: Route.ActionArgs) {
  const scope = context.get(scopeContext);
  requirePermission(scope, "lesson:edit");
  const lessonId = readId<"lesson">(params.lessonId, "lesson");
  const draft = loadDraft(scope, lessonId);
  if (!draft) notFound("lesson");
  if (Number(request.headers.get("Content-Length")) > MOST_FORM_BYTES)
    throw data("The file is larger than 2 MB. Go back and choose the .vtt file itself.", { status: 413 });
  const form = await request.formData();
  const recordingId = String(form.get("recordingId") ?? "");
  const parsed = parseForm(CaptionForm, form);
  if (!parsed.ok) return data({ recordingId, refusal: parsed }, { status: 400 });
  if (!draft.clips.some((clip) => clip.recordingId === parsed.value.recordingId)) notFound("recording");
  const { file, pasted, language } = parsed.value;
  const imported = importCaptions(
    scope,
    parsed.value.recordingId,
    {
      language,
      fileName: file ? file.name.slice(0, 200) : "pasted.vtt",
      file: file ? new Uint8Array(await file.arrayBuffer()) : pasted,
    },
    Date.now(),
  );
  if (imported.ok)
    return redirect(`${href("/bench/lessons/:lessonId/captions", { lessonId })}#${recordingId}`);
  if (imported.reason === "missing") notFound("recording");
  return data(
    { recordingId, refusal: refuse(form, { [file ? "file" : "pasted"]: imported.error }) },
    { status: 400 },
  );
}

type Recording = Route.ComponentProps["loaderData"]["recordings"][number];

function Track({ track, lessonId }: { track: Recording["tracks"][number]; lessonId: string }) {
  return (
    <div className="grid gap-3 border-t border-line pt-4">
      <p>
        <strong>{track.label}</strong>: {track.cueCount} {track.cueCount === 1 ? "cue" : "cues"} from{" "}
        {track.fileName}
        <span className="block text-sm text-ink-soft">
          Imported {track.importedOn} by {track.createdBy}.{" "}
          {track.publishedAt === null
            ? "Not published yet."
            : "Published: it stays as it is, a new file takes its place in the next revision."}
        </span>
      </p>
      {track.warnings.length > 0 ? (
        <Remark>
          <p className="font-semibold">The file was taken, with these remarks</p>
          <ul className="mt-1 list-disc pl-5">
            {track.warnings.map((warning) => (
              <li key={warning}>{warning}</li>
            ))}
          </ul>
        </Remark>
      ) : null}
      <details>
        <summary className="inline-flex min-h-11 cursor-pointer items-center font-semibold text-enamel-text underline underline-offset-4">
          Show the cues
        </summary>
        <ol className="grid gap-1">
          {track.cues.map((cue) => (
            <li key={cue.id} className="grid grid-cols-[4.5rem_1fr] gap-3">
              <span className="text-ink-soft">{formatTimecode(cue.startMs)}</span>
              <span className="whitespace-pre-line">
                {cue.text}
                {cue.late ? <strong className="block text-sm">After the end of the recording</strong> : null}
              </span>
            </li>
          ))}
        </ol>
        {track.cueCount > track.cues.length ? (
          <p className="mt-2 text-sm text-ink-soft">
            And {track.cueCount - track.cues.length} more. They are all in the file.
          </p>
        ) : null}
      </details>
      <p>
        <Link
          to={href("/bench/lessons/:lessonId/captions/:trackId/original", { lessonId, trackId: track.id })}
          reloadDocument
          className="inline-flex min-h-11 items-center"
        >
          Download the original file
        </Link>
      </p>
    </div>
  );
}

function ImportForm({
  recording,
  refusal,
  primary,
}: {
  recording: Recording;
  refusal: Refusal;
  primary: boolean;
}) {
  const replaces = recording.tracks.length > 0;
  return (
    <Form method="post" encType="multipart/form-data" className="grid gap-4 border-t border-line pt-4">
      <h3 className="text-xl">{replaces ? "Replace by a new file" : "Import captions"}</h3>
      <FormProblem refusal={refusal} />
      <input type="hidden" name="recordingId" value={recording.recordingId} />
      <div className="grid gap-4 sm:grid-cols-[2fr_1fr]">
        <Field
          label="Caption file (.vtt)"
          name="file"
          type="file"
          accept=".vtt,text/vtt"
          hint="WebVTT in UTF-8, 2 MB at most. The file is kept as it is."
          refusal={refusal && { ...refusal, typed: {} }}
        />
        <Select
          label="Language"
          name="language"
          defaultValue="en"
          hint={replaces ? "The captions of this language are replaced." : undefined}
          options={Object.entries(LANGUAGES).map(([value, label]) => ({ value, label }))}
          refusal={refusal}
        />
      </div>
      <details open={Boolean(refusal?.typed["pasted"])}>
        <summary className="inline-flex min-h-11 cursor-pointer items-center font-semibold text-enamel-text underline underline-offset-4">
          Paste the text in place of a file
        </summary>
        <TextArea
          label="Caption text"
          name="pasted"
          rows={6}
          spellCheck={false}
          placeholder={"WEBVTT\n\n00:01.000 --> 00:04.000\nLower link nut, 88 newton metres."}
          refusal={refusal}
        />
      </details>
      <p>
        <Button look={primary ? "primary" : "ghost"}>
          {replaces ? "Replace captions" : "Import captions"}
        </Button>
      </p>
    </Form>
  );
}

export default function Captions({ loaderData, actionData }: Route.ComponentProps) {
  const { lessonId, title, recordings } = loaderData;
  const firstWithout = recordings.find((recording) => recording.tracks.length === 0)?.recordingId;
  return (
    <Page
      title="Captions"
      under={title}
      narrow
      actions={
        <ButtonLink to={`/bench/lessons/${lessonId}`} look="ghost">
          Back to the bench
        </ButtonLink>
      }
    >
      {recordings.length === 0 ? (
        <EmptyState title="This lesson has no recording yet">
          <p>Captions belong to a recording. Add one to the lesson first.</p>
        </EmptyState>
      ) : (
        <div className="grid gap-6">
          {recordings.map((recording) => (
            <Sheet key={recording.recordingId} className="grid gap-4 p-5">
              <div id={recording.recordingId}>
                <h2 className="text-2xl">{recording.title}</h2>
                <p className="text-sm text-ink-soft">
                  {recording.durationMs === null
                    ? "Length not known yet"
                    : formatTimecode(recording.durationMs)}
                  {recording.tracks.length === 0 ? ". No captions yet." : ""}
                </p>
              </div>
              {recording.tracks.map((track) => (
                <Track key={track.id} track={track} lessonId={lessonId} />
              ))}
              <ImportForm
                recording={recording}
                refusal={actionData?.recordingId === recording.recordingId ? actionData.refusal : undefined}
                primary={recording.recordingId === firstWithout}
              />
            </Sheet>
          ))}
        </div>
      )}
    </Page>
  );
}
