import { eq } from "drizzle-orm";
import { beforeAll, expect, test } from "vitest";
import { sessions, users } from "#drizzle/schema/index";
import { setTestEnvironment } from "../../tests/support/environment";
import { aDatabase, aScope, aShop, NOON } from "../../tests/support/factories";
import { changePassword, endDevice, loadAccount, saveProfile } from "./account.server";
import { hashPassword, passwordFits } from "./password.server";
import { readSession, startSession } from "./session.server";

const COST = 4; // bcrypt's least: tests hash often

beforeAll(() => setTestEnvironment());

const from = (agent: string, cookie = "") =>
  new Request("http://localhost:3000/", { headers: { "User-Agent": agent, Cookie: cookie } });

/** A person signed in on a phone and a tablet. */
async function onTwoDevices() {
  const db = aDatabase();
  const scope = aScope(db, aShop(db), "trainee", { passwordHash: await hashPassword("ten letters", COST) });
  await startSession({ db }, scope.userId, from("tablet"), NOON);
  const cookie = (await startSession({ db }, scope.userId, from("phone"), NOON + 1)).split(";")[0] ?? "";
  const phone = (await readSession({ db }, from("phone", cookie), NOON + 1))?.sessionId;
  if (!phone) throw new Error("the phone is not signed in");
  return { db, scope, phone };
}

const devices = ({ scope, phone }: Awaited<ReturnType<typeof onTwoDevices>>) =>
  loadAccount(scope, phone, NOON + 2).devices;

test("one sees one's own devices, the present one marked, and signs the other out", async () => {
  const given = await onTwoDevices();
  expect(devices(given)).toMatchObject([
    { device: "phone", current: true },
    { device: "tablet", current: false },
  ]);
  const tablet = devices(given)[1]?.id;
  if (!tablet) throw new Error("no tablet");
  const colleague = aScope(given.db, given.scope.shopId, "owner");
  expect(endDevice(colleague, tablet)).toBe(false);
  expect(endDevice(given.scope, tablet)).toBe(true);
  expect(endDevice(given.scope, tablet)).toBe(false);
  expect(devices(given)).toMatchObject([{ device: "phone" }]);
});

test("a new password ends the other sessions; a wrong old one changes nothing", async () => {
  const given = await onTwoDevices();
  const { db, scope, phone } = given;
  const refused = await changePassword(scope, phone, { old: "ten lettres", password: "another one" }, COST);
  expect(refused).toEqual({ ok: false, sentence: "This is not your present password." });
  expect(devices(given)).toHaveLength(2);
  await changePassword(scope, phone, { old: "ten letters", password: "another one" }, COST);
  expect(devices(given)).toMatchObject([{ device: "phone" }]);
  const hash = db.select().from(users).where(eq(users.id, scope.userId)).get()?.passwordHash;
  expect(await passwordFits("another one", hash)).toBe(true);
});

test("the profile is one's own: nobody else's row changes", async () => {
  const { db, scope, phone } = await onTwoDevices();
  const colleague = aScope(db, scope.shopId, "trainee", { name: "Ida" });
  const profile = {
    name: "Tom O",
    preferredUnits: "metric",
    mailAssignments: false,
    mailQuestions: true,
  } as const;
  saveProfile(scope, profile);
  expect(loadAccount(scope, phone, NOON)).toMatchObject(profile);
  expect(loadAccount(colleague, phone, NOON)).toMatchObject({
    name: "Ida",
    preferredUnits: null,
    mailAssignments: true,
  });
  expect(db.select().from(sessions).all()).toHaveLength(2);
});
