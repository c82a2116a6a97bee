import { eq } from "drizzle-orm";
import { beforeAll, expect, test } from "vitest";
import { sessions, users } from "#drizzle/schema/index";
import { aDatabase, aScope, aShop, NOON } from "../../tests/support/factories";
import { setTestEnvironment } from "../../tests/support/environment";
import { endSession, endSessionsOf, readSession, startSession } from "./session.server";

const DAY = 86_400_000;

beforeAll(() => setTestEnvironment());

const request = (cookie?: string) =>
  new Request("http://localhost:3000/", cookie ? { headers: { Cookie: cookie } } : {});

/** Signs a person in and hands back the cookie as a browser would send it. */
async function signedIn() {
  const db = aDatabase();
  const scope = aScope(db, aShop(db, { preferredUnits: "metric" }), "trainee", { name: "Tom" });
  const header = await startSession({ db }, scope.userId, request(), NOON);
  return { db, scope, header, cookie: header.split(";")[0] ?? "" };
}

test("the cookie is signed, hidden from scripts and sent to this host alone", async () => {
  const { header, db, cookie } = await signedIn();
  expect(header).toMatch(/^__Host-castlenut=/);
  for (const part of ["HttpOnly", "Secure", "SameSite=Lax", "Path=/"]) expect(header).toContain(part);
  expect(await readSession({ db }, request(`${cookie}x`), NOON)).toBeUndefined();
  expect(await readSession({ db }, request(cookie.replace(/=../, "=zz")), NOON)).toBeUndefined();
  // The secret itself is nowhere in the database.
  const stored = db.select().from(sessions).get();
  expect(cookie).not.toContain(stored?.tokenHash);
});

test("a session gives the person's shop, role and units", async () => {
  const { db, scope, cookie } = await signedIn();
  const found = await readSession({ db }, request(cookie), NOON);
  expect(found?.scope).toMatchObject({ shopId: scope.shopId, userId: scope.userId, role: "trainee" });
  expect(found?.viewer).toMatchObject({ name: "Tom", units: "metric" });
});

test("the role is read at every request, and who left is out at once", async () => {
  const { db, scope, cookie } = await signedIn();
  db.update(users).set({ role: "instructor" }).where(eq(users.id, scope.userId)).run();
  expect((await readSession({ db }, request(cookie), NOON))?.scope.role).toBe("instructor");
  db.update(users).set({ leftAt: NOON }).where(eq(users.id, scope.userId)).run();
  expect(await readSession({ db }, request(cookie), NOON)).toBeUndefined();
});

test("a session ends after 90 days without a visit, and lives on with visits", async () => {
  const { db, cookie } = await signedIn();
  expect(await readSession({ db }, request(cookie), NOON + 89 * DAY)).toBeDefined();
  expect(await readSession({ db }, request(cookie), NOON + 178 * DAY)).toBeDefined();
  expect(await readSession({ db }, request(cookie), NOON + 269 * DAY)).toBeUndefined();
});

test("a visit prolongs the cookie too, not more often than needed, and it opens the same session", async () => {
  const { db, cookie } = await signedIn();
  expect((await readSession({ db }, request(cookie), NOON + 60_000))?.renewedCookie).toBeUndefined();
  const later = await readSession({ db }, request(cookie), NOON + DAY);
  expect(later?.renewedCookie).toMatch(/^__Host-castlenut=.*Max-Age=7776000/); // 90 days
  const renewed = later?.renewedCookie?.split(";")[0];
  expect((await readSession({ db }, request(renewed), NOON + DAY))?.sessionId).toBe(later?.sessionId);
});

test("when a person was last seen outlives the session", async () => {
  const { db, scope, cookie } = await signedIn();
  await readSession({ db }, request(cookie), NOON + DAY);
  await endSession({ db }, request(cookie));
  expect(db.select().from(users).where(eq(users.id, scope.userId)).get()?.lastSeenAt).toBe(NOON + DAY);
});

test("signing in clears away the person's expired sessions", async () => {
  const { db, scope } = await signedIn();
  await startSession({ db }, scope.userId, request(), NOON + 91 * DAY);
  expect(db.select().from(sessions).all()).toHaveLength(1);
});

test("signing in again renews the session of this device; signing out kills it", async () => {
  const { db, scope, cookie } = await signedIn();
  const renewed = (await startSession({ db }, scope.userId, request(cookie), NOON)).split(";")[0] ?? "";
  expect(await readSession({ db }, request(cookie), NOON)).toBeUndefined();
  expect(await readSession({ db }, request(renewed), NOON)).toBeDefined();
  await endSession({ db }, request(renewed));
  expect(await readSession({ db }, request(renewed), NOON)).toBeUndefined();
});

test("ending all sessions but one leaves that one", async () => {
  const { db, scope, cookie } = await signedIn();
  const phone = (await startSession({ db }, scope.userId, request(), NOON)).split(";")[0] ?? "";
  const kept = await readSession({ db }, request(phone), NOON);
  endSessionsOf({ db }, scope.userId, kept?.sessionId);
  expect(await readSession({ db }, request(cookie), NOON)).toBeUndefined();
  expect(await readSession({ db }, request(phone), NOON)).toBeDefined();
});
