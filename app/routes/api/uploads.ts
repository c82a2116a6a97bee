import { z } from "zod";
import { requirePermission } from "~/auth/require.server";
import { scopeContext } from "~/context";
import { beginUpload } from "~/recordings/upload.server";
import type { Route } from "./+types/uploads";

const Order = z.object({
  fileName: z.string().trim().min(1).max(255),
  sizeBytes: z.number().int().min(0),
  lastModified: z.number().int().min(0),
});

/** Begins an upload or goes on with one that was cut off: which parts storage has already. */
export async function action({ request, context }: Route.ActionArgs) {
  const scope = context.get(scopeContext);
  requirePermission(scope, "recording:upload");
  const order = Order.safeParse(await request.json().catch(() => null));
  if (!order.success)
    return Response.json({ error: "This upload names no file. Choose the file again." }, { status: 400 });
  const plan = await beginUpload(scope, order.data, Date.now());
  return plan.ok ? Response.json(plan) : Response.json({ error: plan.sentence }, { status: plan.status });
}
