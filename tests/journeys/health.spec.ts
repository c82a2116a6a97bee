// The doors that other programs use, on the running application.
import { DEMO, expect, test } from "../support/journey";

test("healthz says that database and storage answer", async ({ request }) => {
  const answer = await request.get("/healthz");
  expect(answer.status()).toBe(200);
  expect(await answer.json()).toEqual({ ok: true });
});

test("every page carries its policy, and the cookie is bound to this host", async ({ somebody, request }) => {
  const page = await request.get("/sign-in");
  const policy = page.headers()["content-security-policy"] ?? "";
  expect(policy).toContain("default-src 'self'");
  expect(policy).toContain("frame-ancestors 'none'");
  expect(policy).toMatch(/script-src 'self' 'nonce-[^']+'/);
  expect(policy).not.toMatch(/script-src[^;]*unsafe/);
  expect(page.headers()["x-content-type-options"]).toBe("nosniff");
  expect(page.headers()["x-powered-by"]).toBeUndefined();
  const person = await somebody();
  const answer = await person.post("/sign-in", { email: DEMO.dario, password: "castlenut-demo" });
  expect(answer.headers()["set-cookie"]).toMatch(
    /^__Host-[^;]+;(?=.*Path=\/)(?=.*HttpOnly)(?=.*Secure)(?=.*SameSite=Lax)(?!.*Domain=)/,
  );
});

// 65 lbf·ft is 88.13 N·m: NIST SP 811, appendix B.8.
test("the search answers programs as it promises", async ({ signedIn }) => {
  const person = await signedIn(DEMO.ana);
  const answer = await person.get("/api/search?q=lower%20link%20nut%20to%20bar%20torque&limit=5");
  expect(answer.status()).toBe(200);
  const found = (await answer.json()) as {
    answers: Record<string, unknown>[];
    moments: Record<string, unknown>[];
    lessons: Record<string, unknown>[];
  };
  const value = found.answers.find(({ component }) => component === "Lower link nut to bar");
  expect(value).toMatchObject({
    lessonTitle: "Front sway-bar links: replace and torque",
    kind: "torque",
    text: "65 lbf·ft",
    value: 65,
    unit: "lbf·ft",
    atMs: 125_150,
    state: "checked",
  });
  expect(value?.["si"]).toBeCloseTo(88.129, 2);
  // More may be told of a value; none of this may go.
  expect(Object.keys(value ?? {})).toEqual(
    expect.arrayContaining([
      "markId",
      "lessonId",
      "lessonTitle",
      "chapterTitle",
      "kind",
      "component",
      "text",
      "value",
      "unit",
      "si",
      "atMs",
      "state",
    ]),
  );
  expect(found.moments.length).toBeGreaterThan(0);
  for (const moment of found.moments)
    expect(Object.keys(moment)).toEqual(
      expect.arrayContaining(["atMs", "chapterTitle", "lessonId", "lessonTitle", "snippet"]),
    );
  const byTitle = await person.get("/api/search?q=front%20sway-bar%20links%20replace%20and%20torque");
  const { lessons } = (await byTitle.json()) as typeof found;
  expect(lessons).toContainEqual(
    expect.objectContaining({
      lessonId: value?.["lessonId"],
      lessonTitle: "Front sway-bar links: replace and torque",
    }),
  );
});
