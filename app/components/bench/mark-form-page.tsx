import { Form, href, Link, useNavigation } from "react-router";
import { BenchPlayer } from "~/components/player/bench-player";
import { PlayheadProvider } from "~/components/player/moment";
import { Button, ButtonLink } from "~/components/ui/button";
import { FormProblem, Select, type Refusal } from "~/components/ui/field";
import { Page, Remark, Sheet } from "~/components/ui/page";
import type { ShopDocument } from "~/lessons/documents.server";
import type { Draft } from "~/lessons/draft";
import { nearestLessonTime } from "~/lessons/lesson-time";
import type { MarkKind } from "~/lessons/mark";
import { KIND_WORDS, markTitle } from "~/lessons/mark-words";
import { formatTimecode } from "~/lessons/timecode";
import { valuesText } from "~/lessons/values-text";
import { MarkFields } from "./mark-fields";
import { MomentField } from "./moment-field";
import { SourceFields } from "./source-fields";

const WITHOUT_SOURCE: readonly MarkKind[] = ["tool", "correction"];

/** The page of one mark: the recording beside the form, so that a value can be typed while watching. */
export function MarkFormPage({
  draft,
  kind,
  title,
  fields,
  documents,
  startMs,
  refusal,
  country,
  safetyReason,
  newId,
  said = "",
  pencilled = false,
}: {
  draft: Draft;
  kind: MarkKind;
  title: string;
  fields: Readonly<Record<string, string>>;
  documents: readonly ShopDocument[];
  startMs: number;
  refusal: Refusal;
  country: string;
  safetyReason: string | null;
  /** The id of a new mark; null when one is changed. */
  newId: string | null;
  said?: string;
  pencilled?: boolean;
}) {
  const { lesson, clips, chapters, marks } = draft;
  const back = href("/bench/lessons/:lessonId", { lessonId: lesson.id });
  const sending = useNavigation().state !== "idle";
  const values = marks
    .filter((mark) => mark.kind === "torque" || mark.kind === "measure" || mark.kind === "tool")
    .map((mark) => ({
      id: mark.id,
      label: `${KIND_WORDS[mark.kind]}: ${markTitle(mark)}, ${valuesText(mark.values)}`,
    }));
  return (
    <PlayheadProvider>
      <Page
        title={title}
        under={
          <>
            In{" "}
            <Link to={back} className="inline-flex min-h-11 items-center">
              {lesson.title}
            </Link>
          </>
        }
      >
        <div className="grid items-start gap-6 lg:grid-cols-2">
          <div className="grid gap-4 lg:sticky lg:top-4">
            <BenchPlayer clips={clips} startMs={startMs} />
            {said ? (
              <Remark>
                Read from the captions: <q>{said}</q>
              </Remark>
            ) : null}
          </div>
          <Sheet className="p-4 sm:p-6">
            <Form method="post" className="grid gap-5">
              <input type="hidden" name="version" value={lesson.version} />
              <input type="hidden" name="kind" value={kind} />
              {newId === null ? null : (
                <input type="hidden" name="markId" value={refusal?.typed["markId"] ?? newId} />
              )}
              <FormProblem refusal={refusal} />
              <div className="grid items-start gap-4 sm:grid-cols-2">
                <MomentField label="Moment" name="at" defaultValue={fields["at"] ?? ""} refusal={refusal} />
                <Select
                  label="Chapter"
                  name="chapterId"
                  refusal={refusal}
                  defaultValue={fields["chapterId"] ?? ""}
                  options={chapters.map((chapter) => ({
                    value: chapter.id,
                    label: `${formatTimecode(nearestLessonTime(clips, chapter.recordingId, chapter.startMs))} ${chapter.title}`,
                  }))}
                />
              </div>
              <MarkFields
                kind={kind}
                fields={fields}
                refusal={refusal}
                safetyReason={safetyReason}
                country={country}
                values={values}
              />
              {WITHOUT_SOURCE.includes(kind) ? null : (
                <SourceFields documents={documents} fields={fields} refusal={refusal} />
              )}
              <div className="flex flex-wrap gap-3">
                <Button disabled={sending}>{pencilled || newId !== null ? "Ink it" : "Save and ink"}</Button>
                <ButtonLink look="ghost" to={back}>
                  Back without saving
                </ButtonLink>
              </div>
              <p className="text-sm text-ink-soft">
                Saving inks the mark with your name. A change of value, component, thread or source takes an
                earlier check away.
              </p>
            </Form>
          </Sheet>
        </div>
      </Page>
    </PlayheadProvider>
  );
}
