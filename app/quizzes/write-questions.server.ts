import { and, desc, eq, isNull, lt } from "drizzle-orm";
import type { Database } from "~/db.server";
import type { Mark } from "~/lessons/mark";
import { readSnapshot, type Snapshot } from "~/lessons/snapshot";
import type { QuestionId, RevisionId, ShopId } from "#drizzle/schema/ids";
import { questions, questionVersions, revisions, shops } from "#drizzle/schema/index";
import type { QuestionDraft } from "./question";
import { questionsOf } from "./questions-of";

type InShop = Readonly<{ db: Database; shopId: ShopId }>;

/** How many earlier revisions are searched for values that are replaced by now. */
const FORMER_REVISIONS = 5;

function formerMarks(scope: InShop, snapshot: Snapshot, revisionId: RevisionId): Mark[] {
  const current = scope.db
    .select({ n: revisions.n })
    .from(revisions)
    .where(eq(revisions.id, revisionId))
    .get();
  return scope.db
    .select({ snapshot: revisions.snapshot })
    .from(revisions)
    .where(
      and(
        eq(revisions.shopId, scope.shopId),
        eq(revisions.lessonId, snapshot.lessonId),
        lt(revisions.n, current?.n ?? 0),
      ),
    )
    .orderBy(desc(revisions.n))
    .limit(FORMER_REVISIONS)
    .all()
    .flatMap((row) => [...readSnapshot(row.snapshot).marks]);
}

/** A value in two questions of one quiz would answer itself: of each mark one question is asked. */
function oneEach(drafts: readonly QuestionDraft[]): QuestionDraft[] {
  // Every third mark with choices is asked as a choice, so that a quiz is not all typing.
  let withChoices = 0;
  const chosen: QuestionDraft[] = [];
  for (const draft of drafts) {
    if (draft.kind === "choice") continue;
    const choice = drafts.find((other) => other.kind === "choice" && other.markId === draft.markId);
    if (choice) withChoices += 1;
    chosen.push(choice && withChoices % 3 === 0 ? choice : draft);
  }
  return chosen;
}

/**
 * Writes the questions of a new revision: the question of a mark lives on, what it asks is a new version. Questions
 * whose mark is gone are retired. Call it in the transaction that publishes, after the revision row is written.
 */
export function writeQuestions(scope: InShop, snapshot: Snapshot, revisionId: RevisionId, now: number): void {
  const shop = scope.db
    .select({ units: shops.preferredUnits })
    .from(shops)
    .where(eq(shops.id, scope.shopId))
    .get();
  const [vehicle] = snapshot.vehicles;
  const drafts = oneEach(
    questionsOf(snapshot.marks, formerMarks(scope, snapshot, revisionId), {
      vehicle: snapshot.vehicles.length === 1 && vehicle ? `${vehicle.make} ${vehicle.model}` : "",
      prefer: shop?.units ?? "inch",
    }),
  );
  const known = scope.db
    .select()
    .from(questions)
    .where(and(eq(questions.shopId, scope.shopId), eq(questions.lessonId, snapshot.lessonId)))
    .all();
  const kept = new Set<QuestionId>();
  drafts.forEach((draft, n) => {
    const stable =
      known.find((row) => row.markId === draft.markId && row.kind === draft.kind) ??
      scope.db
        .insert(questions)
        .values({
          shopId: scope.shopId,
          lessonId: snapshot.lessonId,
          markId: draft.markId,
          kind: draft.kind,
          createdAt: now,
        })
        .returning()
        .get();
    kept.add(stable.id);
    scope.db
      .insert(questionVersions)
      .values({
        shopId: scope.shopId,
        questionId: stable.id,
        revisionId,
        n: n + 1,
        prompt: draft.prompt,
        safetyCritical: draft.safetyCritical,
        recordingId: draft.recordingId,
        atMs: draft.atMs,
        asked: draft.asked,
        choices: draft.choices,
      })
      .run();
  });
  for (const row of known)
    if (!kept.has(row.id) && row.retiredAt === null)
      scope.db
        .update(questions)
        .set({ retiredAt: now })
        .where(and(eq(questions.id, row.id), isNull(questions.retiredAt)))
        .run();
}
