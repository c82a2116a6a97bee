import { redirect } from "react-router";
import { z } from "zod";
import { localPath } from "~/auth/local-path";
import { setUnits } from "~/auth/set-units.server";
import { scopeContext } from "~/context";
import { parseForm } from "~/forms/parse-form";
import type { Route } from "./+types/units";

const Units = z.object({
  units: z.enum(["metric", "inch"]),
  to: z.string().catch("/").transform(localPath),
});

/** The switch in the frame: which unit comes first for this person. */
export async function action({ request, context }: Route.ActionArgs) {
  const form = parseForm(Units, await request.formData());
  if (!form.ok) return new Response("Choose N·m or lbf·ft.", { status: 400 });
  setUnits(context.get(scopeContext), form.value.units);
  return redirect(form.value.to);
}
