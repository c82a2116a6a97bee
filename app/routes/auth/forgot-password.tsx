import { data, Form, href, Link, redirect } from "react-router";
import { z } from "zod";
import { emailField } from "~/auth/email";
import { askForReset } from "~/auth/reset-password.server";
import { Door } from "~/components/frame/door";
import { Button } from "~/components/ui/button";
import { Field, FormProblem } from "~/components/ui/field";
import { anonymousContext } from "~/context";
import { env } from "~/env.server";
import { parseForm } from "~/forms/parse-form";
import type { Route } from "./+types/forgot-password";

const Ask = z.object({ email: emailField });

export function meta() {
  return [{ title: "Forgot the password · Castlenut" }];
}

export function loader({ url }: Route.LoaderArgs) {
  return { sent: url.searchParams.has("sent") };
}

export async function action({ request, context }: Route.ActionArgs) {
  const form = parseForm(Ask, await request.formData());
  if (!form.ok) return data(form, { status: 400 });
  askForReset(context.get(anonymousContext), form.value.email, env().PUBLIC_ORIGIN, Date.now());
  return redirect(`${href("/forgot-password")}?sent`);
}

export default function ForgotPassword({ loaderData: { sent }, actionData }: Route.ComponentProps) {
  return (
    <Door
      title="Forgot the password"
      foot={
        <Link to={href("/sign-in")} className="inline-flex min-h-11 items-center">
          Back to sign in
        </Link>
      }
    >
      {sent ? (
        <p role="status">
          If that address has an account, a mail with a link is on its way. The link works once, for two
          hours. Nothing there? Look in the spam folder, or check the address and ask again.
        </p>
      ) : (
        <Form method="post" className="grid gap-5">
          <FormProblem refusal={actionData} />
          <Field
            label="E-mail"
            name="email"
            type="email"
            autoComplete="username"
            required
            refusal={actionData}
          />
          <Button className="justify-self-start">Send the link</Button>
        </Form>
      )}
    </Door>
  );
}
