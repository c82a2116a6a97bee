import { eq } from "drizzle-orm";
import { beforeAll, expect, test } from "vitest";
import { auditLog, invitations, outbox, sessions, shops, users } from "#drizzle/schema/index";
import type { InvitationId } from "#drizzle/schema/ids";
import { aDatabase, aPerson, aScope, aShop, NOON } from "../../tests/support/factories";
import { setTestEnvironment } from "../../tests/support/environment";
import { changePassword } from "./account.server";
import {
  acceptInvitation,
  findInvitation,
  invite,
  openInvitations,
  resendInvitation,
  withdrawInvitation,
} from "./invitations.server";
import { newPassword } from "./password";
import { hashPassword, passwordFits } from "./password.server";
import { askForReset, findReset, resetPassword } from "./reset-password.server";
import { requireSameOrigin } from "./same-origin.server";
import { startSession } from "./session.server";
import { signInAuthenticator, SignInRefused } from "./sign-in.server";
import { signUp } from "./sign-up.server";
import { changeRole, listTeam, removePerson } from "./team.server";

const ORIGIN = "https://training.example";
const COST = 4; // bcrypt's least: tests hash often
const HOUR = 3_600_000;

beforeAll(() => setTestEnvironment());

const newShop = {
  shopName: "Lane",
  country: "GB",
  timeZone: "Europe/London",
  name: "Hannah",
  email: "hannah@lane.example",
  password: "ten letters",
} as const;

const signIn = (db: ReturnType<typeof aDatabase>, email: string, password: string) =>
  signInAuthenticator({ db }).authenticate(
    "form",
    new Request("http://localhost:3000/sign-in", {
      method: "POST",
      body: new URLSearchParams({ email, password }),
    }),
  );

/** The secret of the newest mailed link. */
function mailedSecret(db: ReturnType<typeof aDatabase>): string {
  return (
    /\/(?:reset-password|invitation)\/(\S+)/.exec(db.select().from(outbox).all().at(-1)?.text ?? "")?.[1] ??
    ""
  );
}

test("signing up makes a shop and its owner, once for an address", async () => {
  const db = aDatabase();
  const made = await signUp({ db }, newShop, NOON, COST);
  expect(made.ok).toBe(true);
  expect(db.select().from(users).get()).toMatchObject({ role: "owner", email: "hannah@lane.example" });
  expect(db.select().from(shops).get()).toMatchObject({ country: "GB", preferredUnits: "metric" });
  expect(await signUp({ db }, { ...newShop, shopName: "Again" }, NOON, COST)).toMatchObject({ ok: false });
  expect(db.select().from(shops).all()).toHaveLength(1);
});

test("the same form sent twice is one shop; later, or with another password, the address is taken", async () => {
  const db = aDatabase();
  const both = await Promise.all([
    signUp({ db }, newShop, NOON, COST),
    signUp({ db }, newShop, NOON + 200, COST),
  ]);
  expect(both[0]).toMatchObject({ ok: true });
  expect(both[1]).toEqual(both[0]);
  expect(db.select().from(shops).all()).toHaveLength(1);
  expect(await signUp({ db }, { ...newShop, password: "ten lettres" }, NOON + 200, COST)).toMatchObject({
    ok: false,
  });
  expect(await signUp({ db }, newShop, NOON + HOUR, COST)).toEqual({
    ok: false,
    sentence: "That e-mail already has an account. Sign in, or use another.",
  });
});

test("the right password opens, in any spelling of the address; a wrong one and an unknown address say the same", async () => {
  const db = aDatabase();
  await signUp({ db }, newShop, NOON, COST);
  expect(await signIn(db, " Hannah@LANE.example ", "ten letters")).toBeTruthy();
  const refusals = await Promise.all(
    [signIn(db, "hannah@lane.example", "ten lettres"), signIn(db, "nobody@lane.example", "ten letters")].map(
      (work) => work.catch((error: unknown) => error),
    ),
  );
  expect(refusals.every((error) => error instanceof SignInRefused)).toBe(true);
  expect((refusals[0] as Error).message).toBe((refusals[1] as Error).message);
});

test("after ten wrong passwords even the right one has to wait", async () => {
  const db = aDatabase();
  await signUp({ db }, { ...newShop, email: "often@lane.example" }, NOON, COST);
  for (let tries = 0; tries < 10; tries += 1)
    await signIn(db, "often@lane.example", "wrong").catch(() => undefined);
  await expect(signIn(db, "often@lane.example", "ten letters")).rejects.toThrow("Too many tries");
  // As the sentence says, a reset opens the door at once.
  askForReset({ db }, "often@lane.example", ORIGIN, NOON);
  await resetPassword({ db }, mailedSecret(db), "another one", NOON, COST);
  expect(await signIn(db, "often@lane.example", "another one")).toBeTruthy();
});

test("tries at the same moment are counted too", async () => {
  const db = aDatabase();
  await signUp({ db }, { ...newShop, email: "burst@lane.example" }, NOON, COST);
  const tries = Array.from({ length: 14 }, () =>
    signIn(db, "burst@lane.example", "wrong").catch((error: unknown) => String(error)),
  );
  const refusals = await Promise.all(tries);
  expect(refusals.filter((refusal) => String(refusal).includes("Too many tries"))).toHaveLength(4);
});

test("a password over 72 bytes is refused with the reason, however few letters it has", () => {
  expect(newPassword.safeParse("a".repeat(72)).success).toBe(true);
  expect(newPassword.safeParse("a".repeat(73)).error?.issues[0]?.message).toContain("72 bytes");
  expect(newPassword.safeParse("ü".repeat(37)).error?.issues[0]?.message).toContain("72 bytes");
  expect(newPassword.safeParse("short").error?.issues[0]?.message).toContain("at least 10");
});

test("a password of 72 bytes with something behind it does not open", async () => {
  const hash = await hashPassword("a".repeat(72), COST);
  expect(await passwordFits("a".repeat(72), hash)).toBe(true);
  expect(await passwordFits("a".repeat(73), hash)).toBe(false);
});

test("a reset link works once, within two hours, and an unknown address is told nothing else", async () => {
  const db = aDatabase();
  await signUp({ db }, newShop, NOON, COST);
  askForReset({ db }, "nobody@lane.example", ORIGIN, NOON);
  expect(db.select().from(outbox).all()).toEqual([]);
  askForReset({ db }, newShop.email, ORIGIN, NOON);
  const secret = mailedSecret(db);
  expect(findReset({ db }, secret, NOON + 3 * HOUR)).toBeUndefined();
  expect(await resetPassword({ db }, secret, "another one", NOON + HOUR, COST)).toBeTruthy();
  expect(await resetPassword({ db }, secret, "a third one", NOON + HOUR, COST)).toBeUndefined();
  expect(await signIn(db, newShop.email, "another one")).toBeTruthy();
});

test("a reset ends every session and every other link of the person, and nobody else's", async () => {
  const db = aDatabase();
  const made = await signUp({ db }, newShop, NOON, COST);
  const other = aScope(db, aShop(db), "trainee");
  const visit = new Request("http://localhost:3000/");
  if (made.ok) await startSession({ db }, made.userId, visit, NOON);
  await startSession({ db }, other.userId, visit, NOON);
  askForReset({ db }, newShop.email, ORIGIN, NOON);
  const first = mailedSecret(db);
  askForReset({ db }, newShop.email, ORIGIN, NOON);
  await resetPassword({ db }, mailedSecret(db), "another one", NOON, COST);
  expect(
    db
      .select()
      .from(sessions)
      .all()
      .map(({ userId }) => userId),
  ).toEqual([other.userId]);
  expect(findReset({ db }, first, NOON)).toBeUndefined();
});

test("three reset mails an hour are enough", async () => {
  const db = aDatabase();
  await signUp({ db }, newShop, NOON, COST);
  for (let n = 0; n < 6; n += 1) askForReset({ db }, newShop.email, ORIGIN, NOON + n * 1000);
  expect(db.select().from(outbox).all()).toHaveLength(3);
});

test("changing the password asks for the present one", async () => {
  const db = aDatabase();
  const scope = aScope(db, aShop(db), "trainee", { passwordHash: await hashPassword("ten letters", COST) });
  const session = "session" as Parameters<typeof changePassword>[1];
  expect(await changePassword(scope, session, { old: "wrong", password: "another one" }, COST)).toMatchObject(
    { ok: false },
  );
  expect(await changePassword(scope, session, { old: "ten letters", password: "another one" }, COST)).toEqual(
    { ok: true },
  );
});

test("an invitation lets one person in, once, with the role it names", async () => {
  const db = aDatabase();
  const owner = aScope(db, aShop(db, { name: "Lane" }), "owner");
  expect(invite(owner, { name: "Tom", email: "tom@lane.example", role: "instructor" }, ORIGIN, NOON)).toEqual(
    { ok: true },
  );
  const secret = mailedSecret(db);
  expect(findInvitation({ db }, secret, NOON)).toMatchObject({
    state: "open",
    shop: "Lane",
    role: "instructor",
  });
  expect(findInvitation({ db }, secret, NOON + 14 * 24 * HOUR - 1)).toMatchObject({ state: "open" });
  expect(findInvitation({ db }, secret, NOON + 14 * 24 * HOUR)).toEqual({ state: "expired" });
  expect(
    await acceptInvitation(
      { db },
      secret,
      { name: "Tom O", password: "ten letters" },
      NOON + 14 * 24 * HOUR,
      COST,
    ),
  ).toBeUndefined();
  expect(
    await acceptInvitation({ db }, secret, { name: "Tom O", password: "ten letters" }, NOON, COST),
  ).toMatchObject({ ok: true });
  expect(
    await acceptInvitation({ db }, secret, { name: "Tom O", password: "ten letters" }, NOON, COST),
  ).toBeUndefined();
  expect(findInvitation({ db }, secret, NOON)).toEqual({ state: "accepted" });
  expect(db.select().from(users).where(eq(users.email, "tom@lane.example")).get()).toMatchObject({
    role: "instructor",
    shopId: owner.shopId,
  });
});

test("sending again ends the former link; withdrawing ends both", async () => {
  const db = aDatabase();
  const owner = aScope(db, aShop(db), "owner");
  invite(owner, { name: "Tom", email: "tom@lane.example", role: "trainee" }, ORIGIN, NOON);
  const first = mailedSecret(db);
  const id = openInvitations(owner)[0]?.id as InvitationId;
  expect(resendInvitation(aScope(db, aShop(db), "owner"), id, ORIGIN, NOON)).toBe(false);
  expect(resendInvitation(owner, id, ORIGIN, NOON)).toBe(true);
  const second = mailedSecret(db);
  expect(findInvitation({ db }, first, NOON)).toEqual({ state: "unknown" });
  expect(findInvitation({ db }, second, NOON)).toMatchObject({ state: "open" });
  expect(withdrawInvitation(aScope(db, aShop(db), "owner"), id, NOON)).toBe(false);
  expect(withdrawInvitation(owner, id, NOON)).toBe(true);
  expect(findInvitation({ db }, second, NOON)).toEqual({ state: "withdrawn" });
});

test("an address with an account anywhere is refused in the same words", () => {
  const db = aDatabase();
  const owner = aScope(db, aShop(db), "owner");
  aPerson(db, owner.shopId, "trainee", { email: "here@lane.example" });
  aPerson(db, aShop(db), "trainee", { email: "there@lane.example" });
  const here = invite(owner, { name: "A", email: "here@lane.example", role: "trainee" }, ORIGIN, NOON);
  const there = invite(owner, { name: "B", email: "there@lane.example", role: "trainee" }, ORIGIN, NOON);
  expect(here).toEqual({
    ok: false,
    sentence: "That e-mail already has an account with Castlenut; it can't be invited twice.",
  });
  expect(there).toEqual(here);
  expect(db.select().from(invitations).all()).toEqual([]);
});

test("who left and is invited again gets the former row, and with it the records", async () => {
  const db = aDatabase();
  const owner = aScope(db, aShop(db), "owner");
  const tom = aPerson(db, owner.shopId, "trainee", { email: "tom@lane.example" });
  expect(removePerson(owner, tom, NOON)).toEqual({ ok: true });
  expect(listTeam(owner).left).toHaveLength(1);
  invite(owner, { name: "Tom", email: "tom@lane.example", role: "instructor" }, ORIGIN, NOON);
  expect(
    await acceptInvitation({ db }, mailedSecret(db), { name: "Tom", password: "ten letters" }, NOON, COST),
  ).toEqual({ ok: true, userId: tom });
  expect(listTeam(owner).left).toEqual([]);
});

test("who leaves takes the address along: another shop may invite it, and the first then may not", async () => {
  const db = aDatabase();
  const [first, second] = [aScope(db, aShop(db), "owner"), aScope(db, aShop(db), "owner")];
  const tom = aPerson(db, first.shopId, "trainee", { email: "tom@lane.example" });
  const order = { name: "Tom", email: "tom@lane.example", role: "trainee" } as const;
  expect(invite(second, order, ORIGIN, NOON)).toMatchObject({ ok: false });
  removePerson(first, tom, NOON);
  expect(invite(second, order, ORIGIN, NOON)).toEqual({ ok: true });
  const secret = mailedSecret(db);
  expect(invite(first, order, ORIGIN, NOON)).toEqual({ ok: true });
  const former = mailedSecret(db);
  const given = { name: "Tom", password: "ten letters" };
  const joined = await acceptInvitation({ db }, secret, given, NOON, COST);
  expect(joined).toMatchObject({ ok: true });
  expect(joined).not.toMatchObject({ userId: tom });
  expect(await acceptInvitation({ db }, former, given, NOON, COST)).toMatchObject({ ok: false });
  expect(invite(first, order, ORIGIN, NOON)).toMatchObject({ ok: false });
  // The database itself refuses two accounts of one address.
  expect(() => db.update(users).set({ leftAt: null }).where(eq(users.id, tom)).run()).toThrow(/UNIQUE/);
  expect(listTeam(first).left.map(({ id }) => id)).toEqual([tom]);
});

test("every change of the team stands in the audit log of that shop, with who did it", async () => {
  const db = aDatabase();
  const owner = aScope(db, aShop(db), "owner", { name: "Hannah" });
  const order = { name: "Tom", email: "tom@lane.example", role: "trainee" } as const;
  invite(owner, order, ORIGIN, NOON);
  const id = openInvitations(owner)[0]?.id as InvitationId;
  resendInvitation(owner, id, ORIGIN, NOON + 1);
  withdrawInvitation(owner, id, NOON + 2);
  invite(owner, order, ORIGIN, NOON + 3);
  const given = { name: "Tom", password: "ten letters" };
  const joined = await acceptInvitation({ db }, mailedSecret(db), given, NOON + 4, COST);
  if (!joined?.ok) throw new Error("Tom did not join");
  changeRole(owner, joined.userId, "instructor", NOON + 5);
  changeRole(owner, joined.userId, "instructor", NOON + 6);
  removePerson(owner, joined.userId, NOON + 7);
  const rows = db.select().from(auditLog).orderBy(auditLog.at).all();
  expect(rows.map(({ actor, action, detail }) => `${actor} ${action}: ${detail}`)).toEqual([
    "Hannah invited: Tom as trainee",
    "Hannah invited again: Tom",
    "Hannah withdrew the invitation of: Tom",
    "Hannah invited: Tom as trainee",
    "Tom joined: Tom",
    "Hannah changed the role of: Tom: instructor",
    "Hannah removed: Tom",
  ]);
  expect(new Set(rows.map(({ shopId }) => shopId))).toEqual(new Set([owner.shopId]));
});

test("the last owner stays owner and stays", () => {
  const db = aDatabase();
  const owner = aScope(db, aShop(db), "owner");
  expect(changeRole(owner, owner.userId, "trainee", NOON)).toMatchObject({ ok: false, reason: "last-owner" });
  expect(removePerson(owner, owner.userId, NOON)).toMatchObject({ ok: false, reason: "last-owner" });
  const second = aPerson(db, owner.shopId, "trainee");
  expect(changeRole(owner, second, "owner", NOON)).toEqual({ ok: true });
  expect(removePerson(owner, owner.userId, NOON)).toEqual({ ok: true });
});

test("nobody of another shop is touched", () => {
  const db = aDatabase();
  const owner = aScope(db, aShop(db), "owner");
  const stranger = aPerson(db, aShop(db), "trainee");
  expect(changeRole(owner, stranger, "owner", NOON)).toEqual({ ok: false, reason: "missing" });
  expect(removePerson(owner, stranger, NOON)).toEqual({ ok: false, reason: "missing" });
  expect(listTeam(owner).people).toHaveLength(1);
});

test("only requests from our own pages may change anything", () => {
  const send = (method: string, headers: Record<string, string>) => () =>
    requireSameOrigin(new Request("https://training.example/x", { method, headers }), ORIGIN);
  expect(send("POST", { Origin: "https://training.example" })).not.toThrow();
  expect(send("POST", { "Sec-Fetch-Site": "same-origin" })).not.toThrow();
  expect(send("GET", { Origin: "https://evil.example" })).not.toThrow();
  for (const headers of [
    {},
    { Origin: "https://evil.example" },
    { "Sec-Fetch-Site": "cross-site" },
    { Origin: "null" },
  ])
    expect(send("POST", headers)).toThrow();
});
