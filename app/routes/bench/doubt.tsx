import { data, Form, href, redirect } from "react-router";
import { z } from "zod";
import { notFound, readId, requirePermission } from "~/auth/require.server";
import { momentDay } from "~/components/plates/plate-words";
import { Button, ButtonLink } from "~/components/ui/button";
import { FormProblem, TextArea } from "~/components/ui/field";
import { Page, Remark, Sheet } from "~/components/ui/page";
import { scopeContext, viewerContext } from "~/context";
import { parseForm, refuse } from "~/forms/parse-form";
import { clearDoubt, findDoubt } from "~/publishing/doubts.server";
import type { Route } from "./+types/doubt";

const Clear = z.object({
  reason: z
    .string("Say why the value may be used again.")
    .trim()
    .max(500, "Keep the reason under 500 characters."),
});

export function meta() {
  return [{ title: "Value in doubt · Castlenut" }];
}

export function loader({ context, params }: Route.LoaderArgs) {
  const scope = context.get(scopeContext);
  requirePermission(scope, "value:stop");
  const found = findDoubt(scope, readId<"doubt">(params.doubtId, "value"), Date.now());
  if (!found) notFound("value");
  const { timeZone, name } = context.get(viewerContext);
  return { ...found, timeZone, name };
}

export async function action({ request, context, params }: Route.ActionArgs) {
  const scope = context.get(scopeContext);
  requirePermission(scope, "value:stop");
  const doubtId = readId<"doubt">(params.doubtId, "value");
  const form = await request.formData();
  const parsed = parseForm(Clear, form);
  if (!parsed.ok) return data(parsed, { status: 400 });
  const cleared = clearDoubt(scope, doubtId, parsed.value.reason, Date.now());
  if (cleared.ok) return redirect(href("/bench/doubts/:doubtId", { doubtId }));
  if (cleared.reason === "missing") notFound("value");
  return data(refuse(form, { reason: cleared.sentence }), { status: 400 });
}

export default function Doubt({ loaderData, actionData }: Route.ComponentProps) {
  const { doubt, usedBy, timeZone, name } = loaderData;
  const { lessonId, markId } = doubt;
  return (
    <Page
      title={doubt.value}
      under={doubt.lesson}
      narrow
      actions={
        <ButtonLink look="ghost" to={href("/bench/doubts")}>
          All values in doubt
        </ButtonLink>
      }
    >
      <div className="grid gap-7">
        <Remark>
          <p>
            <strong>{doubt.cleared ? "Cleared" : doubt.stops ? "Stopped" : "Warns beside the value"}</strong>.{" "}
            {momentDay(doubt.at, timeZone)}, {doubt.by}: {doubt.reason}
          </p>
          {doubt.cleared ? (
            <p className="mt-1">
              Cleared {momentDay(doubt.cleared.at, timeZone)} by {doubt.cleared.by}: {doubt.cleared.reason}
            </p>
          ) : null}
        </Remark>
        <section className="grid gap-3">
          <h2 className="text-2xl">Who used it in the last 30 days</h2>
          {usedBy.length === 0 ? (
            <p>Nobody watched the lesson or answered a question on this value.</p>
          ) : (
            <Sheet>
              <ul>
                {usedBy.map((user) => (
                  <li key={user.userId} className="border-b border-line px-5 py-3 last:border-b-0">
                    <strong>{user.name}</strong> {user.how.join(", ")}, last{" "}
                    {momentDay(user.lastAt, timeZone)}
                  </li>
                ))}
              </ul>
            </Sheet>
          )}
        </section>
        <section className="grid gap-3">
          <h2 className="text-2xl">Put it right</h2>
          <p>
            If the value is wrong, change it on the bench, have it checked and publish it. Then clear the
            doubt. If it is right, say where you read it.
          </p>
          <div className="flex flex-wrap gap-3">
            <ButtonLink
              look="ghost"
              to={href("/bench/lessons/:lessonId/marks/:markId", { lessonId, markId })}
            >
              Open the mark
            </ButtonLink>
            {doubt.stops || doubt.cleared ? null : (
              <ButtonLink
                look="ghost"
                to={href("/lessons/:lessonId/values/:markId/wrong", { lessonId, markId })}
              >
                Stop the value
              </ButtonLink>
            )}
          </div>
        </section>
        {doubt.cleared ? null : (
          <Form method="post" className="grid gap-3">
            <FormProblem refusal={actionData} />
            <TextArea
              label="Why may the value be used again?"
              name="reason"
              rows={3}
              maxLength={500}
              hint={`Kept with your name, ${name}.`}
              refusal={actionData}
            />
            <p>
              <Button>Clear the doubt</Button>
            </p>
          </Form>
        )}
      </div>
    </Page>
  );
}
