import { data, Form, href, Link, redirect } from "react-router";
import { z } from "zod";
import { requirePermission } from "~/auth/require.server";
import { Button } from "~/components/ui/button";
import { Field, FormProblem, Select } from "~/components/ui/field";
import { Page, Remark, Sheet } from "~/components/ui/page";
import { scopeContext } from "~/context";
import { oneLine } from "~/forms/one-line";
import { parseForm } from "~/forms/parse-form";
import { COUNTRIES, COUNTRY_CODES, TIME_ZONES } from "~/shops/country";
import { loadShop, saveShop } from "~/shops/shop-settings.server";
import type { Route } from "./+types/settings";

const percent = (least: number) =>
  z.coerce
    .number(`Type a number from ${least} to 100.`)
    .int("Whole per cent only.")
    .min(least, `Type a number from ${least} to 100.`)
    .max(100, `Type a number from ${least} to 100.`)
    .transform((value) => value / 100);

const Settings = z.object({
  name: oneLine("Name your shop."),
  country: z.enum(COUNTRY_CODES, "Choose a country."),
  timeZone: z.enum(TIME_ZONES, "Choose a time zone."),
  preferredUnits: z.enum(["metric", "inch"], "Choose which unit comes first."),
  passMark: percent(1),
  watchThreshold: percent(1),
  shownJobs: z.coerce
    .number("Type a number from 1 to 10.")
    .int("Whole jobs only.")
    .min(1, "Type a number from 1 to 10.")
    .max(10, "Type a number from 1 to 10."),
});

export function meta() {
  return [{ title: "Shop settings · Castlenut" }];
}

export function loader({ context, url }: Route.LoaderArgs) {
  const scope = context.get(scopeContext);
  requirePermission(scope, "shop:edit");
  return { shop: loadShop(scope), saved: url.searchParams.has("saved") };
}

export async function action({ request, context }: Route.ActionArgs) {
  const scope = context.get(scopeContext);
  requirePermission(scope, "shop:edit");
  const form = parseForm(Settings, await request.formData());
  if (!form.ok) return data(form, { status: 400 });
  saveShop(scope, form.value, Date.now());
  return redirect(`${href("/settings")}?saved`);
}

export default function ShopSettings({ loaderData: { shop, saved }, actionData }: Route.ComponentProps) {
  const zones: readonly string[] = TIME_ZONES;
  return (
    <Page title="Shop settings" narrow>
      <nav aria-label="Settings" className="mb-5 flex flex-wrap gap-x-6">
        <Link to={href("/settings/tasks")} className="inline-flex min-h-11 items-center">
          Failed background tasks
        </Link>
        <Link to={href("/settings/audit")} className="inline-flex min-h-11 items-center">
          Who did what
        </Link>
      </nav>
      {saved && !actionData ? (
        <div role="status" className="mb-5">
          <Remark>Saved.</Remark>
        </div>
      ) : null}
      <Form method="post" className="grid gap-5">
        <FormProblem refusal={actionData} />
        <Sheet className="grid gap-5 p-5">
          <Field label="Name of the shop" name="name" defaultValue={shop.name} refusal={actionData} />
          <div className="grid gap-5 sm:grid-cols-2">
            <Select
              label="Country"
              name="country"
              defaultValue={shop.country}
              refusal={actionData}
              hint="Decides which pint and gallon are meant."
              options={COUNTRY_CODES.map((code) => ({ value: code, label: COUNTRIES[code].name }))}
            />
            <Select
              label="Time zone"
              name="timeZone"
              defaultValue={shop.timeZone}
              refusal={actionData}
              hint="Due dates are days in this zone."
              options={(zones.includes(shop.timeZone) ? zones : [shop.timeZone, ...zones]).map((zone) => ({
                value: zone,
                label: zone.replace(/_/g, " "),
              }))}
            />
          </div>
          <Select
            label="Which unit comes first"
            name="preferredUnits"
            defaultValue={shop.preferredUnits}
            refusal={actionData}
            hint="For people who have not chosen themselves. Plates always show both."
            options={[
              { value: "metric", label: "N·m, mm, kPa" },
              { value: "inch", label: "lbf·ft, in, psi" },
            ]}
          />
          <div className="grid gap-5 sm:grid-cols-3">
            <Field
              label="Pass mark, %"
              name="passMark"
              inputMode="numeric"
              defaultValue={Math.round(shop.passMark * 100)}
              refusal={actionData}
              hint="Safety-critical values must all be right."
            />
            <Field
              label="Watched, %"
              name="watchThreshold"
              inputMode="numeric"
              defaultValue={Math.round(shop.watchThreshold * 100)}
              refusal={actionData}
              hint="From here a lesson counts as seen."
            />
            <Field
              label="Jobs shown"
              name="shownJobs"
              inputMode="numeric"
              defaultValue={shop.shownJobs}
              refusal={actionData}
              hint="On different days, before a skill is shown."
            />
          </div>
        </Sheet>
        <div>
          <Button>Save</Button>
        </div>
      </Form>
    </Page>
  );
}
