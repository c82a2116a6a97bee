import { data, Form, href, Link, redirect } from "react-router";
import { z } from "zod";
import { nameField } from "~/auth/email";
import { acceptInvitation, findInvitation } from "~/auth/invitations.server";
import { newPassword } from "~/auth/password";
import { startSession } from "~/auth/session.server";
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

export function loader({ params, context }: Route.LoaderArgs) {
  const found = findInvitation(context.get(anonymousContext), params.token, Date.now());
  return {
    invited: found ? { shop: found.shop, name: found.name, email: found.email, role: found.role } : null,
  };
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

export default function Invitation({ loaderData: { invited }, actionData }: Route.ComponentProps) {
  if (!invited)
    return (
      <Door title="This invitation does not work any more">
        <p>
          It was accepted, withdrawn, or is older than 14 days. Ask the shop's owner to send it again, or{" "}
          <Link to={href("/sign-in")}>sign in</Link>.
        </p>
      </Door>
    );
  return (
    <Door title={`Join ${invited.shop}`}>
      <Form method="post" className="grid gap-5">
        <FormProblem refusal={actionData} />
        <p>
          You are invited as {invited.role} with {invited.email}.
        </p>
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
