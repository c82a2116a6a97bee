import { z } from "zod";
import { readId, requirePermission } from "~/auth/require.server";
import { scopeContext } from "~/context";
import { cancelUpload, completeUpload, signParts, uploadState } from "~/recordings/upload.server";
import type { Route } from "./+types/upload";

const Intent = z.discriminatedUnion("intent", [
  z.object({ intent: z.literal("sign"), parts: z.array(z.number().int()).min(1).max(20) }),
  z.object({ intent: z.literal("complete") }),
  z.object({ intent: z.literal("cancel") }),
]);

const answer = (result: { ok: true } | { ok: false; status: number; sentence: string }) =>
  result.ok
    ? Response.json(result)
    : Response.json({ ...result, error: result.sentence }, { status: result.status });

/** How far an upload is. */
export async function loader({ params, context }: Route.LoaderArgs) {
  const scope = context.get(scopeContext);
  requirePermission(scope, "recording:upload");
  return answer(await uploadState(scope, readId<"recording">(params.recordingId, "recording")));
}

/** Links for parts, completing, giving up. */
export async function action({ request, params, context }: Route.ActionArgs) {
  const scope = context.get(scopeContext);
  requirePermission(scope, "recording:upload");
  const recordingId = readId<"recording">(params.recordingId, "recording");
  const order = Intent.safeParse(await request.json().catch(() => null));
  if (!order.success)
    return Response.json({ error: "This request asks for nothing that an upload can do." }, { status: 400 });
  switch (order.data.intent) {
    case "sign":
      return answer(await signParts(scope, recordingId, order.data.parts));
    case "complete":
      return answer(await completeUpload(scope, recordingId, Date.now()));
    case "cancel":
      return answer(await cancelUpload(scope, recordingId, Date.now()));
    default:
      return order.data satisfies never;
  }
}
