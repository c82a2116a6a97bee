import { data, Form, href, Link, redirect, useNavigation } from "react-router";
import { z } from "zod";
import { notFound, readId, requirePermission } from "~/auth/require.server";
import { ComparisonList } from "~/components/bench/comparison-list";
import { Button, ButtonLink } from "~/components/ui/button";
import { FormProblem, TextArea } from "~/components/ui/field";
import { Page, Sheet } from "~/components/ui/page";
import { scopeContext } from "~/context";
import { parseForm, refuse } from "~/forms/parse-form";
import { isSame } from "~/lessons/compare-snapshots";
import type { GateLine } from "~/publishing/gate";
import { beforePublishing } from "~/publishing/load-gate.server";
import { publishLesson } from "~/publishing/publish-lesson.server";
import { placeHref, placeWords } from "./place-href";
import type { Route } from "./+types/publish";

const Publish = z.object({
  version: z.coerce.number().int(),
  note: z.string().trim().max(500, "Keep the note under 500 characters.").default(""),
});

export function meta({ loaderData }: Route.MetaArgs) {
  return [{ title: `Publish: ${loaderData?.title ?? ""} · Castlenut` }];
}

export function loader({ context, params }: Route.LoaderArgs) {
  const scope = context.get(scopeContext);
  requirePermission(scope, "lesson:publish");
  const before = beforePublishing(scope, readId<"lesson">(params.lessonId, "lesson"));
  if (!before) notFound("lesson");
  const { draft, lines, former } = before;
  return {
    lessonId: draft.lesson.id,
    title: draft.lesson.title,
    version: draft.lesson.version,
    next: (draft.lesson.newestRevision ?? 0) + 1,
    withdrawn: draft.lesson.withdrawnAt !== null,
    lines,
    former: former && { n: former.n, comparison: former.comparison },
  };
}

// After a refusal too: the page shows what would be published now.
export function shouldRevalidate() {
  return true;
}

export async function action({ request, context, params }: Route.ActionArgs) {
  const scope = context.get(scopeContext);
  requirePermission(scope, "lesson:publish");
  const lessonId = readId<"lesson">(params.lessonId, "lesson");
  const form = await request.formData();
  const parsed = parseForm(Publish, form);
  if (!parsed.ok) return data(parsed, { status: 400 });
  const published = publishLesson(scope, lessonId, parsed.value, Date.now());
  if (published.ok)
    return redirect(href("/bench/lessons/:lessonId/revisions/:n", { lessonId, n: String(published.n) }));
  switch (published.reason) {
    case "missing":
      return notFound("lesson");
    case "stale":
      return data(refuse(form, { "": published.sentence }), { status: 409 });
    case "stopped":
      return data(
        refuse(form, {
          "": "Something stops this lesson. Put right what the list names, then publish again.",
        }),
        { status: 409 },
      );
    default:
      return published satisfies never;
  }
}

/** A barred circle stops, an open one reminds: shapes and words, no colour. */
function LineShape({ stops }: { stops: boolean }) {
  return (
    <svg viewBox="0 0 20 20" width={20} height={20} aria-hidden="true" className="mt-1 shrink-0">
      <circle cx={10} cy={10} r={8} className="fill-none stroke-ink" strokeWidth={2} />
      {stops ? (
        <rect x={4.5} y={8.25} width={11} height={3.5} className="fill-ink" />
      ) : (
        <circle cx={10} cy={10} r={2} className="fill-ink" />
      )}
    </svg>
  );
}

function Lines({ lines, lessonId, title }: { lines: readonly GateLine[]; lessonId: string; title: string }) {
  if (lines.length === 0) return null;
  return (
    <section className="grid gap-2">
      <h2 className="text-2xl">{title}</h2>
      <Sheet>
        <ul>
          {lines.map((line) => (
            <li
              key={`${line.where.id} ${line.sentence}`}
              className="flex flex-wrap items-start gap-x-4 gap-y-1 border-b border-line px-4 py-3 last:border-b-0"
            >
              <div className="flex min-w-0 flex-1 basis-72 gap-3">
                <LineShape stops={line.stops} />
                <p className="min-w-0">
                  <span className="sr-only">{line.stops ? "Stops: " : "Reminder: "}</span>
                  {line.sentence}
                </p>
              </div>
              <Link
                to={placeHref(lessonId, line.where)}
                className="inline-flex min-h-11 items-center font-semibold"
              >
                {placeWords(line.where)}
              </Link>
            </li>
          ))}
        </ul>
      </Sheet>
    </section>
  );
}

export default function PublishLesson({ loaderData, actionData }: Route.ComponentProps) {
  const { lessonId, title, version, next, withdrawn, lines, former } = loaderData;
  const stops = lines.filter((line) => line.stops);
  const warns = lines.filter((line) => !line.stops);
  const nothingNew = former !== null && isSame(former.comparison) && !withdrawn;
  const sending = useNavigation().state === "submitting";
  return (
    <Page
      title="Publish"
      under={title}
      narrow
      actions={
        <ButtonLink look="ghost" to={href("/bench/lessons/:lessonId", { lessonId })}>
          Back to the bench
        </ButtonLink>
      }
    >
      <div className="grid gap-7">
        <FormProblem refusal={actionData} />
        <Lines
          lines={stops}
          lessonId={lessonId}
          title={
            stops.length === 1 ? "One thing stops this lesson" : `${stops.length} things stop this lesson`
          }
        />
        <Lines lines={warns} lessonId={lessonId} title="Look at these, too" />
        <section className="grid gap-2">
          <h2 className="text-2xl">
            {former ? `What changes after revision ${former.n}` : "The first revision"}
          </h2>
          {former ? (
            <ComparisonList comparison={former.comparison} />
          ) : (
            <p>Nobody but you and the other instructors has seen this lesson yet.</p>
          )}
        </section>
        {stops.length > 0 ? (
          <p className="font-semibold">
            The lesson can be published when nothing stops it. Everything you did is kept.
          </p>
        ) : nothingNew ? (
          <p>
            Learners already see this lesson as it stands, in revision {former.n}.{" "}
            <Link to={href("/bench/lessons/:lessonId/revisions/:n", { lessonId, n: String(former.n) })}>
              Revision {former.n}
            </Link>
          </p>
        ) : (
          <Form method="post" className="grid gap-4">
            <input type="hidden" name="version" value={version} />
            <TextArea
              label="Note on this revision (optional)"
              name="note"
              rows={2}
              maxLength={500}
              hint="What changed and why, for whoever reads it later."
              refusal={actionData}
            />
            <p>
              <Button disabled={sending}>{sending ? "Publishing" : `Publish revision ${next}`}</Button>
            </p>
          </Form>
        )}
      </div>
    </Page>
  );
}
