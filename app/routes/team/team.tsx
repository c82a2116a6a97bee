import { data, Form, href, redirect } from "react-router";
import { z } from "zod";
import { emailField, nameField } from "~/auth/email";
import { invite, openInvitations, resendInvitation, withdrawInvitation } from "~/auth/invitations.server";
import { can, ROLES } from "~/auth/permissions";
import { notFound, requirePermission } from "~/auth/require.server";
import { changeRole, listTeam, removePerson } from "~/auth/team.server";
import { Button, ButtonLink } from "~/components/ui/button";
import { Field, FormProblem, Select } from "~/components/ui/field";
import { localDay, localTime } from "~/components/ui/local-time";
import { Page, Remark, Sheet } from "~/components/ui/page";
import { scopeContext, viewerContext } from "~/context";
import { env } from "~/env.server";
import { parseForm, refuse } from "~/forms/parse-form";
import type { InvitationId, UserId } from "#drizzle/schema/ids";
import type { Route } from "./+types/team";

const person = z.string().transform((id) => id as UserId);
const invitation = z.string().transform((id) => id as InvitationId);
const role = z.enum(ROLES, "Choose a role.");
const Intent = z.discriminatedUnion("intent", [
  z.object({ intent: z.literal("invite"), name: nameField, email: emailField, role }),
  z.object({ intent: z.literal("resend"), invitation }),
  z.object({ intent: z.literal("withdraw"), invitation }),
  z.object({ intent: z.literal("role"), person, role }),
  z.object({ intent: z.literal("remove"), person }),
]);

export function meta() {
  return [{ title: "Team · Castlenut" }];
}

export function loader({ context, url }: Route.LoaderArgs) {
  const scope = context.get(scopeContext);
  requirePermission(scope, "team:see");
  return {
    ...listTeam(scope),
    invitations: openInvitations(scope),
    mayEdit: can(scope.role, "team:edit"),
    viewer: context.get(viewerContext),
    now: Date.now(),
    done: url.searchParams.get("done"),
  };
}

export async function action({ request, context }: Route.ActionArgs) {
  const scope = context.get(scopeContext);
  requirePermission(scope, "team:edit");
  const fields = await request.formData();
  const form = parseForm(Intent, fields);
  if (!form.ok) return data(form, { status: 400 });
  const [order, now] = [form.value, Date.now()];
  const done = (word: string) => redirect(`${href("/team")}?done=${word}`);
  switch (order.intent) {
    case "invite": {
      const { intent: _, ...invited } = order;
      const result = invite(scope, invited, env().PUBLIC_ORIGIN, now);
      return result.ok ? done("invited") : data(refuse(fields, { email: result.sentence }), { status: 409 });
    }
    case "resend":
      return resendInvitation(scope, order.invitation, env().PUBLIC_ORIGIN, now)
        ? done("sent")
        : notFound("invitation");
    case "withdraw":
      return withdrawInvitation(scope, order.invitation, now) ? done("withdrawn") : notFound("invitation");
    case "role":
    case "remove": {
      const result =
        order.intent === "role"
          ? changeRole(scope, order.person, order.role, now)
          : removePerson(scope, order.person, now);
      if (result.ok) return done(order.intent === "role" ? "role" : "removed");
      return result.reason === "missing"
        ? notFound("person")
        : data(refuse(fields, { "": result.sentence }), { status: 409 });
    }
    default:
      return order satisfies never;
  }
}

const DONE: Readonly<Record<string, string>> = {
  invited: "The invitation is on its way.",
  sent: "The invitation was sent again. The former link does not work any more.",
  withdrawn: "The invitation is withdrawn.",
  role: "The role is changed.",
  removed: "That person is signed out everywhere and off the team. Their records are kept.",
};

const roles = ROLES.map((value) => ({ value, label: value }));

type Data = Route.ComponentProps["loaderData"];

function PersonRow({
  person,
  mayEdit,
  timeZone,
}: {
  person: Data["people"][number];
  mayEdit: boolean;
  timeZone: string;
}) {
  return (
    <li className="border-b border-line px-5 py-4 last:border-b-0">
      <div className="flex flex-wrap items-center justify-between gap-x-6 gap-y-2">
        <div className="min-w-0 flex-1 basis-56">
          <p className="font-semibold">{person.name}</p>
          <p className="text-sm break-all text-ink-soft">{person.email}</p>
          <p className="text-sm text-ink-soft">
            {person.role}, on the team since {localDay(person.createdAt, timeZone)},{" "}
            {person.lastSeenAt ? `last seen ${localTime(person.lastSeenAt, timeZone)}` : "not seen yet"}
          </p>
        </div>
        {mayEdit ? (
          <div className="flex flex-wrap items-end gap-3">
            <Form method="post" className="flex items-end gap-2">
              <input type="hidden" name="person" value={person.id} />
              <Select
                label={`Role of ${person.name}`}
                name="role"
                defaultValue={person.role}
                options={roles}
              />
              <Button name="intent" value="role" look="ghost">
                Change
              </Button>
            </Form>
            <details>
              <summary className="flex min-h-11 cursor-pointer items-center px-2 text-sm font-semibold">
                Remove
              </summary>
              <Form method="post" className="mt-2 grid gap-2">
                <input type="hidden" name="person" value={person.id} />
                <p className="max-w-64 text-sm">
                  {person.name} is signed out everywhere. Records stay with the shop.
                </p>
                <Button name="intent" value="remove" look="ghost">
                  Remove {person.name}
                </Button>
              </Form>
            </details>
          </div>
        ) : null}
      </div>
    </li>
  );
}

export default function Team({ loaderData, actionData }: Route.ComponentProps) {
  const { people, left, invitations, mayEdit, viewer, now, done } = loaderData;
  const inviting = actionData && actionData.typed.intent === "invite" ? actionData : undefined;
  const other = actionData && !inviting ? actionData : undefined;
  return (
    <Page
      title="Team"
      under={viewer.shopName}
      actions={
        can(viewer.role, "shop:edit") ? (
          <ButtonLink to={href("/settings")} look="ghost">
            Shop settings
          </ButtonLink>
        ) : null
      }
      narrow
    >
      {done && DONE[done] && !actionData ? (
        <div role="status" className="mb-5">
          <Remark>{DONE[done]}</Remark>
        </div>
      ) : null}
      <div className="mb-5 empty:hidden">
        <FormProblem refusal={other} />
      </div>
      <Sheet>
        <ul>
          {people.map((found) => (
            <PersonRow key={found.id} person={found} mayEdit={mayEdit} timeZone={viewer.timeZone} />
          ))}
        </ul>
      </Sheet>

      {mayEdit ? (
        <>
          <h2 className="mt-8 mb-2 text-2xl">Invite somebody</h2>
          <Sheet className="p-5">
            <Form method="post" className="grid gap-4 sm:grid-cols-2">
              <div className="empty:hidden sm:col-span-2">
                <FormProblem refusal={inviting} />
              </div>
              <Field label="Name" name="name" autoComplete="off" refusal={inviting} />
              <Field label="E-mail" name="email" type="email" autoComplete="off" refusal={inviting} />
              <Select
                label="Role"
                name="role"
                refusal={inviting}
                defaultValue="trainee"
                options={roles}
                hint="Trainees learn; instructors also record, check and sign off; owners also run the team and the shop."
                className="sm:col-span-2"
              />
              <div className="sm:col-span-2">
                <Button name="intent" value="invite">
                  Send the invitation
                </Button>
              </div>
            </Form>
          </Sheet>
        </>
      ) : null}

      {invitations.length > 0 ? (
        <>
          <h2 className="mt-8 mb-2 text-2xl">Invited</h2>
          <Sheet>
            <ul>
              {invitations.map((row) => (
                <li
                  key={row.id}
                  className="flex flex-wrap items-center justify-between gap-3 border-b border-line px-5 py-4 last:border-b-0"
                >
                  <div className="min-w-0">
                    <p className="font-semibold">{row.name}</p>
                    <p className="text-sm break-all text-ink-soft">{row.email}</p>
                    <p className="text-sm text-ink-soft">
                      {row.role}, sent {localTime(row.sentAt, viewer.timeZone)}
                      {row.expiresAt < now ? ", expired" : ""}
                    </p>
                  </div>
                  {mayEdit ? (
                    <Form method="post" className="flex gap-2">
                      <input type="hidden" name="invitation" value={row.id} />
                      <Button name="intent" value="resend" look="ghost">
                        Send again
                      </Button>
                      <Button name="intent" value="withdraw" look="quiet">
                        Withdraw
                      </Button>
                    </Form>
                  ) : null}
                </li>
              ))}
            </ul>
          </Sheet>
        </>
      ) : null}

      {left.length > 0 ? (
        <>
          <h2 className="mt-8 mb-2 text-2xl">Left</h2>
          <Sheet>
            <ul>
              {left.map((row) => (
                <li key={row.id} className="border-b border-line px-5 py-3 text-ink-soft last:border-b-0">
                  {row.name}, {row.role}, until {localTime(row.leftAt ?? 0, viewer.timeZone)}
                </li>
              ))}
            </ul>
          </Sheet>
        </>
      ) : null}
    </Page>
  );
}
