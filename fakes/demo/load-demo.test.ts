import { mkdtempSync, rmSync } from "node:fs";
import { tmpdir } from "node:os";
import { join } from "node:path";
import { and, eq, isNull } from "drizzle-orm";
import { afterAll, beforeAll, expect, test } from "vitest";
import type { Scope } from "~/auth/scope.server";
import { database } from "~/db.server";
import { allLearnerLessons } from "~/lessons/learner-lesson.server";
import { valuesText } from "~/lessons/values-text";
import { readQuantity } from "~/quantities/parse";
import { searchShop } from "~/search/search-shop.server";
import { lessons, marks, recordings, shops, users } from "#drizzle/schema/index";
import { setTestEnvironment } from "../../tests/support/environment";
import { startFakeS3, type FakeS3 } from "../s3/start-fake-s3";
import { loadDemo } from "./load-demo";
import { fossSwayBarLinks } from "./lessons/foss-sway-bar-links";

const folder = mkdtempSync(join(tmpdir(), "demo-"));
const NOW = Date.UTC(2026, 11, 1, 15);
let fake: FakeS3;

beforeAll(async () => {
  fake = await startFakeS3({
    root: join(folder, "objects"),
    port: 0,
    accessKeyId: "id",
    secretAccessKey: "secret",
    origins: ["*"],
    buckets: ["films"],
  });
  setTestEnvironment({
    S3_ENDPOINT: fake.url,
    S3_PUBLIC_ENDPOINT: fake.url,
    DATABASE_FILE: join(folder, "demo.db"),
  });
  await loadDemo(NOW);
}, 120_000);

afterAll(async () => {
  database().close();
  await fake.close();
  rmSync(folder, { recursive: true, force: true });
});

function scopeOf(email: string): Scope {
  const user = database().db.select().from(users).where(eq(users.email, email)).get();
  if (!user) throw new Error(`no ${email}`);
  return { db: database().db, shopId: user.shopId, userId: user.id, role: user.role };
}

test("the shop has people of each role, six published lessons or more and one half-done on the bench", () => {
  const { db, shopId } = scopeOf("owner@harrowlane.example");
  const rows = db.select().from(lessons).where(eq(lessons.shopId, shopId)).all();
  expect(rows.filter(({ newestRevision }) => newestRevision !== null).length).toBeGreaterThanOrEqual(6);
  expect(rows.filter(({ newestRevision }) => newestRevision === null)).toHaveLength(1);
  const roles = db.select({ role: users.role }).from(users).where(eq(users.shopId, shopId)).all();
  expect(new Set(roles.map(({ role }) => role))).toEqual(new Set(["owner", "instructor", "trainee"]));
  expect(db.select().from(shops).all()).toHaveLength(2);
  expect(
    db
      .select()
      .from(recordings)
      .all()
      .every(({ state }) => state === "ready"),
  ).toBe(true);
});

test("loading again changes nothing", async () => {
  const { db } = scopeOf("owner@harrowlane.example");
  const before = db.select().from(lessons).all();
  expect(await loadDemo(NOW + 1000)).toHaveLength(4);
  expect(db.select().from(lessons).all()).toEqual(before);
});

test("no two lessons publish different values for one component of one vehicle", () => {
  const scope = scopeOf("owner@harrowlane.example");
  const written = new Map<string, Set<string>>();
  for (const { snapshot, marks: found } of allLearnerLessons(scope))
    for (const { mark } of found) {
      if (mark.kind !== "torque" || mark.componentKey === "") continue;
      for (const vehicle of snapshot.vehicles) {
        const place = `${vehicle.make} ${vehicle.model}/${mark.componentKey}/${mark.side}/${mark.position}/${mark.applies.variant}`;
        written.set(place, (written.get(place) ?? new Set()).add(valuesText(mark.values)));
      }
    }
  expect(written.size).toBeGreaterThan(10);
  expect([...written].filter(([, values]) => values.size > 1)).toEqual([]);
});

test("every published torque has a source and a second person's check, and nothing is in pencil", () => {
  const scope = scopeOf("owner@harrowlane.example");
  for (const { marks: found } of allLearnerLessons(scope))
    for (const { mark, showing } of found)
      if (mark.kind === "torque")
        expect([mark.component, showing, mark.source !== null]).toEqual([mark.component, "checked", true]);
  const pencilled = scope.db
    .select()
    .from(marks)
    .where(and(eq(marks.state, "pencilled"), isNull(marks.erasedAt)))
    .all();
  expect(pencilled).toEqual([]);
});

test("65 lbf·ft on M12 × 1.75 class 8.8 is 75 % of proof load at K 0.20 and all of it at K 0.15", () => {
  const torque = fossSwayBarLinks.marks.find(
    (mark) => mark.kind === "torque" && mark.component === "Lower link nut to bar",
  );
  expect(torque).toMatchObject({ value: "65 lbf·ft", thread: "M12x1.75", propertyClass: "8.8" });
  const read = readQuantity("65 lbf·ft");
  if (!read.ok) throw new Error(read.error);
  // ISO 898-1: stress area of M12 84.3 mm², stress under proof load of class 8.8 up to 16 mm 580 MPa; T = K · D · F.
  const proofLoad = 84.3 * 580;
  const share = (k: number) => read.quantity.si / (k * 0.012) / proofLoad;
  expect(share(0.2)).toBeCloseTo(0.75, 2);
  expect(share(0.15)).toBeCloseTo(1.0, 2);
});

test("sway bar link torque answers with the value of the Meridian, and the second shop finds nothing of it", () => {
  const trainee = scopeOf("trainee@harrowlane.example");
  const [first] = searchShop(trainee, "sway bar link torque", "", 5).answers;
  expect(first?.found.mark.kind).toBe("torque");
  expect(valuesText(first?.found.mark.values ?? [])).toBe("43 lbf·ft");
  const other = searchShop(scopeOf("owner@northgate.example"), "sway bar link torque", "", 5);
  expect([other.answers, other.elsewhere, other.moments]).toEqual([[], [], []]);
});
