import { data, Form, href, Link, redirect } from "react-router";
import { z } from "zod";
import { can } from "~/auth/permissions";
import { notFound, readId, requirePermission } from "~/auth/require.server";
import { valueLine } from "~/components/plates/figures";
import { appliesWords, momentDay, placeWords, sourceWords } from "~/components/plates/plate-words";
import { Button, ButtonLink } from "~/components/ui/button";
import { FormProblem, TextArea } from "~/components/ui/field";
import { Page, Remark, Sheet } from "~/components/ui/page";
import { scopeContext, viewerContext } from "~/context";
import { env } from "~/env.server";
import { parseForm } from "~/forms/parse-form";
import { holdsFigure } from "~/lessons/mark";
import { markTitle } from "~/lessons/mark-words";
import { momentParam } from "~/lessons/timecode";
import { DOUBT_REASONS, doubtWords, type DoubtReason } from "~/publishing/doubt-reasons";
import { lookAtValue, raiseDoubt } from "~/publishing/doubts.server";
import type { Route } from "./+types/looks-wrong";

const Doubt = z.object({
  reason: z.enum(Object.keys(DOUBT_REASONS) as [DoubtReason, ...DoubtReason[]], "Press one of the reasons."),
  note: z.string().trim().max(500, "Keep it under 500 characters.").default(""),
});

export function meta() {
  return [{ title: "This looks wrong · Castlenut" }];
}

export function loader({ context, params }: Route.LoaderArgs) {
  const scope = context.get(scopeContext);
  requirePermission(scope, "value:doubt");
  const lessonId = readId<"lesson">(params.lessonId, "lesson");
  const found = lookAtValue(scope, lessonId, readId<"mark">(params.markId, "value"));
  if (!found) notFound("value");
  return { ...found, lessonId, stops: can(scope.role, "value:stop"), viewer: context.get(viewerContext) };
}

export async function action({ request, context, params }: Route.ActionArgs) {
  const scope = context.get(scopeContext);
  requirePermission(scope, "value:doubt");
  const lessonId = readId<"lesson">(params.lessonId, "lesson");
  const markId = readId<"mark">(params.markId, "value");
  const parsed = parseForm(Doubt, await request.formData());
  if (!parsed.ok) return data(parsed, { status: 400 });
  const words = doubtWords(parsed.value.reason, parsed.value.note);
  const raised = raiseDoubt(scope, lessonId, markId, words, env().PUBLIC_ORIGIN, Date.now());
  if (!raised.ok) notFound("value");
  return redirect(href("/lessons/:lessonId/values/:markId/wrong", { lessonId, markId }));
}

export default function LooksWrong({ loaderData, actionData }: Route.ComponentProps) {
  const { title, value, lessonId, lessonMs, said, told, stops, viewer } = loaderData;
  const { mark, showing, doubts } = value;
  const back = `/lessons/${lessonId}?t=${momentParam(lessonMs)}`;
  const figure = holdsFigure(mark.kind) && mark.values.length > 0 ? valueLine(mark.values, viewer.units) : "";
  const where = [placeWords(mark), appliesWords(mark.applies)].filter(Boolean).join(". ");
  return (
    <Page title="This looks wrong" under={title} narrow>
      <div className="grid gap-6">
        <Sheet className="grid gap-1 p-5">
          <p className="text-xl font-semibold">{markTitle(mark)}</p>
          {where === "" ? null : <p>{where}</p>}
          {figure === "" ? null : <p className="text-lg">{figure}</p>}
          {showing === "in-doubt" ? <p className="font-semibold">In doubt: do not use.</p> : null}
          {holdsFigure(mark.kind) ? (
            <p className="text-sm text-ink-soft">{sourceWords(mark.source)}</p>
          ) : null}
        </Sheet>
        {doubts.length > 0 ? (
          <Remark>
            <ul className="grid gap-1">
              {doubts.map((doubt) => (
                <li key={doubt.doubtId}>
                  <strong>{doubt.stops ? "Stopped" : "Doubted"}</strong>{" "}
                  {momentDay(doubt.at, viewer.timeZone)} by {doubt.by}: {doubt.reason}
                </li>
              ))}
            </ul>
          </Remark>
        ) : null}
        {said ? (
          <div className="grid gap-4" role="status">
            <p className="text-lg">
              {stops
                ? "The value is stopped. Nobody sees its figure until it is cleared, and search and quiz leave it out."
                : "Kept. A warning stands beside the value for everybody."}{" "}
              {told.length > 0 ? `Told by mail: ${told.join(", ")}.` : ""}
            </p>
            <p>
              Until somebody has answered, compare with the maker's current information for this chassis
              number.
            </p>
            <div className="flex flex-wrap gap-3">
              <ButtonLink to={back}>Back to the lesson</ButtonLink>
              {stops ? (
                <ButtonLink look="ghost" to={href("/bench/doubts/:doubtId", { doubtId: said })}>
                  Who used it, and clear it
                </ButtonLink>
              ) : null}
            </div>
          </div>
        ) : (
          <Form method="post" className="grid gap-4">
            <FormProblem refusal={actionData} />
            <p className="text-lg">
              {stops
                ? "One press stops this value at once, for everybody."
                : `One press puts a warning beside this value and mails ${told.join(", ")}.`}
            </p>
            <div className="grid gap-3">
              {(Object.keys(DOUBT_REASONS) as DoubtReason[]).map((reason) => (
                <Button
                  key={reason}
                  look="ghost"
                  name="reason"
                  value={reason}
                  className="min-h-15 w-full justify-start text-left text-base!"
                >
                  {DOUBT_REASONS[reason]}
                </Button>
              ))}
            </div>
            <TextArea
              label="More, if you like (before you press)"
              name="note"
              rows={2}
              maxLength={500}
              hint="What you read, and where."
              refusal={actionData}
            />
            <p>
              <Link to={back} className="inline-flex min-h-11 items-center">
                Back to the lesson without saying anything
              </Link>
            </p>
          </Form>
        )}
      </div>
    </Page>
  );
}
