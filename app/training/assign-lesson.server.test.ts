import { eq } from "drizzle-orm";
import { expect, test } from "vitest";
import { assignments, auditLog, outbox, tasks, users } from "#drizzle/schema/index";
import { aDatabase, aLesson, aPerson, aScope, aShop, NOON } from "../../tests/support/factories";
import { aPublishedLesson, SIXTY_FIVE } from "../../tests/support/published-lesson";
import { assignable, assignLesson, withdrawAssignment } from "./assign-lesson.server";

const ORIGIN = "https://training.example";
const DAY = 86_400_000;

function aTeam() {
  const db = aDatabase();
  const shopId = aShop(db, { timeZone: "America/Chicago" });
  const owner = aScope(db, shopId, "owner", { name: "Hannah" });
  const instructor = aScope(db, shopId, "instructor");
  const [tom, ines] = [
    aPerson(db, shopId, "trainee", { name: "Tom" }),
    aPerson(db, shopId, "trainee", { name: "Ines" }),
  ];
  const { lessonId } = aPublishedLesson(
    instructor,
    owner,
    [{ mark: { component: "pulley bolt", componentKey: "pulley-bolt" }, values: [SIXTY_FIVE] }],
    { title: "Belt" },
  );
  return { db, shopId, owner, instructor, tom, ines, lessonId };
}

test("an assignment is written, mailed and audited once, also when the form is posted twice", () => {
  const { db, owner, tom, ines, lessonId } = aTeam();
  const order = { lessonId, userIds: [tom, ines], dueOn: "2026-11-20", note: "Before Friday" };
  expect(assignLesson(owner, order, ORIGIN, NOON)).toEqual({ ok: true, assigned: 2, moved: 0, unchanged: 0 });
  expect(assignLesson(owner, order, ORIGIN, NOON + 1000)).toEqual({
    ok: true,
    assigned: 0,
    moved: 0,
    unchanged: 2,
  });
  expect(db.select().from(assignments).all()).toHaveLength(2);
  const mails = db.select().from(outbox).all();
  expect(mails).toHaveLength(2);
  expect(mails[0]?.text).toContain("Fri 20 Nov 2026");
  expect(mails[0]?.text).toContain(`${ORIGIN}/lessons/${lessonId}`);
  expect(db.select().from(tasks).where(eq(tasks.kind, "send-mail")).all()).toHaveLength(2);
  expect(db.select().from(auditLog).where(eq(auditLog.action, "assigned")).all()).toHaveLength(2);
});

test("assigning again moves the due date and says so", () => {
  const { db, owner, tom, lessonId } = aTeam();
  assignLesson(owner, { lessonId, userIds: [tom], dueOn: "2026-11-20", note: "" }, ORIGIN, NOON);
  expect(
    assignLesson(owner, { lessonId, userIds: [tom], dueOn: "2026-11-27", note: "" }, ORIGIN, NOON),
  ).toMatchObject({ moved: 1 });
  expect(db.select().from(assignments).all()).toMatchObject([{ dueOn: "2026-11-27" }]);
  expect(db.select().from(outbox).all().at(-1)?.subject).toBe("New due date: Belt, Fri 27 Nov 2026");
});

test("a day in the past is refused by the shop's own calendar, today is not", () => {
  const { db, owner, tom, lessonId } = aTeam();
  // 03:00 UTC on the 13th is still the 12th in Chicago.
  const lateEvening = Date.UTC(2026, 10, 13, 3);
  expect(
    assignLesson(owner, { lessonId, userIds: [tom], dueOn: "2026-11-11", note: "" }, ORIGIN, lateEvening),
  ).toMatchObject({ ok: false, field: "dueOn" });
  expect(db.select().from(assignments).all()).toEqual([]);
  expect(
    assignLesson(owner, { lessonId, userIds: [tom], dueOn: "2026-11-12", note: "" }, ORIGIN, lateEvening),
  ).toMatchObject({ ok: true });
});

test("who has turned mails off gets none, and nobody mails themselves", () => {
  const { db, owner, tom, lessonId } = aTeam();
  db.update(users).set({ mailAssignments: false }).where(eq(users.id, tom)).run();
  assignLesson(
    owner,
    { lessonId, userIds: [tom, owner.userId], dueOn: "2026-11-20", note: "" },
    ORIGIN,
    NOON,
  );
  expect(db.select().from(outbox).all()).toEqual([]);
});

test("lessons and people of another shop, drafts and people who left are refused, and nothing is half-written", () => {
  const { db, owner, instructor, tom, lessonId } = aTeam();
  const elsewhere = aShop(db);
  const stranger = aPerson(db, elsewhere, "trainee");
  const draft = aLesson(instructor).lessonId;
  const left = aPerson(db, owner.shopId, "trainee", { leftAt: NOON - DAY });
  const due = { dueOn: "2026-11-20", note: "" };
  expect(assignLesson(owner, { lessonId, userIds: [tom, stranger], ...due }, ORIGIN, NOON)).toMatchObject({
    ok: false,
    field: "people",
  });
  expect(assignLesson(owner, { lessonId, userIds: [left], ...due }, ORIGIN, NOON)).toMatchObject({
    ok: false,
    field: "people",
  });
  expect(assignLesson(owner, { lessonId: draft, userIds: [tom], ...due }, ORIGIN, NOON)).toMatchObject({
    ok: false,
    field: "lesson",
  });
  const other = aScope(db, elsewhere, "owner");
  expect(assignLesson(other, { lessonId, userIds: [stranger], ...due }, ORIGIN, NOON)).toMatchObject({
    ok: false,
    field: "lesson",
  });
  expect(db.select().from(assignments).all()).toEqual([]);
  expect(db.select().from(outbox).all()).toEqual([]);
  expect(assignable(other).lessons).toEqual([]);
});

test("an assignment is withdrawn once, and only by its own shop", () => {
  const { db, owner, tom, lessonId } = aTeam();
  assignLesson(owner, { lessonId, userIds: [tom], dueOn: "2026-11-20", note: "" }, ORIGIN, NOON);
  const [row] = db.select().from(assignments).all();
  if (!row) throw new Error("no assignment");
  expect(withdrawAssignment(aScope(db, aShop(db), "owner"), row.id, NOON)).toBe(false);
  expect(withdrawAssignment(owner, row.id, NOON)).toBe(true);
  expect(withdrawAssignment(owner, row.id, NOON)).toBe(false);
});
