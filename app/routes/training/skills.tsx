import { Form, href, Link } from "react-router";
import { requirePermission } from "~/auth/require.server";
import { CastleNut, nutWords } from "~/components/plates/castle-nut";
import { Button, ButtonLink } from "~/components/ui/button";
import { Select } from "~/components/ui/field";
import { EmptyState, Page, Remark, Sheet } from "~/components/ui/page";
import { scopeContext } from "~/context";
import { SYSTEM_WORDS } from "~/lessons/mark-words";
import { skillsTable } from "~/training/skills-table.server";
import type { Route } from "./+types/skills";

export function meta() {
  return [{ title: "Who has shown what · Castlenut" }];
}

export function loader({ context, url }: Route.LoaderArgs) {
  const scope = context.get(scopeContext);
  requirePermission(scope, "training:see-all");
  const read = (name: string) => (url.searchParams.get(name) ?? "").slice(0, 40);
  const filter = { system: read("system"), person: read("person"), lesson: read("of") };
  const assigned = Number(url.searchParams.get("assigned") ?? 0) || 0;
  const moved = Number(url.searchParams.get("moved") ?? 0) || 0;
  return { filter, assigned, moved, ...skillsTable(scope, filter, Date.now()) };
}

type Data = Route.ComponentProps["loaderData"];
type Cell = Data["rows"][number]["cells"][number];

/** What stands under the glyph, in words. */
function remarks(cell: Cell): string[] {
  return [
    cell.overdue && "overdue",
    cell.waiting && "asks for a sign-off",
    cell.shownOnce && "shown once",
  ].filter((word) => word !== false);
}

function Count({ figure, words }: { figure: React.ReactNode; words: string }) {
  return (
    <div>
      <dd className="font-figure text-3xl font-semibold">{figure}</dd>
      <dt className="text-sm text-ink-soft">{words}</dt>
    </div>
  );
}

function Grid({ columns, rows }: Pick<Data, "columns" | "rows">) {
  return (
    <div
      role="region"
      aria-label="People and lessons"
      tabIndex={0}
      className="hidden overflow-x-auto border border-line bg-sheet md:block"
    >
      <table className="w-full border-collapse">
        <thead>
          <tr>
            <th
              scope="col"
              className="sticky left-0 min-w-44 border-r border-b border-line bg-sheet px-4 py-3 text-left align-bottom text-sm"
            >
              Name
            </th>
            {columns.map((lesson) => (
              <th
                key={lesson.id}
                scope="col"
                className="min-w-28 border-r border-b border-line px-3 py-3 text-left align-bottom text-sm font-semibold"
              >
                <span className="block text-xs font-normal text-ink-soft">{SYSTEM_WORDS[lesson.system]}</span>
                {lesson.title}
              </th>
            ))}
          </tr>
        </thead>
        <tbody>
          {rows.map((person) => (
            <tr key={person.id}>
              <th
                scope="row"
                className="sticky left-0 border-r border-b border-line bg-sheet px-4 py-2 text-left"
              >
                {person.name}
                <span className="block text-sm font-normal text-ink-soft">{person.role}</span>
              </th>
              {person.cells.map((cell) => (
                <td key={cell.lessonId} className="border-r border-b border-line text-center">
                  <Link
                    to={href("/skills/:userId/:lessonId", { userId: person.id, lessonId: cell.lessonId })}
                    className="flex min-h-14 flex-col items-center justify-center gap-1 px-2 py-2 text-xs text-ink no-underline hover:bg-enamel-tint"
                  >
                    <CastleNut state={cell.state} />
                    {remarks(cell).map((word) => (
                      <span key={word} className={word === "overdue" ? "font-semibold" : ""}>
                        {word}
                      </span>
                    ))}
                  </Link>
                </td>
              ))}
            </tr>
          ))}
        </tbody>
      </table>
    </div>
  );
}

function PhoneList({ columns, rows }: Pick<Data, "columns" | "rows">) {
  return (
    <div className="grid gap-3 md:hidden">
      {rows.map((person) => (
        <details key={person.id} className="rounded-md border border-line bg-sheet">
          <summary className="flex min-h-14 flex-wrap items-center gap-x-3 px-4 py-2 font-semibold">
            {person.name}
            <span className="text-sm font-normal text-ink-soft">
              {person.cells.filter(({ state }) => state.shown).length} of {columns.length} shown
              {person.cells.some(({ overdue }) => overdue) ? ", overdue" : ""}
            </span>
          </summary>
          <ul>
            {person.cells.map((cell, n) => (
              <li key={cell.lessonId} className="border-t border-line">
                <Link
                  to={href("/skills/:userId/:lessonId", { userId: person.id, lessonId: cell.lessonId })}
                  className="flex min-h-14 items-center gap-3 px-4 py-2 text-ink no-underline"
                >
                  <CastleNut state={cell.state} />
                  <span className="min-w-0">
                    {columns[n]?.title}
                    <span className="block text-sm text-ink-soft">
                      {[nutWords(cell.state), ...remarks(cell)].join(", ")}
                    </span>
                  </span>
                </Link>
              </li>
            ))}
          </ul>
        </details>
      ))}
    </div>
  );
}

export default function Skills({ loaderData }: Route.ComponentProps) {
  const { filter, assigned, moved, people, lessons, columns, rows, counts } = loaderData;
  const all = { value: "", label: "All" };
  const systems = [...new Set(lessons.map(({ system }) => system))];
  return (
    <Page
      title="Who has shown what"
      actions={
        <>
          <ButtonLink to={href("/training/sign-offs")} look="ghost">
            Sign-offs asked for
          </ButtonLink>
          <ButtonLink to={href("/training/assign")}>Assign training</ButtonLink>
        </>
      }
    >
      {assigned + moved > 0 ? (
        <div role="status" className="mb-5">
          <Remark>
            {[
              assigned > 0 && `Assigned to ${assigned} ${assigned === 1 ? "person" : "people"}`,
              moved > 0 && `new due date for ${moved}`,
            ]
              .filter(Boolean)
              .join(", ")}
            . The mail is on its way.
          </Remark>
        </div>
      ) : null}
      {lessons.length === 0 ? (
        <EmptyState title="No lesson is published yet">
          <p>Once one is, this page shows who has seen it, answered its quiz and shown it on a car.</p>
          <ButtonLink to="/bench">Go to the bench</ButtonLink>
        </EmptyState>
      ) : (
        <>
          <dl className="mb-5 flex flex-wrap gap-x-10 gap-y-3">
            <Count figure={`${counts.shown} of ${counts.of}`} words="shown on a car" />
            <Count figure={counts.waiting} words="waiting for a sign-off" />
            <Count figure={counts.overdue} words="overdue" />
            <Count figure={counts.changed} words="changed since" />
          </dl>
          <Form className="mb-5 flex flex-wrap items-end gap-3" role="search" aria-label="Narrow the table">
            <Select
              label="System"
              name="system"
              defaultValue={filter.system}
              options={[all, ...systems.map((value) => ({ value, label: SYSTEM_WORDS[value] }))]}
              className="min-w-36"
            />
            <Select
              label="Person"
              name="person"
              defaultValue={filter.person}
              options={[all, ...people.map(({ id, name }) => ({ value: id, label: name }))]}
              className="min-w-36"
            />
            <Select
              label="Lesson"
              name="of"
              defaultValue={filter.lesson}
              options={[all, ...lessons.map(({ id, title }) => ({ value: id, label: title }))]}
              className="max-w-72 min-w-36"
            />
            <Button look="ghost">Show</Button>
          </Form>
          {rows.length === 0 || columns.length === 0 ? (
            <Sheet className="p-5">Nobody and nothing fits these choices.</Sheet>
          ) : (
            <>
              <Grid columns={columns} rows={rows} />
              <PhoneList columns={columns} rows={rows} />
            </>
          )}
          <p className="mt-4 text-sm text-ink-soft">
            Each slot fills in turn: seen the lesson, answered the quiz, shown it on a car. A dashed ring
            means that the lesson changed since. These are the shop's own records.
          </p>
        </>
      )}
    </Page>
  );
}
