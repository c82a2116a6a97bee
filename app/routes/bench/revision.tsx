import { href } from "react-router";
import { notFound, readId, requirePermission } from "~/auth/require.server";
import { ComparisonList } from "~/components/bench/comparison-list";
import { ButtonLink } from "~/components/ui/button";
import { Page } from "~/components/ui/page";
import { scopeContext, viewerContext } from "~/context";
import { loadRevision } from "~/publishing/load-revision.server";
import { formatLocalDate, localDateAt } from "~/training/local-date";
import type { Route } from "./+types/revision";

export function meta({ loaderData }: Route.MetaArgs) {
  return [{ title: `Revision ${loaderData?.n ?? ""}: ${loaderData?.title ?? ""} · Castlenut` }];
}

export function loader({ context, params }: Route.LoaderArgs) {
  const scope = context.get(scopeContext);
  requirePermission(scope, "lesson:edit");
  const n = /^[1-9]\d{0,5}$/.test(params.n) ? Number(params.n) : notFound("lesson");
  const revision = loadRevision(scope, readId<"lesson">(params.lessonId, "lesson"), n);
  if (!revision) notFound("lesson");
  const { publishedAt, ...story } = revision;
  return { ...story, day: formatLocalDate(localDateAt(publishedAt, context.get(viewerContext).timeZone)) };
}

export default function Revision({ loaderData }: Route.ComponentProps) {
  const { lessonId, n, newest, title, note, publishedBy, day, comparison } = loaderData;
  return (
    <Page title={newest ? `Revision ${n} is out` : `Revision ${n}`} under={title} narrow>
      <div className="grid gap-7">
        <div>
          <p>
            Published {day} by {publishedBy}.{" "}
            {newest ? "Search, quiz and step sheet follow it from now on." : "Learners see a newer one."}
          </p>
          {note === "" ? null : <p className="mt-2 whitespace-pre-line">“{note}”</p>}
        </div>
        {newest ? (
          <div className="flex flex-wrap gap-3">
            <ButtonLink to={`/lessons/${lessonId}`}>Watch the lesson</ButtonLink>
            <ButtonLink look="ghost" to={`/lessons/${lessonId}/quiz`}>
              Try the quiz
            </ButtonLink>
            <ButtonLink look="ghost" to={`/training/assign?lesson=${lessonId}`}>
              Assign it
            </ButtonLink>
            <ButtonLink look="quiet" to={href("/bench/lessons/:lessonId/check", { lessonId })}>
              Check values
            </ButtonLink>
            <ButtonLink look="quiet" to={href("/bench/lessons/:lessonId", { lessonId })}>
              Back to the bench
            </ButtonLink>
          </div>
        ) : null}
        <section className="grid gap-2">
          <h2 className="text-2xl">
            {comparison ? `What changed since revision ${n - 1}` : "The first revision"}
          </h2>
          {comparison ? (
            <ComparisonList comparison={comparison} />
          ) : (
            <p>There is none before it to compare with.</p>
          )}
        </section>
      </div>
    </Page>
  );
}
