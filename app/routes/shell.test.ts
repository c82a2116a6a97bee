import { RouterContextProvider } from "react-router";
import { beforeAll, expect, test } from "vitest";
import { startSession } from "~/auth/session.server";
import { anonymousContext, scopeContext } from "~/context";
import { sessions } from "#drizzle/schema/index";
import { setTestEnvironment } from "../../tests/support/environment";
import { aDatabase, aScope, aShop } from "../../tests/support/factories";
import { middleware } from "./shell";

beforeAll(() => setTestEnvironment());

/** Goes through the shell's middleware to an answer whose headers are closed, as those of a redirect may be. */
async function visit(db: ReturnType<typeof aDatabase>, path: string, cookie = "", method = "GET") {
  const url = new URL(path, "http://localhost:3000");
  const context = new RouterContextProvider();
  context.set(anonymousContext, { db });
  const request = new Request(url, { method, headers: { Cookie: cookie } });
  const within = async () => Response.redirect("http://localhost:3000/inside");
  const [step] = middleware;
  if (!step) throw new Error("the shell has no middleware");
  try {
    const answer = (await step({ request, url, context, params: {} } as never, within)) as Response;
    return { status: answer.status, headers: answer.headers, context };
  } catch (thrown) {
    if (thrown instanceof Response) return { status: thrown.status, headers: thrown.headers, context };
    const { init } = thrown as { init?: { status?: number } };
    return { status: init?.status ?? 0, headers: new Headers(), context };
  }
}

const to = ({ headers }: { headers: Headers }) => headers.get("Location");

test("nobody gets in: pages lead to sign-in and back, answers for programs are 401", async () => {
  const db = aDatabase();
  expect(to(await visit(db, "/search?q=plug"))).toBe("/sign-in?to=%2Fsearch%3Fq%3Dplug");
  expect(to(await visit(db, "/team.data"))).toBe("/sign-in?to=%2Fteam");
  expect(to(await visit(db, "/team", "", "POST"))).toBe("/sign-in?to=%2F");
  expect((await visit(db, "/api/search?q=plug")).status).toBe(401);
});

test("a signed-in visit carries its scope, and now and then a cookie that lives longer", async () => {
  const db = aDatabase();
  const scope = aScope(db, aShop(db), "trainee");
  const header = await startSession({ db }, scope.userId, new Request("http://localhost:3000/"), Date.now());
  const cookie = header.split(";")[0] ?? "";
  const first = await visit(db, "/team", cookie);
  expect(to(first)).toBe("http://localhost:3000/inside");
  expect(first.context.get(scopeContext)).toMatchObject({ userId: scope.userId, shopId: scope.shopId });
  expect(first.headers.get("Set-Cookie")).toBeNull();
  db.update(sessions)
    .set({ lastSeenAt: Date.now() - 3_600_000 })
    .run();
  const later = await visit(db, "/team", cookie);
  expect(later.headers.get("Set-Cookie")).toMatch(/^__Host-castlenut=.*Max-Age=/);
  expect(later.status).toBe(302);
});
