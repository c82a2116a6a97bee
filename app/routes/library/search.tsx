import { Form, href, Link } from "react-router";
import { requirePermission } from "~/auth/require.server";
import { Plate, VariantPlates } from "~/components/plates/plate";
import type { PlateView } from "~/components/plates/plate-words";
import { Button, ButtonLink } from "~/components/ui/button";
import { Select } from "~/components/ui/field";
import { EmptyState, Page, Sheet } from "~/components/ui/page";
import { scopeContext, viewerContext } from "~/context";
import { formatTimecode, momentParam } from "~/lessons/timecode";
import { vehiclesWords, vehicleWords } from "~/lessons/vehicle-words";
import { listVehicles } from "~/lessons/vehicles.server";
import { answersWithVariants } from "~/search/answers-with-variants";
import { searchShop, type FoundValue } from "~/search/search-shop.server";
import type { Route } from "./+types/search";

export function meta({ loaderData }: Route.MetaArgs) {
  return [{ title: `${loaderData?.q ? `${loaderData.q} · ` : ""}Search · Castlenut` }];
}

export function loader({ context, url }: Route.LoaderArgs) {
  const scope = context.get(scopeContext);
  requirePermission(scope, "lesson:watch");
  const q = (url.searchParams.get("q") ?? "").slice(0, 300);
  const vehicles = listVehicles(scope).map((vehicle) => ({
    id: vehicle.id as string,
    words: vehicleWords(vehicle),
  }));
  const wanted = url.searchParams.get("vehicle") ?? "";
  const vehicle = vehicles.some(({ id }) => id === wanted) ? wanted : "";
  const { timeZone, units } = context.get(viewerContext);
  const found = q.trim() === "" ? null : searchShop(scope, q, vehicle, 12);
  return {
    q,
    vehicle,
    vehicles,
    view: { timeZone, units } satisfies PlateView,
    answers: found ? answersWithVariants(found.answers) : [],
    elsewhere: found?.elsewhere ?? [],
    moments: found?.moments ?? [],
    lessons: found?.lessons ?? [],
  };
}

const playHref = (lessonId: string, atMs: number) =>
  `${href("/lessons/:lessonId", { lessonId })}?t=${momentParam(atMs)}`;

function PlayFrom({ lessonId, atMs }: { lessonId: string; atMs: number }) {
  return (
    <ButtonLink to={playHref(lessonId, atMs)} className="w-full sm:w-auto">
      Play from {formatTimecode(atMs)}
    </ButtonLink>
  );
}

/** Whom a value is for, and where it was said. */
function Whom({ value }: { value: FoundValue }) {
  return (
    <p className="text-sm text-ink-soft">
      {vehiclesWords(value.vehicles)} ·{" "}
      <Link to={href("/lessons/:lessonId", { lessonId: value.lessonId })}>{value.lessonTitle}</Link>
      {value.chapterTitle ? `, ${value.chapterTitle}` : ""}
    </p>
  );
}

/** A value for another vehicle waits behind a tap and then says so. */
function NotYours({ value, view }: { value: FoundValue; view: PlateView }) {
  return (
    <details className="rounded-md border border-line bg-sheet">
      <summary className="flex min-h-14 cursor-pointer flex-wrap items-center gap-x-3 px-4 py-2">
        <span className="font-semibold">{value.found.mark.component || value.lessonTitle}</span>
        <span className="text-sm text-ink-soft">{vehiclesWords(value.vehicles)}</span>
      </summary>
      <div className="grid gap-3 p-4">
        <p className="border-2 border-ink bg-ink px-4 py-2 font-figure text-xl font-semibold text-paper">
          NOT YOUR VEHICLE
        </p>
        <Whom value={value} />
        <Plate of={value.found} view={view} />
        <PlayFrom lessonId={value.lessonId} atMs={value.atMs} />
      </div>
    </details>
  );
}

export default function Search({ loaderData }: Route.ComponentProps) {
  const { q, vehicle, vehicles, view, answers, elsewhere, moments, lessons } = loaderData;
  const asked = q.trim() !== "";
  const nothing = answers.length + moments.length + lessons.length === 0;
  return (
    <Page title={asked ? `“${q}”` : "Search"} narrow>
      <Form className="mb-6 flex flex-wrap items-end gap-3" role="search" aria-label="Vehicle">
        <input type="hidden" name="q" value={q} />
        <Select
          key={vehicle}
          label="Vehicle"
          name="vehicle"
          defaultValue={vehicle}
          options={[
            { value: "", label: "Any vehicle" },
            ...vehicles.map(({ id, words }) => ({ value: id, label: words })),
          ]}
          className="min-w-0 flex-1 basis-60"
        />
        <Button look="ghost">Show for this vehicle</Button>
      </Form>
      {!asked ? (
        <EmptyState title="Type what you need at the car">
          <p>A part and what you want to know: “sway bar link torque”, “drain plug socket”, “88 Nm”.</p>
        </EmptyState>
      ) : null}
      {asked && nothing ? (
        <EmptyState title="Nothing in your shop's library answers this">
          <p>
            {elsewhere.length > 0
              ? "There are values for other vehicles below. They are not for yours."
              : "Try the part's other name, or fewer words. Where no lesson has it, look it up in the maker's service information."}
          </p>
          <ButtonLink to={href("/")} look="ghost">
            Look through the library
          </ButtonLink>
        </EmptyState>
      ) : null}

      {answers.length > 0 ? (
        <section aria-label="Values" className="grid gap-5">
          {answers.map((answer) => (
            <div key={answer.first.found.mark.id} className="grid gap-2">
              {answer.form === "one" ? (
                <Plate of={answer.first.found} view={view} size="large" />
              ) : (
                <VariantPlates
                  variants={{ question: answer.question, marks: answer.all.map(({ found }) => found) }}
                  view={view}
                />
              )}
              <Whom value={answer.first} />
              <PlayFrom lessonId={answer.first.lessonId} atMs={answer.first.atMs} />
            </div>
          ))}
          <p className="text-sm text-ink-soft">
            Before tightening, compare with the maker's current information for this chassis number. If they
            differ, the maker's is right.
          </p>
        </section>
      ) : null}

      {moments.length > 0 ? (
        <section aria-labelledby="moments" className="mt-8">
          <h2 id="moments" className="mb-2 text-2xl">
            Said in the recordings
          </h2>
          <Sheet>
            <ul>
              {moments.map((moment) => (
                <li
                  key={`${moment.lessonId}-${moment.atMs}`}
                  className="border-b border-line last:border-b-0"
                >
                  <Link
                    to={playHref(moment.lessonId, moment.atMs)}
                    className="grid min-h-14 gap-1 px-4 py-3 text-ink no-underline hover:bg-enamel-tint"
                  >
                    <span>
                      <span className="mr-3 font-semibold text-enamel-text underline underline-offset-4">
                        Play from {formatTimecode(moment.atMs)}
                      </span>
                      {moment.words}
                    </span>
                    {moment.correction === "" ? null : (
                      <span className="font-semibold">Corrected: {moment.correction}</span>
                    )}
                    <span className="text-sm text-ink-soft">
                      {moment.lessonTitle}
                      {moment.chapterTitle ? `, ${moment.chapterTitle}` : ""}
                    </span>
                  </Link>
                </li>
              ))}
            </ul>
          </Sheet>
        </section>
      ) : null}

      {lessons.length > 0 ? (
        <section aria-labelledby="lessons" className="mt-8">
          <h2 id="lessons" className="mb-2 text-2xl">
            Lessons
          </h2>
          <Sheet>
            <ul>
              {lessons.map((lesson) => (
                <li key={lesson.lessonId} className="border-b border-line last:border-b-0">
                  <Link
                    to={href("/lessons/:lessonId", { lessonId: lesson.lessonId })}
                    className="flex min-h-14 flex-wrap items-center gap-x-3 px-4 py-2"
                  >
                    <span className="font-semibold">{lesson.lessonTitle}</span>
                    <span className="text-sm text-ink-soft">{vehiclesWords(lesson.vehicles)}</span>
                  </Link>
                </li>
              ))}
            </ul>
          </Sheet>
        </section>
      ) : null}

      {elsewhere.length > 0 ? (
        <section aria-labelledby="elsewhere" className="mt-8 grid gap-3">
          <h2 id="elsewhere" className="text-2xl">
            For other vehicles
          </h2>
          {elsewhere.map((value) => (
            <NotYours key={value.found.mark.id} value={value} view={view} />
          ))}
        </section>
      ) : null}
    </Page>
  );
}
