import { data, Form, href, Link, redirect } from "react-router";
import { z } from "zod";
import { newPassword } from "~/auth/password";
import { findReset, resetPassword } from "~/auth/reset-password.server";
import { Door } from "~/components/frame/door";
import { Button } from "~/components/ui/button";
import { Field, FormProblem } from "~/components/ui/field";
import { anonymousContext } from "~/context";
import { parseForm } from "~/forms/parse-form";
import type { Route } from "./+types/reset-password";

const Chosen = z.object({ password: newPassword });

export function meta() {
  return [{ title: "Choose a new password · Castlenut" }];
}

export function loader({ params, context }: Route.LoaderArgs) {
  return { email: findReset(context.get(anonymousContext), params.token, Date.now())?.email ?? null };
}

export async function action({ request, params, context }: Route.ActionArgs) {
  const form = parseForm(Chosen, await request.formData());
  if (!form.ok) return data(form, { status: 400 });
  const done = await resetPassword(
    context.get(anonymousContext),
    params.token,
    form.value.password,
    Date.now(),
  );
  return redirect(done ? `${href("/sign-in")}?reset` : href("/reset-password/:token", params));
}

export default function ResetPassword({ loaderData: { email }, actionData }: Route.ComponentProps) {
  if (email === null)
    return (
      <Door title="This link does not work any more">
        <p>
          It was used, or it is older than two hours.{" "}
          <Link to={href("/forgot-password")}>Ask for a new one</Link>.
        </p>
      </Door>
    );
  return (
    <Door title="Choose a new password">
      <Form method="post" className="grid gap-5">
        <FormProblem refusal={actionData} />
        <p>For {email}. Every device that is signed in will be signed out.</p>
        <input type="hidden" name="email" autoComplete="username" value={email} readOnly />
        <Field
          label="New password"
          name="password"
          type="password"
          autoComplete="new-password"
          required
          hint="At least 10 characters."
          refusal={actionData}
        />
        <Button className="justify-self-start">Set the password</Button>
      </Form>
    </Door>
  );
}
