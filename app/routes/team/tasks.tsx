import { data, Form, href, Link, redirect } from "react-router";
import { z } from "zod";
import { notFound, requirePermission } from "~/auth/require.server";
import { Button } from "~/components/ui/button";
import { localTime } from "~/components/ui/local-time";
import { EmptyState, Page, Sheet } from "~/components/ui/page";
import { scopeContext, viewerContext } from "~/context";
import { parseForm } from "~/forms/parse-form";
import type { TaskKind } from "~/queue/add-task.server";
import { failedTasks, giveUpTask, retryTask } from "~/queue/failed-tasks.server";
import type { TaskId } from "#drizzle/schema/ids";
import type { Route } from "./+types/tasks";

const Intent = z.object({
  intent: z.enum(["retry", "give-up"]),
  task: z.string().transform((id) => id as TaskId),
});

const KIND_WORDS: Readonly<Record<TaskKind, string>> = {
  "send-mail": "Send a mail",
  "check-recording": "Check an uploaded recording",
  "prepare-recording": "Make poster, frames and sound peaks",
  "convert-recording": "Convert a recording so that browsers play it",
  "abandon-upload": "Clear away an upload that was never finished",
  "delete-recording": "Take the files of a deleted recording out of storage",
};

export function meta() {
  return [{ title: "Failed background tasks · Castlenut" }];
}

export function loader({ context }: Route.LoaderArgs) {
  const scope = context.get(scopeContext);
  requirePermission(scope, "tasks:see");
  return { tasks: failedTasks(scope), timeZone: context.get(viewerContext).timeZone };
}

export async function action({ request, context }: Route.ActionArgs) {
  const scope = context.get(scopeContext);
  requirePermission(scope, "tasks:see");
  const form = parseForm(Intent, await request.formData());
  if (!form.ok) return data(form, { status: 400 });
  const { intent, task } = form.value;
  const done = intent === "retry" ? retryTask(scope, task, Date.now()) : giveUpTask(scope, task, Date.now());
  if (!done) notFound("task");
  return redirect(href("/settings/tasks"));
}

export default function Tasks({ loaderData: { tasks, timeZone } }: Route.ComponentProps) {
  return (
    <Page title="Failed background tasks" under={<Link to={href("/settings")}>Shop settings</Link>} narrow>
      {tasks.length === 0 ? (
        <EmptyState title="Nothing has failed">
          <p>Mails, checks of recordings and conversions that fail stand here with the reason.</p>
        </EmptyState>
      ) : (
        <Sheet>
          <ul>
            {tasks.map((task) => (
              <li key={task.id} className="grid gap-2 border-b border-line px-5 py-4 last:border-b-0">
                <p className="font-semibold">{KIND_WORDS[task.kind] ?? task.kind}</p>
                <p className="text-sm break-words">{task.lastError}</p>
                <p className="text-sm text-ink-soft">
                  Asked for {localTime(task.createdAt, timeZone)}; {task.attempts}{" "}
                  {task.attempts === 1 ? "try" : "tries"};{" "}
                  {task.failedAt ? "no more by itself" : `next try ${localTime(task.runAt, timeZone)}`}
                </p>
                <Form method="post" className="flex gap-3">
                  <input type="hidden" name="task" value={task.id} />
                  <Button name="intent" value="retry" look="ghost">
                    Try again
                  </Button>
                  <Button name="intent" value="give-up" look="quiet">
                    Give up
                  </Button>
                </Form>
              </li>
            ))}
          </ul>
        </Sheet>
      )}
    </Page>
  );
}
