import { expect, test } from "vitest";
import { outbox, signOffs } from "#drizzle/schema/index";
import { aDatabase, aScope, aShop, NOON } from "../../tests/support/factories";
import { aPublishedLesson, confirm, publish, SIXTY_FIVE, torque } from "../../tests/support/published-lesson";
import { setValues } from "../../tests/support/factories";
import { loadSkills } from "./load-skills.server";
import {
  giveSignOff,
  openRequests,
  requestSignOff,
  revokeSignOff,
  signOffsOf,
  withdrawRequest,
  type SignOffOrder,
} from "./sign-off.server";
import { skillDetail, skillsTable } from "./skills-table.server";

const ORIGIN = "https://training.example";

function aTeam() {
  const db = aDatabase();
  const shopId = aShop(db, { shownJobs: 2, timeZone: "UTC" });
  const marta = aScope(db, shopId, "instructor", { name: "Marta" });
  const dario = aScope(db, shopId, "instructor", { name: "Dario" });
  const tom = aScope(db, shopId, "trainee", { name: "Tom" });
  const lesson = aPublishedLesson(
    marta,
    dario,
    [{ mark: { component: "pulley bolt", componentKey: "pulley-bolt" }, values: [SIXTY_FIVE] }],
    { title: "Belt" },
  );
  const order: SignOffOrder = {
    lessonId: lesson.lessonId,
    userId: tom.userId,
    level: "on-own",
    presence: "all-the-time",
    shownOn: "2026-11-10",
    valuesSet: "Pulley bolt: 65 lbf·ft, wrench 4",
    note: "",
  };
  const state = () =>
    loadSkills(marta, { userIds: [tom.userId], lessonIds: [lesson.lessonId] }).get(
      `${tom.userId}:${lesson.lessonId}`,
    );
  return { db, shopId, marta, dario, tom, order, state, ...lesson };
}

test("two jobs on different days fill the third slot, two on one day do not", () => {
  const { marta, dario, order, state } = aTeam();
  expect(giveSignOff(marta, order, ORIGIN, NOON)).toEqual({ ok: true });
  expect(giveSignOff(dario, order, ORIGIN, NOON)).toEqual({ ok: true });
  expect(state()).toMatchObject({ shown: false, shownCount: 1 });
  giveSignOff(marta, { ...order, shownOn: "2026-11-12" }, ORIGIN, NOON);
  expect(state()).toMatchObject({ shown: true, shownCount: 2 });
});

test("with help is on record and fills no slot", () => {
  const { tom, marta, order, state } = aTeam();
  giveSignOff(marta, { ...order, level: "with-help" }, ORIGIN, NOON);
  expect(state()).toMatchObject({ shown: false, shownCount: 0 });
  expect(signOffsOf(marta, [tom.userId])).toHaveLength(1);
});

test("nobody signs off themselves, afterwards only does not count, values must be written down", () => {
  const { db, marta, order } = aTeam();
  expect(giveSignOff(marta, { ...order, userId: marta.userId }, ORIGIN, NOON)).toMatchObject({ ok: false });
  expect(giveSignOff(marta, { ...order, presence: "afterwards" }, ORIGIN, NOON)).toMatchObject({
    ok: false,
    field: "presence",
  });
  // The form as it opens names the torques; one of them left empty is not written down either.
  for (const valuesSet of ["  ", "Pulley bolt: ", "Wheel nuts: 80 lbf·ft\nPulley bolt: \n"])
    expect(giveSignOff(marta, { ...order, valuesSet }, ORIGIN, NOON), valuesSet).toMatchObject({
      ok: false,
      field: "valuesSet",
    });
  expect(giveSignOff(marta, { ...order, shownOn: "2026-11-13" }, ORIGIN, NOON)).toMatchObject({
    ok: false,
    field: "shownOn",
  });
  expect(db.select().from(signOffs).all()).toEqual([]);
});

test("the same sign-off posted twice counts once and mails once", () => {
  const { db, marta, order } = aTeam();
  giveSignOff(marta, order, ORIGIN, NOON);
  giveSignOff(marta, order, ORIGIN, NOON + 500);
  expect(db.select().from(signOffs).all()).toHaveLength(1);
  expect(db.select().from(outbox).all()).toHaveLength(1);
});

test("a request reaches both instructors once, is changed by asking again and answered by the sign-off", () => {
  const { db, tom, marta, lessonId, order } = aTeam();
  expect(requestSignOff(tom, { lessonId, doneOn: "2026-11-10", note: "bay 2" }, ORIGIN, NOON)).toEqual({
    ok: true,
  });
  requestSignOff(tom, { lessonId, doneOn: "2026-11-11", note: "bay 3" }, ORIGIN, NOON);
  expect(openRequests(marta)).toMatchObject([{ doneOn: "2026-11-11", note: "bay 3", name: "Tom" }]);
  expect(db.select().from(outbox).all()).toHaveLength(2);
  giveSignOff(marta, order, ORIGIN, NOON);
  expect(openRequests(marta)).toEqual([]);
  expect(requestSignOff(tom, { lessonId, doneOn: "2026-11-13", note: "" }, ORIGIN, NOON)).toMatchObject({
    ok: false,
    field: "doneOn",
  });
});

test("only the person who asked takes a request back", () => {
  const { tom, marta, lessonId } = aTeam();
  requestSignOff(tom, { lessonId, doneOn: "2026-11-10", note: "" }, ORIGIN, NOON);
  const [request] = openRequests(marta);
  if (!request) throw new Error("no request");
  expect(withdrawRequest(marta, request.id, NOON)).toBe(false);
  expect(withdrawRequest(tom, request.id, NOON)).toBe(true);
  expect(openRequests(marta)).toEqual([]);
});

test("a sign-off taken back no longer counts but stays in the record", () => {
  const { tom, marta, dario, order, state, db } = aTeam();
  giveSignOff(marta, order, ORIGIN, NOON);
  const [row] = signOffsOf(dario, [tom.userId]);
  if (!row) throw new Error("no sign-off");
  expect(revokeSignOff(aScope(db, aShop(db), "owner"), row.id, "no", ORIGIN, NOON)).toBe(false);
  expect(revokeSignOff(dario, row.id, "The wrong car", ORIGIN, NOON)).toBe(true);
  expect(revokeSignOff(dario, row.id, "again", ORIGIN, NOON)).toBe(false);
  expect(state()?.shownCount).toBe(0);
  expect(signOffsOf(dario, [tom.userId])).toMatchObject([{ takenBack: "The wrong car" }]);
  expect(() => db.delete(signOffs).run()).toThrow();
});

test("a changed value makes the skill rest on something old until it is answered again", () => {
  const { marta, dario, order, state, lessonId, markIds } = aTeam();
  giveSignOff(marta, order, ORIGIN, NOON);
  giveSignOff(marta, { ...order, shownOn: "2026-11-11" }, ORIGIN, NOON);
  expect(state()).toMatchObject({ shown: true, changedSince: false });
  setValues(marta, markIds[0] as never, [torque("70 lbf·ft", 70, "lbf·ft", 70 * 1.3558179483314)]);
  confirm(dario, lessonId, markIds[0] as never, NOON + 1);
  publish(marta, lessonId, NOON + 2);
  expect(state()).toMatchObject({ changedSince: true });
});

test("the table counts what it shows, and people and lessons of another shop are not in it", () => {
  const { db, tom, marta, order, lessonId } = aTeam();
  giveSignOff(marta, order, ORIGIN, NOON);
  giveSignOff(marta, { ...order, shownOn: "2026-11-11" }, ORIGIN, NOON);
  const none = { system: "", person: "", lesson: "" };
  const table = skillsTable(marta, none, NOON);
  expect(table.counts).toMatchObject({ shown: 1, of: 3 });
  expect(skillsTable(marta, { ...none, person: tom.userId }, NOON).rows).toHaveLength(1);
  const other = aScope(db, aShop(db), "owner");
  expect(skillsTable(other, none, NOON)).toMatchObject({ columns: [], counts: { of: 0 } });
  expect(skillDetail(other, tom.userId, lessonId, NOON)).toBeUndefined();
  expect(skillDetail(marta, tom.userId, lessonId, NOON)?.signOffs).toHaveLength(2);
});
