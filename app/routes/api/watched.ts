import { z } from "zod";
import { requirePermission } from "~/auth/require.server";
import { scopeContext } from "~/context";
import { recordWatched } from "~/training/record-watched.server";
import type { LessonId, RecordingId, RevisionId } from "#drizzle/schema/ids";
import type { Route } from "./+types/watched";

const id = z.string().regex(/^[0-9A-HJKMNP-TV-Z]{26}$/);
const ms = z
  .number()
  .min(0)
  .max(24 * 3_600_000)
  .transform(Math.round);
const Watched = z.object({
  lessonId: id.transform((text) => text as LessonId),
  revisionId: id.transform((text) => text as RevisionId),
  stretches: z
    .array(z.object({ recordingId: id.transform((text) => text as RecordingId), fromMs: ms, toMs: ms }))
    .min(1)
    .max(200),
});

const LONGEST_BODY = 64_000;

/** The player tells what was played. Sent also while the page goes away, so the answer is short. */
export async function action({ request, context }: Route.ActionArgs) {
  const scope = context.get(scopeContext);
  requirePermission(scope, "lesson:watch");
  const text = await request.text();
  let body: unknown;
  try {
    body = text.length > LONGEST_BODY ? undefined : JSON.parse(text);
  } catch {
    body = undefined;
  }
  const order = Watched.safeParse(body);
  if (!order.success) return Response.json({ error: "These stretches cannot be read." }, { status: 400 });
  const result = recordWatched(scope, order.data, Date.now());
  if (!result.ok) return Response.json({ error: result.sentence }, { status: result.status });
  return Response.json({ kept: result.kept });
}
