import { useMemo } from "react";
import { Form, href, redirect, useNavigate, useNavigation } from "react-router";
import { ulid } from "ulid";
import type { Scope } from "~/auth/scope.server";
import { notFound, readId, requirePermission } from "~/auth/require.server";
import { ChapterCard, PHASE_CHOICES, type RefusalOf } from "~/components/bench/chapter-card";
import { Lanes } from "~/components/bench/lanes";
import { LessonFields } from "~/components/bench/lesson-fields";
import { MomentField } from "~/components/bench/moment-field";
import { BenchPlayer, type PlayerKey } from "~/components/player/bench-player";
import { PlayheadProvider } from "~/components/player/moment";
import { Button, ButtonLink } from "~/components/ui/button";
import { Field, FormProblem, Select } from "~/components/ui/field";
import { Page, Sheet } from "~/components/ui/page";
import { scopeContext } from "~/context";
import { parseForm } from "~/forms/parse-form";
import { BenchForm, type BenchRequest } from "~/lessons/bench-form";
import type { Draft } from "~/lessons/draft";
import { editLesson } from "~/lessons/edit-lesson.server";
import { eraseMark, inkMark, putBackMark } from "~/lessons/ink-mark.server";
import { nearestLessonTime } from "~/lessons/lesson-time";
import { listErased } from "~/lessons/list-bench.server";
import { loadDraft } from "~/lessons/load-draft.server";
import { KIND_WORDS } from "~/lessons/mark-words";
import { saveChapters } from "~/lessons/save-chapters.server";
import { formatExactTimecode, formatTimecode, momentParam, readMoment } from "~/lessons/timecode";
import { listVehicles } from "~/lessons/vehicles.server";
import type { LessonId } from "#drizzle/schema/ids";
import { refusedDraft, refusedForm } from "./answer-draft.server";
import type { Route } from "./+types/lesson";

export function meta({ loaderData }: Route.MetaArgs) {
  return [{ title: `${loaderData?.draft.lesson.title ?? "Lesson"}, bench · Castlenut` }];
}

export function loader({ params, request, context }: Route.LoaderArgs) {
  const scope = context.get(scopeContext);
  requirePermission(scope, "lesson:edit");
  const draft = loadDraft(scope, readId<"lesson">(params.lessonId, "lesson")) ?? notFound("lesson");
  return {
    draft,
    erased: listErased(scope, draft.lesson.id),
    vehicles: listVehicles(scope),
    startMs: readMoment(new URL(request.url).searchParams),
    newChapterId: ulid(),
  };
}

// After a refusal too: the page shows the lesson as it is now, with what was typed.
export function shouldRevalidate() {
  return true;
}

function change(scope: Scope, lessonId: LessonId, asked: BenchRequest, now: number) {
  switch (asked.do) {
    case "details":
      return editLesson(scope, lessonId, asked.version, asked.details, now);
    case "chapters":
      return saveChapters(scope, lessonId, asked.version, asked.request, now);
    case "ink":
      return inkMark(scope, lessonId, asked.markId, asked.version, now);
    case "erase":
      return eraseMark(scope, lessonId, asked.markId, asked.version, now);
    case "put-back":
      return putBackMark(scope, lessonId, asked.markId, asked.version, now);
    default:
      return asked satisfies never;
  }
}

/** Where the page opens again, so that the eye finds what was changed without scripts too. */
function anchor(asked: BenchRequest): string {
  if (asked.do === "ink" || asked.do === "put-back") return `#mark-${asked.markId}`;
  if (asked.do === "chapters" && asked.request.edit !== "remove") return `#chapter-${asked.request.id}`;
  return "";
}

export async function action({ params, request, context }: Route.ActionArgs) {
  const scope = context.get(scopeContext);
  requirePermission(scope, "lesson:edit");
  const lessonId = readId<"lesson">(params.lessonId, "lesson");
  const form = await request.formData();
  const asked = parseForm(BenchForm, form);
  if (!asked.ok) return refusedForm(asked);
  const changed = change(scope, lessonId, asked.value, Date.now());
  if (!changed.ok) return refusedDraft(form, changed);
  return redirect(href("/bench/lessons/:lessonId", { lessonId }) + anchor(asked.value));
}

function summary({ lesson, marks }: Draft): string {
  const inPencil = marks.filter((mark) => mark.state === "pencilled").length;
  const pencil =
    inPencil === 0 ? "nothing in pencil" : `${inPencil} ${inPencil === 1 ? "mark" : "marks"} in pencil`;
  const published =
    lesson.newestRevision === null ? "never published" : `newest revision ${lesson.newestRevision}`;
  return `Draft, ${published} · ${pencil}`;
}

export default function BenchLesson({ loaderData, actionData }: Route.ComponentProps) {
  const { draft, erased, vehicles, startMs, newChapterId } = loaderData;
  const { lesson, clips, chapters } = draft;
  const sending = useNavigation().state !== "idle";
  const refusalOf: RefusalOf = (intent, id = "") => {
    const typed = actionData?.typed;
    if (!typed || typed["intent"] !== intent) return undefined;
    return id === "" || typed["chapterId"] === id || typed["markId"] === id ? actionData : undefined;
  };
  const adding = refusalOf("add-chapter");
  const details = refusalOf("details");
  const navigate = useNavigate();
  const keys = useMemo<PlayerKey[]>(() => {
    const mark = (key: string, words: string, kind: string): PlayerKey => ({
      key,
      words,
      run: (ms) =>
        void navigate(
          `${href("/bench/lessons/:lessonId/marks/new", { lessonId: lesson.id })}?kind=${kind}&at=${momentParam(ms)}`,
        ),
    });
    const chapter: PlayerKey = {
      key: "c",
      words: "new chapter here",
      run: (ms) => {
        const start = document.querySelector<HTMLInputElement>("#add-chapter [name=start]");
        if (start) start.value = formatExactTimecode(Math.round(ms / 10) * 10);
        document.querySelector<HTMLInputElement>("#add-chapter [name=title]")?.focus();
      },
    };
    return [
      chapter,
      mark("t", "torque", "torque"),
      mark("s", "tool size", "tool"),
      mark("w", "caution", "caution"),
    ];
  }, [navigate, lesson.id]);
  const address = (page: string) => `${href("/bench/lessons/:lessonId", { lessonId: lesson.id })}/${page}`;
  return (
    <PlayheadProvider>
      <Page
        title={lesson.title}
        under={summary(draft)}
        actions={
          <>
            <ButtonLink look="ghost" to={address("captions")}>
              Captions
            </ButtonLink>
            <ButtonLink look="ghost" to={address("check")}>
              Check values
            </ButtonLink>
            {lesson.newestRevision === null ? null : (
              <ButtonLink look="ghost" to={address("questions")}>
                Questions
              </ButtonLink>
            )}
            <ButtonLink to={address("publish")}>Publish</ButtonLink>
          </>
        }
      >
        {actionData ? (
          <div className="mb-5">
            <FormProblem refusal={actionData} />
          </div>
        ) : null}
        <div className="mb-6">
          <Lanes draft={draft} />
        </div>
        <div className="grid items-start gap-6 lg:grid-cols-[minmax(0,5fr)_minmax(0,6fr)]">
          <div className="grid gap-5 lg:sticky lg:top-4">
            <BenchPlayer clips={clips} startMs={startMs} keys={keys} />
            <Sheet className="p-4">
              <h2 className="mb-3 text-2xl">Add a chapter</h2>
              <Form
                method="post"
                id="add-chapter"
                preventScrollReset
                className="grid items-start gap-3 sm:grid-cols-2"
                key={chapters.length}
              >
                <input type="hidden" name="intent" value="add-chapter" />
                <input type="hidden" name="version" value={lesson.version} />
                <input type="hidden" name="chapterId" value={adding?.typed["chapterId"] ?? newChapterId} />
                <MomentField
                  label="Starts at"
                  name="start"
                  refusal={adding}
                  hint="It splits the chapter that this falls in."
                />
                <Select label="Phase" name="phase" options={PHASE_CHOICES} refusal={adding} defaultValue="" />
                <Field label="Title" name="title" refusal={adding} className="sm:col-span-2" />
                <Button look="ghost" disabled={sending} className="justify-self-start">
                  Add the chapter
                </Button>
              </Form>
            </Sheet>
          </div>
          <section aria-labelledby="chapters" className="grid gap-4">
            <h2 id="chapters" className="text-3xl">
              Chapters and marks
            </h2>
            <ol className="grid gap-4">
              {chapters.map((chapter, n) => (
                <ChapterCard
                  key={chapter.id}
                  draft={draft}
                  chapter={chapter}
                  n={n + 1}
                  refusalOf={refusalOf}
                />
              ))}
            </ol>
            {erased.length > 0 ? (
              <details className="rounded-md border border-line bg-sheet px-4">
                <summary className="flex min-h-11 cursor-pointer items-center font-semibold">
                  Erased ({erased.length})
                </summary>
                <ul className="grid gap-2 pb-4">
                  {erased.map((mark) => (
                    <li key={mark.id} className="flex flex-wrap items-center justify-between gap-3">
                      <span>
                        {formatTimecode(nearestLessonTime(clips, mark.recordingId, mark.atMs))}{" "}
                        {KIND_WORDS[mark.kind]}: {mark.title}
                      </span>
                      <Form method="post" preventScrollReset>
                        <input type="hidden" name="intent" value="put-back" />
                        <input type="hidden" name="markId" value={mark.id} />
                        <input type="hidden" name="version" value={lesson.version} />
                        <Button look="ghost" disabled={sending} aria-label={`Put back: ${mark.title}`}>
                          Put back
                        </Button>
                      </Form>
                    </li>
                  ))}
                </ul>
              </details>
            ) : null}
            <details open={details !== undefined} className="rounded-md border border-line bg-sheet px-4">
              <summary className="flex min-h-11 cursor-pointer items-center font-semibold">
                Lesson details
              </summary>
              <Form method="post" preventScrollReset className="grid gap-5 pb-4">
                <input type="hidden" name="intent" value="details" />
                <input type="hidden" name="version" value={lesson.version} />
                <LessonFields
                  key={vehicles.length}
                  fields={{
                    title: lesson.title,
                    system: lesson.system,
                    position: lesson.position,
                    summary: lesson.summary,
                  }}
                  chosen={draft.vehicles.map((vehicle) => vehicle.id)}
                  vehicles={vehicles}
                  refusal={details}
                />
                <Button look="ghost" disabled={sending} className="justify-self-start">
                  Save details
                </Button>
              </Form>
            </details>
            <details className="rounded-md border border-line bg-sheet px-4">
              <summary className="flex min-h-11 cursor-pointer items-center font-semibold">
                Clips ({clips.length})
              </summary>
              <ol className="grid gap-2 pb-4">
                {clips.map((clip, n) => (
                  <li key={clip.id}>
                    {n + 1}. {clip.title}, {formatTimecode(clip.inMs)}–{formatTimecode(clip.outMs)}, recorded
                    by {clip.recordedBy}
                    {clip.state === "ready" && !clip.deleted
                      ? ""
                      : `. Does not play now: ${clip.stateReason || clip.state}`}
                  </li>
                ))}
              </ol>
            </details>
          </section>
        </div>
      </Page>
    </PlayheadProvider>
  );
}
