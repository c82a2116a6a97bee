import { data, Form, href, redirect } from "react-router";
import { z } from "zod";
import { changePassword, endDevice, loadAccount, saveProfile } from "~/auth/account.server";
import { nameField } from "~/auth/email";
import { newPassword } from "~/auth/password";
import { notFound, requirePermission } from "~/auth/require.server";
import { endSessionsOf } from "~/auth/session.server";
import { Button } from "~/components/ui/button";
import { Checkbox, Field, FormProblem, Select } from "~/components/ui/field";
import { localTime } from "~/components/ui/local-time";
import { Page, Remark, Sheet } from "~/components/ui/page";
import { scopeContext, sessionContext, viewerContext } from "~/context";
import { parseForm, refuse } from "~/forms/parse-form";
import type { SessionId } from "#drizzle/schema/ids";
import type { Route } from "./+types/account";

const ticked = z
  .literal("yes")
  .optional()
  .transform((value) => value === "yes");
const Intent = z.discriminatedUnion("intent", [
  z.object({
    intent: z.literal("profile"),
    name: nameField,
    units: z.enum(["", "metric", "inch"]).transform((value) => value || null),
    mailAssignments: ticked,
    mailQuestions: ticked,
  }),
  z.object({
    intent: z.literal("password"),
    oldPassword: z.string().min(1, "Type your present password."),
    newPassword,
  }),
  z.object({ intent: z.literal("end-device"), device: z.string().transform((id) => id as SessionId) }),
  z.object({ intent: z.literal("end-others") }),
]);

export function meta() {
  return [{ title: "Account · Castlenut" }];
}

export function loader({ context, url }: Route.LoaderArgs) {
  const scope = context.get(scopeContext);
  requirePermission(scope, "account:edit");
  return {
    ...loadAccount(scope, context.get(sessionContext), Date.now()),
    viewer: context.get(viewerContext),
    done: url.searchParams.get("done"),
  };
}

export async function action({ request, context }: Route.ActionArgs) {
  const scope = context.get(scopeContext);
  requirePermission(scope, "account:edit");
  const fields = await request.formData();
  const form = parseForm(Intent, fields);
  if (!form.ok) return data(form, { status: 400 });
  const order = form.value;
  const done = (word: string) => redirect(`${href("/account")}?done=${word}`);
  switch (order.intent) {
    case "profile":
      saveProfile(scope, {
        name: order.name,
        preferredUnits: order.units,
        mailAssignments: order.mailAssignments,
        mailQuestions: order.mailQuestions,
      });
      return done("profile");
    case "password": {
      const result = await changePassword(scope, context.get(sessionContext), {
        old: order.oldPassword,
        password: order.newPassword,
      });
      return result.ok
        ? done("password")
        : data(refuse(fields, { oldPassword: result.sentence }), { status: 400 });
    }
    case "end-device":
      return endDevice(scope, order.device) ? done("device") : notFound("session");
    case "end-others":
      endSessionsOf(scope, scope.userId, context.get(sessionContext));
      return done("others");
    default:
      return order satisfies never;
  }
}

const DONE: Readonly<Record<string, string>> = {
  profile: "Saved.",
  password: "The password is changed. Every other device is signed out.",
  device: "That device is signed out.",
  others: "Every other device is signed out.",
};

/** "Chrome on Android" out of what a browser says of itself; the whole line where that does not tell. */
function deviceWords(agent: string): string {
  const browser = /(Firefox|Edg|Chrome|Safari)\//.exec(agent)?.[1]?.replace("Edg", "Edge");
  const system = /(Android|iPhone|iPad|Windows|Mac OS|Linux)/.exec(agent)?.[1];
  return browser && system ? `${browser} on ${system}` : agent.slice(0, 60) || "A device";
}

export default function Account({ loaderData, actionData }: Route.ComponentProps) {
  const { name, email, role, preferredUnits, mailAssignments, mailQuestions, devices, viewer, done } =
    loaderData;
  const of = (intent: string) => (actionData && actionData.typed.intent === intent ? actionData : undefined);
  return (
    <Page
      title="Account"
      under={`${email}, ${role} at ${viewer.shopName}`}
      actions={
        <Form method="post" action={href("/sign-out")}>
          <Button look="ghost">Sign out</Button>
        </Form>
      }
      narrow
    >
      {done && DONE[done] && !actionData ? (
        <div role="status" className="mb-5">
          <Remark>{DONE[done]}</Remark>
        </div>
      ) : null}
      <h2 className="mb-2 text-2xl">You</h2>
      <Sheet className="p-5">
        <Form method="post" className="grid gap-4">
          <FormProblem refusal={of("profile")} />
          <Field label="Name" name="name" autoComplete="name" defaultValue={name} refusal={of("profile")} />
          <Select
            key={preferredUnits ?? ""}
            label="Which unit comes first"
            name="units"
            defaultValue={preferredUnits ?? ""}
            options={[
              { value: "", label: "As the shop has it" },
              { value: "metric", label: "N·m, mm, kPa" },
              { value: "inch", label: "lbf·ft, in, psi" },
            ]}
          />
          <Checkbox
            label="Mail me when a lesson is assigned to me"
            name="mailAssignments"
            defaultChecked={mailAssignments}
          />
          <Checkbox
            label="Mail me about checks, doubts and sign-offs that wait for me"
            name="mailQuestions"
            defaultChecked={mailQuestions}
          />
          <div>
            <Button name="intent" value="profile">
              Save
            </Button>
          </div>
        </Form>
      </Sheet>

      <h2 className="mt-8 mb-2 text-2xl">Password</h2>
      <Sheet className="p-5">
        <Form method="post" className="grid gap-4">
          <FormProblem refusal={of("password")} />
          <input type="hidden" name="username" autoComplete="username" value={email} readOnly />
          <Field
            label="Present password"
            name="oldPassword"
            type="password"
            autoComplete="current-password"
            refusal={of("password")}
          />
          <Field
            label="New password"
            name="newPassword"
            type="password"
            autoComplete="new-password"
            hint="At least 10 characters."
            refusal={of("password")}
          />
          <div>
            <Button name="intent" value="password" look="ghost">
              Change the password
            </Button>
          </div>
        </Form>
      </Sheet>

      <h2 className="mt-8 mb-2 text-2xl">Signed-in devices</h2>
      <Sheet>
        <ul>
          {devices.map((device) => (
            <li
              key={device.id}
              className="flex flex-wrap items-center justify-between gap-3 border-b border-line px-5 py-3 last:border-b-0"
            >
              <div>
                <p>{deviceWords(device.device)}</p>
                <p className="text-sm text-ink-soft">
                  {device.current
                    ? "This device"
                    : `Last seen ${localTime(device.lastSeenAt, viewer.timeZone)}`}
                </p>
              </div>
              {device.current ? null : (
                <Form method="post">
                  <input type="hidden" name="device" value={device.id} />
                  <Button name="intent" value="end-device" look="quiet">
                    Sign out that device
                  </Button>
                </Form>
              )}
            </li>
          ))}
        </ul>
      </Sheet>
      {devices.length > 1 ? (
        <Form method="post" className="mt-4">
          <Button name="intent" value="end-others" look="ghost">
            Sign out everywhere else
          </Button>
        </Form>
      ) : null}
    </Page>
  );
}
