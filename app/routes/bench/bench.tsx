import { href, Link } from "react-router";
import { requirePermission } from "~/auth/require.server";
import { ButtonLink } from "~/components/ui/button";
import { EmptyState, Page, Sheet } from "~/components/ui/page";
import { scopeContext } from "~/context";
import { stateWords } from "~/lessons/bench-state";
import { listBench, listReadyRecordings } from "~/lessons/list-bench.server";
import { listDoubts } from "~/publishing/doubts.server";
import type { Route } from "./+types/bench";

export function meta() {
  return [{ title: "Bench · Castlenut" }];
}

export function loader({ context }: Route.LoaderArgs) {
  const scope = context.get(scopeContext);
  requirePermission(scope, "lesson:edit");
  return {
    lessons: listBench(scope),
    ready: listReadyRecordings(scope).length,
    doubts: listDoubts(scope).open.length,
  };
}

function count(n: number, one: string, many: string): string {
  return `${n} ${n === 1 ? one : many}`;
}

function todo(lesson: Route.ComponentProps["loaderData"]["lessons"][number]): string {
  const parts = [
    lesson.inPencil > 0 ? count(lesson.inPencil, "mark in pencil", "marks in pencil") : "",
    lesson.withoutSource > 0
      ? count(lesson.withoutSource, "value without source", "values without source")
      : "",
    lesson.unchecked > 0 ? count(lesson.unchecked, "value unchecked", "values unchecked") : "",
  ].filter((part) => part !== "");
  return parts.length > 0 ? parts.join(" · ") : "Nothing open";
}

export default function Bench({ loaderData: { lessons, ready, doubts } }: Route.ComponentProps) {
  const upload = <ButtonLink to={href("/bench/recordings/upload")}>Upload a recording</ButtonLink>;
  const create = (
    <ButtonLink look="ghost" to={href("/bench/lessons/new")}>
      New lesson
    </ButtonLink>
  );
  return (
    <Page
      title="Bench"
      under={
        <nav aria-label="On the bench" className="flex flex-wrap gap-x-6">
          <Link to={href("/bench/recordings")} className="inline-flex min-h-11 items-center">
            Recordings
          </Link>
          <Link to={href("/bench/doubts")} className="inline-flex min-h-11 items-center">
            {doubts > 0 ? `What looks wrong: ${doubts} open` : "What looks wrong"}
          </Link>
        </nav>
      }
      actions={
        lessons.length > 0 ? (
          <>
            {upload}
            {create}
          </>
        ) : null
      }
    >
      {lessons.length === 0 ? (
        <EmptyState title="No lesson yet">
          {ready > 0 ? (
            <>
              <p>
                {ready === 1 ? "A recording is ready." : `${ready} recordings are ready.`} Make a lesson of
                it: chapters, values, sources.
              </p>
              <ButtonLink to={href("/bench/lessons/new")}>Make the first lesson</ButtonLink>
            </>
          ) : (
            <>
              <p>Film a job, upload the recording, then make a lesson of it: chapters, values, sources.</p>
              <ButtonLink to={href("/bench/recordings/upload")}>Upload the first recording</ButtonLink>
            </>
          )}
        </EmptyState>
      ) : (
        <Sheet>
          <ul className="divide-y divide-line">
            {lessons.map((lesson) => (
              <li
                key={lesson.id}
                className="grid gap-1 px-4 py-3 lg:grid-cols-[minmax(0,5fr)_minmax(0,3fr)_minmax(0,4fr)] lg:items-baseline lg:gap-6"
              >
                <div className="min-w-0">
                  <Link
                    to={href("/bench/lessons/:lessonId", { lessonId: lesson.id })}
                    className="inline-flex min-h-11 items-center font-figure text-2xl leading-tight font-semibold wrap-anywhere"
                  >
                    {lesson.title}
                  </Link>
                  <p className="text-sm text-ink-soft">
                    {lesson.vehicles.length > 0 ? lesson.vehicles.join("; ") : "Any vehicle"}
                  </p>
                </div>
                <p className="font-semibold">{stateWords(lesson.state)}</p>
                <p className="text-sm text-ink-soft">{todo(lesson)}</p>
              </li>
            ))}
          </ul>
        </Sheet>
      )}
    </Page>
  );
}
