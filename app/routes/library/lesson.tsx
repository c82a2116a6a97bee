import { href, Link } from "react-router";
import { can } from "~/auth/permissions";
import { notFound, readId, requirePermission } from "~/auth/require.server";
import { LessonPlayer } from "~/components/player/lesson-player";
import type { TimedMark } from "~/components/player/mark-lane";
import { PlayerProvider } from "~/components/player/player-context";
import { SaidList } from "~/components/player/said-list";
import { CastleNut } from "~/components/plates/castle-nut";
import { momentDay, placeWords } from "~/components/plates/plate-words";
import { sheetWords, StepSheet } from "~/components/step-sheet/step-sheet";
import { ButtonLink } from "~/components/ui/button";
import { EmptyState, Page, Remark, Sheet } from "~/components/ui/page";
import { scopeContext, viewerContext } from "~/context";
import { localRulesWords } from "~/lessons/local-rules";
import { findLearnerLesson } from "~/lessons/learner-lesson.server";
import { lessonDuration, lessonTime } from "~/lessons/lesson-time";
import { saidLines } from "~/lessons/said-lines.server";
import { lessonLength, stepsOf } from "~/lessons/steps";
import { readMoment } from "~/lessons/timecode";
import { vehiclesWords } from "~/lessons/vehicle-words";
import { loadSkills } from "~/training/load-skills.server";
import { whereLeft } from "~/training/record-watched.server";
import { progressWords } from "~/training/progress-words";
import { NO_SKILL } from "~/training/skill-state";
import type { Route } from "./+types/lesson";

export function meta({ loaderData }: Route.MetaArgs) {
  return [{ title: `${loaderData?.lesson.snapshot.title ?? "Lesson"} · Castlenut` }];
}

export function loader({ context, params, url }: Route.LoaderArgs) {
  const scope = context.get(scopeContext);
  requirePermission(scope, "lesson:watch");
  const lessonId = readId<"lesson">(params.lessonId, "lesson");
  const lesson = findLearnerLesson(scope, lessonId) ?? notFound("lesson");
  const { clips } = lesson.snapshot;
  const durationMs = lessonDuration(clips);
  const skill =
    loadSkills(scope, { userIds: [scope.userId], lessonIds: [lessonId] }).get(
      `${scope.userId}:${lessonId}`,
    ) ?? NO_SKILL;
  return {
    lesson,
    said: saidLines(scope, { ...lesson.snapshot, marks: lesson.marks.map(({ mark }) => mark) }),
    durationMs,
    startMs: Math.min(readMoment(url.searchParams), durationMs),
    continueMs: url.searchParams.has("t") ? null : whereLeft(scope, lessonId, clips),
    skill,
    viewer: context.get(viewerContext),
    withInstructor: !can(scope.role, "sign-off:give") && !skill.shown,
    mayEdit: can(scope.role, "lesson:edit"),
  };
}

export default function Lesson({ loaderData }: Route.ComponentProps) {
  const { lesson, said, durationMs, startMs, continueMs, skill, viewer, withInstructor, mayEdit } =
    loaderData;
  const { snapshot, marks, n, revisionId } = lesson;
  const { lessonId, clips, captionTracks } = snapshot;
  const steps = stepsOf(snapshot, marks);
  const timed = marks
    .flatMap((mark): TimedMark[] => {
      const lessonMs = lessonTime(clips, mark.mark.recordingId, mark.mark.atMs);
      return lessonMs === null || mark.showing === "pencilled" ? [] : [{ mark, lessonMs }];
    })
    .toSorted((a, b) => a.lessonMs - b.lessonMs);
  const length = lessonLength(clips);
  const first = clips[0]?.recordingId;
  const rules = localRulesWords(snapshot.system);
  return (
    <PlayerProvider key={revisionId} startMs={startMs}>
      <Page
        title={snapshot.title}
        under={
          <p className="flex flex-wrap gap-x-5 gap-y-0.5">
            <span>{vehiclesWords(snapshot.vehicles)}</span>
            {snapshot.position === "" ? null : (
              <span>{placeWords({ position: snapshot.position, side: "none" })}</span>
            )}
            <span>{length}</span>
            <span>Recorded by {snapshot.recordedBy}</span>
            <span>
              Revision {n}, {momentDay(lesson.publishedAt, viewer.timeZone)}
            </span>
          </p>
        }
        actions={
          <>
            {mayEdit ? (
              <ButtonLink to={`/bench/lessons/${lessonId}`} look="ghost">
                Open on the bench
              </ButtonLink>
            ) : null}
            {can(viewer.role, "sign-off:request") && !can(viewer.role, "sign-off:give") ? (
              <ButtonLink to={`/training/sign-off-requests/new?lesson=${lessonId}`} look="ghost">
                Ask for a sign-off
              </ButtonLink>
            ) : null}
            <ButtonLink to={`/lessons/${lessonId}/quiz`}>Take the quiz</ButtonLink>
          </>
        }
      >
        <div className="grid items-start gap-x-7 gap-y-4 lg:grid-cols-[minmax(0,7fr)_minmax(0,5fr)]">
          <div className="grid min-w-0 gap-4">
            {withInstructor ? (
              <Remark>
                <strong>Until this job is signed off, do it only with an instructor present.</strong>
              </Remark>
            ) : null}
            {rules === "" ? null : <Remark>{rules}</Remark>}
            <Sheet className="overflow-clip">
              <header className="flex flex-wrap items-center justify-between gap-x-4 gap-y-1 px-4 py-3 sm:px-6">
                <h2 className="text-2xl">Step sheet</h2>
                <p className="text-sm text-ink-soft max-sm:hidden">{sheetWords(steps, marks)}</p>
                <p className="flex items-center gap-2 text-sm text-ink-soft">
                  <CastleNut state={skill} size={30} />
                  <span aria-hidden="true">{progressWords(skill)}</span>
                </p>
              </header>
              {snapshot.summary === "" ? null : <p className="px-4 pb-3 sm:px-6">{snapshot.summary}</p>}
              {steps.length === 0 ? (
                <div className="p-4">
                  <EmptyState title="This revision has no chapters." />
                </div>
              ) : (
                <StepSheet steps={steps} marks={timed} clips={clips} view={viewer} startMs={startMs} />
              )}
            </Sheet>
            <p className="text-sm text-ink-soft">
              Before tightening, compare with the vehicle maker's current information for this chassis number.
              If they differ, the maker's is right: press “This looks wrong” at the value.
            </p>
          </div>
          <div className="min-w-0 gap-3 max-lg:contents lg:sticky lg:top-4 lg:grid" id="recording">
            <LessonPlayer
              lesson={{ lessonId, revisionId, clips, captionTracks }}
              steps={steps}
              marks={timed}
              view={viewer}
              poster={first === undefined ? null : `/recordings/${first}/poster`}
              continueMs={continueMs}
              durationMs={durationMs}
              length={length}
            />
            {said.length === 0 ? (
              <p className="text-sm text-ink-soft">No captions in this revision.</p>
            ) : (
              <section className="no-print min-w-0">
                <h2 className="mb-1 px-2 text-xl">What is said</h2>
                <SaidList lines={said} />
              </section>
            )}
          </div>
        </div>
        <p className="no-print mt-6">
          <Link to={href("/")} className="inline-flex min-h-11 items-center">
            All lessons
          </Link>
        </p>
      </Page>
    </PlayerProvider>
  );
}
