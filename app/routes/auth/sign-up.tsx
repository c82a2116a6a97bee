import { data, Form, href, Link, redirect } from "react-router";
import { z } from "zod";
import { emailField, nameField } from "~/auth/email";
import { newPassword } from "~/auth/password";
import { readSession, startSession } from "~/auth/session.server";
import { signUp } from "~/auth/sign-up.server";
import { Door } from "~/components/frame/door";
import { Button } from "~/components/ui/button";
import { Field, FormProblem, Select } from "~/components/ui/field";
import { anonymousContext } from "~/context";
import { oneLine } from "~/forms/one-line";
import { parseForm, refuse } from "~/forms/parse-form";
import { COUNTRIES, COUNTRY_CODES, TIME_ZONES } from "~/shops/country";
import type { Route } from "./+types/sign-up";

const NewShop = z.object({
  shopName: oneLine("Name your shop."),
  country: z.enum(COUNTRY_CODES, "Choose a country."),
  timeZone: z.enum(["", ...TIME_ZONES], "Choose a time zone."),
  name: nameField,
  email: emailField,
  password: newPassword,
});

export function meta() {
  return [{ title: "Set up your shop · Castlenut" }];
}

export async function loader({ request, context }: Route.LoaderArgs) {
  if (await readSession(context.get(anonymousContext), request, Date.now())) throw redirect(href("/"));
  return null;
}

export async function action({ request, context }: Route.ActionArgs) {
  const from = context.get(anonymousContext);
  if (await readSession(from, request, Date.now())) return redirect(href("/"));
  const fields = await request.formData();
  const form = parseForm(NewShop, fields);
  if (!form.ok) return data(form, { status: 400 });
  const { timeZone, ...order } = form.value;
  const made = await signUp(
    from,
    { ...order, timeZone: timeZone || COUNTRIES[order.country].timeZone },
    Date.now(),
  );
  if (!made.ok) return data(refuse(fields, { email: made.sentence }), { status: 409 });
  const cookie = await startSession(from, made.userId, request, Date.now());
  return redirect(href("/"), { headers: { "Set-Cookie": cookie } });
}

export default function SignUp({ actionData }: Route.ComponentProps) {
  return (
    <Door
      title="Set up your shop"
      foot={
        <Link to={href("/sign-in")} className="inline-flex min-h-11 items-center">
          Already on the team? Sign in
        </Link>
      }
    >
      <Form method="post" className="grid gap-5">
        <FormProblem refusal={actionData} />
        <Field
          label="Name of the shop"
          name="shopName"
          autoComplete="organization"
          required
          refusal={actionData}
        />
        <Select
          label="Country"
          name="country"
          refusal={actionData}
          defaultValue="US"
          hint="Decides which units come first and which gallon is meant."
          options={COUNTRY_CODES.map((code) => ({ value: code, label: COUNTRIES[code].name }))}
        />
        <Select
          label="Time zone"
          name="timeZone"
          refusal={actionData}
          options={[
            { value: "", label: "The usual one of the country" },
            ...TIME_ZONES.map((zone) => ({ value: zone, label: zone.replace(/_/g, " ") })),
          ]}
        />
        <Field label="Your name" name="name" autoComplete="name" required refusal={actionData} />
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
          autoComplete="new-password"
          required
          hint="At least 10 characters. A few words in a row are easy to remember and hard to guess."
          refusal={actionData}
        />
        <Button className="justify-self-start">Set up the shop</Button>
      </Form>
    </Door>
  );
}
