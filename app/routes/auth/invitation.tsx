import { data, Form, href, Link, redirect } from "react-router";
import { z } from "zod";
import { nameField } from "~/auth/email";
import { acceptInvitation, findInvitation } from "~/auth/invitations.server";
import { newPassword } from "~/auth/password";
import { readSession, startSession } from "~/auth/session.server";
import { Door } from "~/components/frame/door";
import { Button } from "~/components/ui/button";
import { Field, FormProblem } from "~/components/ui/field";
import { anonymousContext } from "~/context";
import { parseForm, refuse } from "~/forms/parse-form";
import type { Route } from "./+types/invitation";

const Accepted = z.object({ name: nameField, password: newPassword });

export function meta() {
  return [{ title: "Join the shop · Castlenut" }];
}

export async function loader({ request, params, context }: Route.LoaderArgs) {
  const [from, now] = [context.get(anonymousContext), Date.now()];
  const found = findInvitation(from, params.token, now);
  if (found.state !== "open") return { state: found.state };
  const { state, shop, name, email, role } = found;
  const signedIn = await readSession(from, request, now);
  return { state, shop, name, email, role, signedInAs: signedIn?.viewer.name ?? null };
}

export async function action({ request, params, context }: Route.ActionArgs) {
  const from = context.get(anonymousContext);
  const fields = await request.formData();
  const form = parseForm(Accepted, fields);
  if (!form.ok) return data(form, { status: 400 });
  const joined = await acceptInvitation(from, params.token, form.value, Date.now());
  if (!joined) return redirect(href("/invitation/:token", params));
  if (!joined.ok) return data(refuse(fields, { "": joined.sentence }), { status: 409 });
  const cookie = await startSession(from, joined.userId, request, Date.now());
  return redirect(href("/"), { headers: { "Set-Cookie": cookie } });
}

const CLOSED = {
  accepted: "It was used already. If that was you, sign in with the password you chose.",
  withdrawn: "The shop withdrew it, or sent you a newer one. Look for a newer mail, or ask the shop's owner.",
  expired: "It is older than 14 days. Ask the shop's owner to send it again.",
  unknown: "The link is not complete, or a newer mail has replaced it. Open the link of the newest mail.",
};

export default function Invitation({ loaderData: invited, actionData }: Route.ComponentProps) {
  if (invited.state !== "open")
    return (
      <Door
        title="This invitation does not work any more"
        foot={
          <Link to={href("/sign-in")} className="inline-flex min-h-11 items-center">
            Sign in
          </Link>
        }
      >
        <p>{CLOSED[invited.state]}</p>
      </Door>
    );
  return (
    <Door title={`Join ${invited.shop}`}>
      <Form method="post" className="grid gap-5">
        <FormProblem refusal={actionData} />
        <p>
          You are invited as {invited.role} with {invited.email}.
        </p>
        {invited.signedInAs === null ? null : (
          <p>
            {invited.signedInAs} is signed in on this device. Joining signs {invited.signedInAs} out here.
          </p>
        )}
        <Field
          label="Your name"
          name="name"
          autoComplete="name"
          defaultValue={invited.name}
          required
          refusal={actionData}
        />
        <Field
          label="Password"
          name="password"
          type="password"
          autoComplete="new-password"
          required
          hint="At least 10 characters."
          refusal={actionData}
        />
        <Button className="justify-self-start">Join</Button>
      </Form>
    </Door>
  );
}
