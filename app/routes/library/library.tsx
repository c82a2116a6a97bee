import { Form, href, Link } from "react-router";
import { can } from "~/auth/permissions";
import { requirePermission } from "~/auth/require.server";
import { CastleNut } from "~/components/plates/castle-nut";
import { Button, ButtonLink } from "~/components/ui/button";
import { Select } from "~/components/ui/field";
import { EmptyState, Page } from "~/components/ui/page";
import { scopeContext, viewerContext } from "~/context";
import { filterLibrary, libraryChoices } from "~/lessons/filter-library";
import { listReadyRecordings } from "~/lessons/list-bench.server";
import { listLibrary } from "~/lessons/list-library.server";
import { SYSTEM_WORDS } from "~/lessons/mark-words";
import { lengthWords } from "~/lessons/steps";
import { vehiclesWords } from "~/lessons/vehicle-words";
import { loadSkills } from "~/training/load-skills.server";
import { progressWords } from "~/training/progress-words";
import { NO_SKILL } from "~/training/skill-state";
import type { Route } from "./+types/library";

export function meta() {
  return [{ title: "Library · Castlenut" }];
}

export function loader({ context, url }: Route.LoaderArgs) {
  const scope = context.get(scopeContext);
  requirePermission(scope, "lesson:watch");
  const all = listLibrary(scope);
  const wanted = {
    system: url.searchParams.get("system") ?? "",
    vehicle: url.searchParams.get("vehicle") ?? "",
    q: (url.searchParams.get("q") ?? "").slice(0, 200),
  };
  const shown = filterLibrary(all, wanted);
  const skills = loadSkills(scope, {
    userIds: [scope.userId],
    lessonIds: shown.map(({ lessonId }) => lessonId),
  });
  return {
    wanted,
    total: all.length,
    ready: all.length === 0 && can(scope.role, "lesson:edit") && listReadyRecordings(scope).length > 0,
    choices: libraryChoices(all),
    shown: shown.map((lesson) => ({
      ...lesson,
      skill: skills.get(`${scope.userId}:${lesson.lessonId}`) ?? NO_SKILL,
    })),
    viewer: context.get(viewerContext),
  };
}

type Data = Route.ComponentProps["loaderData"];

/** What the people of an empty shop do first; `ready`: a recording waits to become a lesson. */
function FirstSteps({ viewer, ready }: Pick<Data, "viewer" | "ready">) {
  if (!can(viewer.role, "recording:upload"))
    return (
      <EmptyState title="Nothing is published yet.">
        <p>Lessons stand here as soon as an instructor of {viewer.shopName} publishes one.</p>
        <ButtonLink to="/training" look="ghost">
          My training
        </ButtonLink>
      </EmptyState>
    );
  const owner = can(viewer.role, "team:edit");
  return (
    <EmptyState title={`The library of ${viewer.shopName} is empty.`}>
      <ol className="grid list-inside list-decimal gap-1 text-left">
        {owner ? <li>Invite an instructor, so that a second person can check values.</li> : null}
        <li>Upload a recording of a job.</li>
        <li>
          Chapter it on the <Link to={href("/bench")}>bench</Link>, write down its values with their sources,
          publish it.
        </li>
      </ol>
      <div className="flex flex-wrap justify-center gap-3">
        {owner ? (
          <ButtonLink to="/team" look="ghost">
            Invite an instructor
          </ButtonLink>
        ) : null}
        {ready ? (
          <ButtonLink to={href("/bench")}>Go on at the bench</ButtonLink>
        ) : (
          <ButtonLink to={href("/bench/recordings/upload")}>Upload a recording</ButtonLink>
        )}
      </div>
    </EmptyState>
  );
}

function LessonCard({ lesson }: { lesson: Data["shown"][number] }) {
  return (
    <li>
      <Link
        to={href("/lessons/:lessonId", { lessonId: lesson.lessonId })}
        className="grid h-full grid-cols-[7rem_1fr] content-start overflow-hidden rounded-md border border-line bg-sheet text-ink no-underline hover:border-ink sm:grid-cols-1"
      >
        <div className="bg-graphite sm:aspect-video">
          {lesson.posterOf === null ? null : (
            <img
              src={`/recordings/${lesson.posterOf}/poster`}
              alt=""
              loading="lazy"
              className="h-full w-full object-cover"
            />
          )}
        </div>
        <div className="flex items-start gap-3 p-3">
          <div className="grid min-w-0 flex-1 gap-0.5">
            <h3 className="text-xl">{lesson.title}</h3>
            <p className="text-sm text-ink-soft">{vehiclesWords(lesson.vehicles)}</p>
            <p className="text-sm text-ink-soft">
              {lengthWords(lesson.durationMs)}, revision {lesson.n}
            </p>
            <p className="text-sm">
              <span className="sr-only">You: </span>
              {progressWords(lesson.skill)}
            </p>
          </div>
          <span aria-hidden="true" className="shrink-0">
            <CastleNut state={lesson.skill} size={40} />
          </span>
        </div>
      </Link>
    </li>
  );
}

function Filters({ wanted, choices }: Pick<Data, "wanted" | "choices">) {
  const active = wanted.system !== "" || wanted.vehicle !== "" || wanted.q !== "";
  return (
    <Form className="mb-6 grid grid-cols-2 items-end gap-3 sm:grid-cols-[1fr_1fr_1fr_auto]">
      <Select
        label="System"
        name="system"
        key={`system ${wanted.system}`}
        defaultValue={wanted.system}
        options={[
          { value: "", label: "All systems" },
          ...choices.systems.map((system) => ({ value: system, label: SYSTEM_WORDS[system] })),
        ]}
      />
      <Select
        label="Vehicle"
        name="vehicle"
        key={`vehicle ${wanted.vehicle}`}
        defaultValue={wanted.vehicle}
        options={[{ value: "", label: "All vehicles" }, ...choices.vehicles]}
      />
      <div className="grid gap-1">
        <label htmlFor="title" className="text-sm font-semibold text-ink-soft">
          Title
        </label>
        <input
          id="title"
          name="q"
          key={`title ${wanted.q}`}
          defaultValue={wanted.q}
          maxLength={200}
          className="min-h-11 w-full rounded border border-line-strong bg-sheet px-3 py-2 text-ink"
        />
      </div>
      <div className="flex gap-3">
        <Button look="ghost">Show</Button>
        {active ? (
          <Link to={href("/")} className="inline-flex min-h-11 items-center">
            Show all
          </Link>
        ) : null}
      </div>
    </Form>
  );
}

/** A system takes as many columns as it has lessons, so that small ones share a row. */
const WIDTHS = [
  { span: "", columns: "" },
  { span: "sm:col-span-2", columns: "sm:grid-cols-2" },
  { span: "sm:col-span-2 lg:col-span-3", columns: "sm:grid-cols-2 lg:grid-cols-3" },
  {
    span: "sm:col-span-2 lg:col-span-3 xl:col-span-4",
    columns: "sm:grid-cols-2 lg:grid-cols-3 xl:grid-cols-4",
  },
] as const;

export default function Library({
  loaderData: { wanted, total, ready, choices, shown, viewer },
}: Route.ComponentProps) {
  const systems = choices.systems.filter((system) => shown.some((lesson) => lesson.system === system));
  return (
    <Page
      title="Library"
      under={
        total === 0
          ? undefined
          : `${shown.length === total ? total : `${shown.length} of ${total}`} ${total === 1 ? "lesson" : "lessons"} of ${viewer.shopName}`
      }
    >
      {total === 0 ? (
        <FirstSteps viewer={viewer} ready={ready} />
      ) : (
        <>
          <Filters wanted={wanted} choices={choices} />
          {shown.length === 0 ? (
            <EmptyState title="No lesson fits this choice.">
              <Link to={href("/")} className="inline-flex min-h-11 items-center">
                Show all lessons
              </Link>
            </EmptyState>
          ) : null}
          <div className="mb-8 grid gap-x-4 gap-y-8 sm:grid-cols-2 lg:grid-cols-3 xl:grid-cols-4">
            {systems.map((system) => {
              const own = shown.filter((lesson) => lesson.system === system);
              const { span, columns } = WIDTHS[Math.min(own.length, WIDTHS.length) - 1] ?? WIDTHS[0];
              return (
                <section key={system} className={span}>
                  <h2 className="mb-3 text-2xl">
                    <Link to={`/?system=${system}`} className="text-ink no-underline hover:underline">
                      {SYSTEM_WORDS[system]}
                    </Link>
                  </h2>
                  <ul className={`grid gap-4 ${columns}`}>
                    {own.map((lesson) => (
                      <LessonCard key={lesson.lessonId} lesson={lesson} />
                    ))}
                  </ul>
                </section>
              );
            })}
          </div>
          {shown.length === 0 ? null : (
            <p className="text-sm text-ink-soft">
              Each slot fills in turn: seen the lesson, answered the quiz, shown it on a car. A dashed ring
              means that the lesson changed since.
            </p>
          )}
        </>
      )}
    </Page>
  );
}
