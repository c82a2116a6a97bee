import { Form, href, Link, useNavigate, useNavigation } from "react-router";
import { usePlayhead } from "~/components/player/moment";
import { Button } from "~/components/ui/button";
import { Field, Select, type Refusal } from "~/components/ui/field";
import type { Draft, DraftChapter } from "~/lessons/draft";
import { nearestLessonTime } from "~/lessons/lesson-time";
import { choices, KIND_WORDS, PHASE_WORDS } from "~/lessons/mark-words";
import { formatExactTimecode, formatTimecode, momentParam } from "~/lessons/timecode";
import { MarkRow } from "./mark-row";
import { MomentField } from "./moment-field";

/** Finds the refusal that belongs to one form of the page, by its button and the thing that it is about. */
export type RefusalOf = (intent: string, id?: string) => Refusal;

export const PHASE_CHOICES = [{ value: "", label: "Not chosen yet" }, ...choices(PHASE_WORDS)];

function AddMarks({
  lessonId,
  chapterId,
  fromMs,
  toMs,
}: {
  lessonId: string;
  chapterId: string;
  fromMs: number;
  toMs: number;
}) {
  const playhead = usePlayhead();
  const navigate = useNavigate();
  const address = (kind: string, ms: number) =>
    `${href("/bench/lessons/:lessonId/marks/new", { lessonId })}?kind=${kind}&chapter=${chapterId}&at=${momentParam(ms)}`;
  return (
    <div className="flex flex-wrap items-center gap-x-1 text-sm">
      <span className="font-semibold">Add</span>
      {choices(KIND_WORDS).map(({ value, label }) => (
        <Link
          key={value}
          to={address(value, fromMs)}
          className="inline-flex min-h-11 items-center px-2"
          onClick={(event) => {
            // Where the video stands inside this chapter, the mark starts there.
            const ms = playhead?.now();
            if (
              ms === null ||
              ms === undefined ||
              ms < fromMs ||
              ms >= toMs ||
              event.ctrlKey ||
              event.metaKey
            )
              return;
            event.preventDefault();
            void navigate(address(value, ms));
          }}
        >
          {label.toLowerCase()}
        </Link>
      ))}
    </div>
  );
}

function EditChapter({
  chapter,
  version,
  startMs,
  first,
  refusalOf,
}: {
  chapter: DraftChapter;
  version: number;
  startMs: number;
  first: boolean;
  refusalOf: RefusalOf;
}) {
  const sending = useNavigation().state !== "idle";
  const refusal = refusalOf("change-chapter", chapter.id);
  const whole = refusal?.errors[""] ?? refusalOf("remove-chapter", chapter.id)?.errors[""];
  const identity = (intent: string) => (
    <>
      <input type="hidden" name="intent" value={intent} />
      <input type="hidden" name="chapterId" value={chapter.id} />
      <input type="hidden" name="version" value={version} />
    </>
  );
  return (
    <details
      open={
        refusal !== undefined ||
        whole !== undefined ||
        chapter.phase === null ||
        chapter.state === "pencilled"
      }
    >
      <summary className="flex min-h-11 cursor-pointer items-center text-sm font-semibold text-enamel-text">
        Change this chapter
      </summary>
      <div className="grid gap-3 pt-1">
        {whole ? (
          <p role="alert" className="text-sm font-semibold text-error">
            {whole}
          </p>
        ) : null}
        <Form
          method="post"
          preventScrollReset
          className="grid items-start gap-3 sm:grid-cols-2"
          id={`change-${chapter.id}`}
        >
          {identity("change-chapter")}
          <Field
            label="Title"
            name="title"
            defaultValue={chapter.title}
            refusal={refusal}
            className="sm:col-span-2"
          />
          <Select
            label="Phase"
            name="phase"
            defaultValue={chapter.phase ?? ""}
            options={PHASE_CHOICES}
            refusal={refusal}
          />
          <MomentField
            label="Starts at"
            name="start"
            defaultValue={formatExactTimecode(startMs)}
            refusal={refusal}
            {...(first ? { hint: "The first chapter starts where the recording starts." } : {})}
          />
        </Form>
        <div className="flex flex-wrap gap-2">
          <Button form={`change-${chapter.id}`} disabled={sending} look="ghost">
            Save chapter
          </Button>
          <Form method="post" preventScrollReset>
            {identity("remove-chapter")}
            <Button look="quiet" disabled={sending} aria-label={`Remove chapter: ${chapter.title}`}>
              Remove, its marks go to the {first ? "next" : "one before"}
            </Button>
          </Form>
        </div>
      </div>
    </details>
  );
}

/** One chapter with its marks. */
export function ChapterCard({
  draft,
  chapter,
  n,
  refusalOf,
}: {
  draft: Draft;
  chapter: DraftChapter;
  n: number;
  refusalOf: RefusalOf;
}) {
  const { lesson, clips, chapters, marks } = draft;
  const playhead = usePlayhead();
  const at = (ms: number) => nearestLessonTime(clips, chapter.recordingId, ms);
  const [fromMs, toMs] = [at(chapter.startMs), at(chapter.endMs)];
  const own = marks.filter((mark) => mark.chapterId === chapter.id);
  const first = !chapters.some(
    (other) => other.recordingId === chapter.recordingId && other.startMs < chapter.startMs,
  );
  return (
    <li
      id={`chapter-${chapter.id}`}
      className={`grid gap-3 rounded-md border bg-sheet p-4 ${chapter.state === "pencilled" ? "border-dashed border-line-strong" : "border-line"}`}
    >
      <header className="flex flex-wrap items-baseline gap-x-3 gap-y-1">
        <h3 className="min-w-0 text-2xl wrap-anywhere">
          {n}. {chapter.title}
        </h3>
        <a
          href={`?t=${momentParam(fromMs)}#chapter-${chapter.id}`}
          className="inline-flex min-h-11 items-center text-sm tabular-nums"
          onClick={(event) => {
            if (!playhead) return;
            event.preventDefault();
            playhead.seek(fromMs);
          }}
        >
          {formatTimecode(fromMs)}–{formatTimecode(toMs)}
        </a>
        <span className="text-sm text-ink-soft">
          {chapter.phase === null ? "Phase not chosen" : PHASE_WORDS[chapter.phase]}
          {chapter.state === "pencilled" ? " · In pencil" : ""}
        </span>
      </header>
      {own.length === 0 ? (
        <p className="text-sm text-ink-soft">No marks yet.</p>
      ) : (
        <ul className="grid gap-2">
          {own.map((mark) => (
            <MarkRow
              key={mark.id}
              mark={mark}
              lessonId={lesson.id}
              version={lesson.version}
              atMs={nearestLessonTime(clips, mark.recordingId, mark.atMs)}
              refusal={refusalOf("ink", mark.id) ?? refusalOf("erase", mark.id)}
            />
          ))}
        </ul>
      )}
      <AddMarks lessonId={lesson.id} chapterId={chapter.id} fromMs={fromMs} toMs={toMs} />
      <EditChapter
        chapter={chapter}
        version={lesson.version}
        startMs={fromMs}
        first={first}
        refusalOf={refusalOf}
      />
    </li>
  );
}
