import { href, redirect } from "react-router";
import { notFound, readId, requirePermission } from "~/auth/require.server";
import { MarkFormPage } from "~/components/bench/mark-form-page";
import { scopeContext, viewerContext } from "~/context";
import { findCitation, listDocuments } from "~/lessons/documents.server";
import { nearestLessonTime } from "~/lessons/lesson-time";
import { loadDraft } from "~/lessons/load-draft.server";
import { localDateOf } from "~/lessons/local-date";
import { editMarkFields } from "~/lessons/mark-defaults";
import { readMarkForm } from "~/lessons/mark-form";
import { KIND_WORDS, markTitle } from "~/lessons/mark-words";
import { safetyReason } from "~/lessons/safety-critical";
import { saveMark } from "~/lessons/save-mark.server";
import type { Scope } from "~/auth/scope.server";
import { refusedDraft, refusedForm } from "./answer-draft.server";
import type { Route } from "./+types/mark";

export function meta() {
  return [{ title: "Change a mark · Castlenut" }];
}

function find(scope: Scope, params: Route.LoaderArgs["params"]) {
  const draft = loadDraft(scope, readId<"lesson">(params.lessonId, "lesson")) ?? notFound("lesson");
  const markId = readId<"mark">(params.markId, "value");
  return { draft, mark: draft.marks.find((mark) => mark.id === markId) ?? notFound("value") };
}

export function loader({ params, context }: Route.LoaderArgs) {
  const scope = context.get(scopeContext);
  requirePermission(scope, "lesson:edit");
  const { draft, mark } = find(scope, params);
  const now = Date.now();
  const { timeZone, country } = context.get(viewerContext);
  const cited = mark.source ? findCitation(scope, mark.source.citationId) : undefined;
  return {
    draft,
    mark,
    country,
    fields: editMarkFields(draft, mark, cited, localDateOf(now, timeZone)),
    documents: listDocuments(scope),
    safetyReason: safetyReason(draft.lesson.system, mark.kind),
  };
}

export function shouldRevalidate() {
  return true;
}

export async function action({ params, request, context }: Route.ActionArgs) {
  const scope = context.get(scopeContext);
  requirePermission(scope, "lesson:edit");
  const { draft, mark } = find(scope, params);
  const form = await request.formData();
  const entry = readMarkForm(mark.kind, form, context.get(viewerContext).country);
  if (!entry.ok) return refusedForm(entry);
  const lessonId = draft.lesson.id;
  const saved = saveMark(scope, lessonId, { markId: mark.id, isNew: false }, entry.value, Date.now());
  if (!saved.ok) return refusedDraft(form, saved);
  return redirect(`${href("/bench/lessons/:lessonId", { lessonId })}#mark-${saved.markId}`);
}

export default function MarkPage({ loaderData, actionData }: Route.ComponentProps) {
  const { mark, ...rest } = loaderData;
  return (
    <MarkFormPage
      {...rest}
      key={mark.id}
      kind={mark.kind}
      title={`${KIND_WORDS[mark.kind]}: ${markTitle(mark)}`}
      startMs={nearestLessonTime(rest.draft.clips, mark.recordingId, mark.atMs)}
      refusal={actionData}
      newId={null}
      said={mark.said}
      pencilled={mark.state === "pencilled"}
    />
  );
}
