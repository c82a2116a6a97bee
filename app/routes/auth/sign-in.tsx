import { data, Form, href, Link, redirect } from "react-router";
import { z } from "zod";
import { localPath } from "~/auth/local-path";
import { readSession, startSession } from "~/auth/session.server";
import { signInAuthenticator, SignInRefused } from "~/auth/sign-in.server";
import { Door } from "~/components/frame/door";
import { Button } from "~/components/ui/button";
import { Field, FormProblem } from "~/components/ui/field";
import { anonymousContext } from "~/context";
import { parseForm, refuse } from "~/forms/parse-form";
import type { Route } from "./+types/sign-in";

export function meta() {
  return [{ title: "Sign in · Castlenut" }];
}

const Entry = z.object({
  email: z
    .string("Type your e-mail address.")
    .trim()
    .min(1, "Type your e-mail address.")
    .max(254, "This e-mail address is too long."),
  password: z.string("Type your password.").min(1, "Type your password."),
});

export async function loader({ request, context, url }: Route.LoaderArgs) {
  const to = localPath(url.searchParams.get("to"));
  if (await readSession(context.get(anonymousContext), request, Date.now())) throw redirect(to);
  return { reset: url.searchParams.has("reset") };
}

export async function action({ request, context, url }: Route.ActionArgs) {
  const from = context.get(anonymousContext);
  const fields = await request.clone().formData();
  const form = parseForm(Entry, fields);
  if (!form.ok) return data(form, { status: 400 });
  try {
    const userId = await signInAuthenticator(from).authenticate("form", request);
    const cookie = await startSession(from, userId, request, Date.now());
    return redirect(localPath(url.searchParams.get("to")), { headers: { "Set-Cookie": cookie } });
  } catch (error) {
    if (!(error instanceof SignInRefused)) throw error;
    return data(refuse(fields, { "": error.message }), { status: 400 });
  }
}

export default function SignIn({ loaderData: { reset }, actionData }: Route.ComponentProps) {
  return (
    <Door
      title="Sign in"
      foot={
        <>
          <Link to={href("/forgot-password")} className="inline-flex min-h-11 items-center">
            Forgot the password?
          </Link>
          <Link to={href("/sign-up")} className="inline-flex min-h-11 items-center">
            New here? Set up your shop
          </Link>
        </>
      }
    >
      <Form method="post" className="grid gap-5">
        {reset && !actionData ? <p role="status">The new password is set. Sign in with it.</p> : null}
        <FormProblem refusal={actionData} />
        <Field
          label="E-mail"
          name="email"
          type="email"
          autoComplete="username"
          required
          refusal={actionData}
        />
        <Field
          label="Password"
          name="password"
          type="password"
          autoComplete="current-password"
          required
          refusal={actionData}
        />
        <Button className="justify-self-start">Sign in</Button>
      </Form>
    </Door>
  );
}
