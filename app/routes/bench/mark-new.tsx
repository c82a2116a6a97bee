import { href, redirect } from "react-router";
import { ulid } from "ulid";
import { z } from "zod";
import { notFound, readId, requirePermission } from "~/auth/require.server";
import { MarkFormPage } from "~/components/bench/mark-form-page";
import { scopeContext, viewerContext } from "~/context";
import { parseForm } from "~/forms/parse-form";
import { listDocuments } from "~/lessons/documents.server";
import { formId } from "~/lessons/form-parts";
import { loadDraft } from "~/lessons/load-draft.server";
import { localDateOf } from "~/lessons/local-date";
import type { MarkKind } from "~/lessons/mark";
import { newMarkFields } from "~/lessons/mark-defaults";
import { readMarkForm } from "~/lessons/mark-form";
import { KIND_WORDS } from "~/lessons/mark-words";
import { safetyReason } from "~/lessons/safety-critical";
import { saveMark } from "~/lessons/save-mark.server";
import type { MarkId } from "#drizzle/schema/ids";
import { refusedDraft, refusedForm } from "./answer-draft.server";
import type { Route } from "./+types/mark-new";

const Kind = z.enum(Object.keys(KIND_WORDS) as [MarkKind, ...MarkKind[]]);
const NewMark = z.object({ kind: Kind, markId: formId });

export function meta() {
  return [{ title: "New mark · Castlenut" }];
}

export function loader({ params, request, context }: Route.LoaderArgs) {
  const scope = context.get(scopeContext);
  requirePermission(scope, "lesson:edit");
  const draft = loadDraft(scope, readId<"lesson">(params.lessonId, "lesson")) ?? notFound("lesson");
  const search = new URL(request.url).searchParams;
  const kind = Kind.safeParse(search.get("kind")).data ?? notFound("page");
  const seconds = Number(search.get("at"));
  const atMs = Number.isFinite(seconds) && seconds > 0 ? Math.round(seconds * 1000) : 0;
  const chapterId = search.get("chapter");
  if (chapterId !== null && !draft.chapters.some((chapter) => chapter.id === chapterId)) notFound("chapter");
  const now = Date.now();
  const { timeZone, country } = context.get(viewerContext);
  return {
    draft,
    kind,
    atMs,
    country,
    fields: newMarkFields(draft, { atMs, chapterId }, localDateOf(now, timeZone)),
    documents: listDocuments(scope),
    safetyReason: safetyReason(draft.lesson.system, kind),
    newId: ulid(),
  };
}

export function shouldRevalidate() {
  return true;
}

export async function action({ params, request, context }: Route.ActionArgs) {
  const scope = context.get(scopeContext);
  requirePermission(scope, "lesson:edit");
  const lessonId = readId<"lesson">(params.lessonId, "lesson");
  const form = await request.formData();
  const asked = parseForm(NewMark, form);
  if (!asked.ok) return refusedForm(asked);
  const entry = readMarkForm(asked.value.kind, form, context.get(viewerContext).country);
  if (!entry.ok) return refusedForm(entry);
  const target = { markId: asked.value.markId as MarkId, isNew: true };
  const saved = saveMark(scope, lessonId, target, entry.value, Date.now());
  if (!saved.ok) return refusedDraft(form, saved);
  return redirect(`${href("/bench/lessons/:lessonId", { lessonId })}#mark-${saved.markId}`);
}

export default function NewMarkPage({ loaderData, actionData }: Route.ComponentProps) {
  const { kind, atMs, ...rest } = loaderData;
  return (
    <MarkFormPage
      {...rest}
      kind={kind}
      title={`New ${KIND_WORDS[kind].toLowerCase()}`}
      startMs={atMs}
      refusal={actionData}
    />
  );
}
