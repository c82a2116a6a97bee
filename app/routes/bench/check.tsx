import { data, Form, href, redirect } from "react-router";
import { z } from "zod";
import { notFound, readId, requirePermission } from "~/auth/require.server";
import { ForCheck, type CheckRow } from "~/components/bench/for-check";
import { Button, ButtonLink } from "~/components/ui/button";
import { FormProblem } from "~/components/ui/field";
import { EmptyState, Page, Remark } from "~/components/ui/page";
import { scopeContext, viewerContext } from "~/context";
import { env } from "~/env.server";
import { parseForm, refuse } from "~/forms/parse-form";
import { nearestLessonTime } from "~/lessons/lesson-time";
import type { Mark } from "~/lessons/mark";
import { formatTimecode, momentParam } from "~/lessons/timecode";
import { checkMark, marksForCheck, sendForCheck } from "~/publishing/check-mark.server";
import { restsOnSource } from "~/publishing/gate";
import type { MarkId } from "#drizzle/schema/ids";
import type { Route } from "./+types/check";

const Request = z.discriminatedUnion("intent", [
  z.object({ intent: z.literal("send") }),
  z.object({
    intent: z.literal("check"),
    markId: z.string().transform((id) => id as MarkId),
    seal: z.string().max(64),
    outcome: z.enum(["confirmed", "disputed"]),
    reason: z.string().trim().max(500, "Keep it under 500 characters.").default(""),
  }),
]);

export function meta({ loaderData }: Route.MetaArgs) {
  return [{ title: `Check values: ${loaderData?.title ?? ""} · Castlenut` }];
}

/** What a checker says by pressing the button; shop practice is agreed, not checked. */
function confirmWords(mark: Mark): string {
  if (mark.source?.kind === "shop-practice") return "I agree: this is how we do it";
  if (mark.source !== null && (restsOnSource(mark) || mark.kind === "tool"))
    return "I read it in the source: it is right";
  return mark.kind === "tool" ? "I tried this size: it fits" : "I saw it measured: it is right";
}

export function loader({ context, params, url }: Route.LoaderArgs) {
  const scope = context.get(scopeContext);
  requirePermission(scope, "mark:check");
  const lessonId = readId<"lesson">(params.lessonId, "lesson");
  const page = marksForCheck(scope, lessonId);
  if (!page) notFound("lesson");
  const { draft, rows, others } = page;
  return {
    lessonId,
    title: draft.lesson.title,
    others,
    sent: url.searchParams.has("sent"),
    units: context.get(viewerContext).units,
    rows: rows.map(({ mark, may, seal }): CheckRow => {
      const at = nearestLessonTime(draft.clips, mark.recordingId, mark.atMs);
      return {
        mark,
        may,
        seal,
        confirm: confirmWords(mark),
        moment: {
          text: formatTimecode(at ?? mark.atMs),
          to: `${href("/bench/lessons/:lessonId", { lessonId })}?t=${momentParam(at ?? 0)}`,
        },
        editTo: href("/bench/lessons/:lessonId/marks/:markId", { lessonId, markId: mark.id }),
      };
    }),
  };
}

// After a refusal too: a value that changed meanwhile is shown as it is now.
export function shouldRevalidate() {
  return true;
}

export async function action({ request, context, params }: Route.ActionArgs) {
  const scope = context.get(scopeContext);
  requirePermission(scope, "mark:check");
  const lessonId = readId<"lesson">(params.lessonId, "lesson");
  const form = await request.formData();
  const parsed = parseForm(Request, form);
  if (!parsed.ok) return data(parsed, { status: 400 });
  const page = href("/bench/lessons/:lessonId/check", { lessonId });
  const asked = parsed.value;
  if (asked.intent === "send") {
    const sent = sendForCheck(scope, lessonId, env().PUBLIC_ORIGIN, Date.now());
    if (sent.ok) return redirect(`${page}?sent`);
    if (sent.reason === "missing") notFound("lesson");
    return data(refuse(form, { "": sent.sentence }), { status: 409 });
  }
  const checked = checkMark(scope, lessonId, asked.markId, asked, env().PUBLIC_ORIGIN, Date.now());
  if (!checked.ok) {
    if (checked.reason === "missing") notFound("value");
    return data(refuse(form, { [checked.field]: checked.sentence }), { status: 409 });
  }
  // On to the next one that waits for this person.
  const rows = marksForCheck(scope, lessonId)?.rows ?? [];
  const done = rows.findIndex((row) => row.mark.id === asked.markId);
  const waits = (row: (typeof rows)[number]) =>
    row.mark.state !== "checked" && row.mark.check === null && (row.may === "yes" || row.may === "own-alone");
  const next = rows.slice(done + 1).find(waits) ?? rows.find(waits);
  return redirect(next ? `${page}#${next.mark.id}` : page);
}

function Rows({
  title,
  rows,
  units,
  refused,
}: {
  title: string;
  rows: readonly CheckRow[];
  units: Route.ComponentProps["loaderData"]["units"];
  refused: Route.ComponentProps["actionData"];
}) {
  if (rows.length === 0) return null;
  return (
    <section className="grid gap-3">
      <h2 className="text-2xl">
        {title} ({rows.length})
      </h2>
      <ul className="grid gap-4">
        {rows.map((row) => (
          <ForCheck
            key={row.mark.id}
            row={row}
            units={units}
            refusal={refused?.typed["markId"] === row.mark.id ? refused : undefined}
          />
        ))}
      </ul>
    </section>
  );
}

export default function Check({ loaderData, actionData }: Route.ComponentProps) {
  const { lessonId, title, others, sent, units, rows } = loaderData;
  const waiting = rows.filter((row) => row.mark.state !== "checked");
  const yours = waiting.filter((row) => row.may === "yes" || row.may === "own-alone");
  const theirs = waiting.filter((row) => row.may === "own" || row.may === "no-source");
  const checked = rows.filter((row) => row.mark.state === "checked");
  return (
    <Page
      title="Check values"
      under={title}
      narrow
      actions={
        <ButtonLink look="ghost" to={href("/bench/lessons/:lessonId", { lessonId })}>
          Back to the bench
        </ButtonLink>
      }
    >
      <div className="grid gap-7">
        {actionData && actionData.typed["intent"] !== "check" ? <FormProblem refusal={actionData} /> : null}
        {sent && others.length > 0 ? (
          <Remark>
            <p role="status">Sent to {others.join(", ")}.</p>
          </Remark>
        ) : null}
        <div className="grid gap-3">
          <p>
            Take the source to hand. A value is confirmed by reading it there, by somebody other than who
            wrote it. Shop practice is agreed by two, and printed so.
          </p>
          {waiting.length > 0 && others.length > 0 ? (
            <Form method="post">
              <input type="hidden" name="intent" value="send" />
              <Button look={yours.length > 0 ? "ghost" : "primary"}>Send for check</Button>
            </Form>
          ) : null}
        </div>
        {rows.length === 0 ? (
          <EmptyState title="No value to check yet">
            <p>Torques, measures and tool sizes come here when they are inked.</p>
          </EmptyState>
        ) : null}
        <Rows title="For you to check" rows={yours} units={units} refused={actionData} />
        <Rows
          title="Wait for somebody else or for a source"
          rows={theirs}
          units={units}
          refused={actionData}
        />
        <Rows title="Checked" rows={checked} units={units} refused={actionData} />
      </div>
    </Page>
  );
}
