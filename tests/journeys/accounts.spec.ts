// Signing in, a forgotten password, invitations, roles and leaving, in shops of their own.
import { linkIn, mailTo } from "../support/inbox";
import { expect, signIn, test } from "../support/journey";
import { join, newAddress, OWN_PASSWORD, signUpShop } from "../support/shop-of-own";

test("a wrong password is refused in words that tell nothing, and the address stays typed", async ({
  page,
  somebody,
}) => {
  const owner = await signUpShop(somebody);
  await page.goto("/sign-in?to=%2Fteam");
  const email = page.getByLabel("E-mail");
  const password = page.getByLabel("Password");
  for (const address of [owner.email, newAddress("nobody")]) {
    await email.fill(address);
    await password.fill("not the password");
    await page.getByRole("button", { name: "Sign in" }).click();
    await expect(page.getByRole("alert")).toHaveText(
      "That e-mail and password do not fit together. Check both, or reset the password.",
    );
    await expect(email).toHaveValue(address);
    await expect(password).toHaveValue("not the password");
  }
  await email.fill(owner.email);
  await password.fill(OWN_PASSWORD);
  await page.getByRole("button", { name: "Sign in" }).click();
  await expect(page.getByRole("heading", { level: 1 })).toHaveText("Team");
});

test("the page after sign-in is one of our own, whatever the address says", async ({ somebody }) => {
  const owner = await signUpShop(somebody);
  for (const to of [
    "https://elsewhere.example/",
    "//elsewhere.example",
    "/\\elsewhere.example",
    "javascript:alert(1)",
  ]) {
    const other = await somebody();
    const answer = await other.post(`/sign-in?to=${encodeURIComponent(to)}`, {
      email: owner.email,
      password: OWN_PASSWORD,
    });
    expect([answer.status(), answer.headers()["location"]]).toEqual([302, "/"]);
  }
});

test("a forgotten password: a link by mail, a new password, and every old session is dead", async ({
  page,
  somebody,
}) => {
  const owner = await signUpShop(somebody);
  await page.goto("/sign-in");
  await page.getByRole("link", { name: "Forgot the password?" }).click();
  // Both pages have a field for the e-mail: it is the next one that is meant.
  await expect(page.getByRole("heading", { level: 1 })).toHaveText("Forgot the password");
  await page.getByLabel("E-mail").fill(owner.email);
  await page.getByRole("button", { name: "Send the link" }).click();
  await expect(
    page.getByText(/If that address has an account, a mail with a link is on its way\./),
  ).toBeVisible();
  const link = linkIn(await mailTo(owner.email, /Choose a new password/));
  await page.goto(link);
  await page.getByLabel("New password").fill("short");
  await page.getByRole("button", { name: "Set the password" }).click();
  await expect(page.getByLabel("New password")).toHaveAccessibleDescription(/Use at least 10 characters\./);
  await page.getByLabel("New password").fill("a new one for the shop");
  await page.getByRole("button", { name: "Set the password" }).click();
  await expect(page.getByText("The new password is set. Sign in with it.")).toBeVisible();

  expect((await owner.get("/team")).headers()["location"]).toMatch(/^\/sign-in/);
  expect((await owner.get("/api/search?q=nut")).status()).toBe(401);
  expect((await owner.post("/sign-in", { email: owner.email, password: OWN_PASSWORD })).status()).toBe(400);
  await signIn(owner, owner.email, "a new one for the shop");
  await page.goto(link);
  await expect(page.getByRole("heading", { level: 1 })).toHaveText("This link does not work any more");
});

test("an unknown address is answered alike, and gets no mail", async ({ somebody }) => {
  const owner = await signUpShop(somebody);
  const { post } = { post: owner.post.bind(owner) };
  const known = await post("/forgot-password", { email: owner.email });
  const unknown = await post("/forgot-password", { email: newAddress("nobody") });
  expect([unknown.status(), unknown.headers()["location"]]).toEqual([
    known.status(),
    known.headers()["location"],
  ]);
});

test("72 bytes are the most that a password may have", async ({ page }) => {
  await page.goto("/sign-up");
  await page.getByLabel("Name of the shop").fill("Byte Street Garage");
  await page.getByLabel("Your name").fill("Ida Byte");
  await page.getByLabel("E-mail").fill(newAddress("ida"));
  const password = page.getByLabel("Password");
  await password.fill("ö".repeat(37)); // 37 letters, 74 bytes
  await page.getByRole("button", { name: "Set up the shop" }).click();
  await expect(password).toHaveAccessibleDescription(
    /This password is longer than 72 bytes\. Use a shorter one/,
  );
  await expect(page.getByLabel("Name of the shop")).toHaveValue("Byte Street Garage");
  await password.fill("ö".repeat(36)); // 72 bytes
  await page.getByRole("button", { name: "Set up the shop" }).click();
  await expect(page.getByText("The library of Byte Street Garage is empty.")).toBeVisible();
});

test("invited, accepted with a role, role changed, removed: sessions end and the last owner stays", async ({
  somebody,
}) => {
  const owner = await signUpShop(somebody, "Roller Lane Motors");
  const { page } = owner;
  const newcomer = await somebody();
  const email = newAddress("mina");

  await test.step("invite", async () => {
    await page.goto("/team");
    await page.getByLabel("Name", { exact: true }).fill("Mina Roller");
    await page.getByLabel("E-mail").fill(email);
    await page.getByLabel("Role", { exact: true }).selectOption("trainee");
    await page.getByRole("button", { name: "Send the invitation" }).click();
    await expect(page.getByText("The invitation is on its way.")).toBeVisible();
  });

  await test.step("accept", async () => {
    const mail = await mailTo(email, /invites you to Roller Lane Motors/);
    expect(mail.text).toContain("as a trainee");
    await newcomer.page.goto(linkIn(mail));
    await expect(newcomer.page.getByRole("heading", { level: 1 })).toHaveText("Join Roller Lane Motors");
    await newcomer.page.getByLabel("Password").fill(OWN_PASSWORD);
    await newcomer.page.getByRole("button", { name: "Join" }).click();
    await expect(newcomer.page.getByRole("heading", { level: 1 })).toHaveText("Library");
    expect((await newcomer.get("/bench")).status()).toBe(403);
    await newcomer.page.goto(linkIn(mail));
    await expect(newcomer.page.getByRole("heading", { level: 1 })).toHaveText(
      "This invitation does not work any more",
    );
  });

  const row = page.getByRole("listitem").filter({ hasText: email });
  const own = page.getByRole("listitem").filter({ hasText: owner.email });

  await test.step("the only owner stays one", async () => {
    await page.reload();
    await own.getByLabel(/^Role of/).selectOption("instructor");
    await own.getByRole("button", { name: "Change" }).click();
    const refused = page.getByText("This is the shop's only owner. Make somebody else an owner first.");
    await expect(refused).toBeVisible();
    await page.goto("/team");
    await own.getByText("Remove", { exact: true }).click();
    await own.getByRole("button", { name: /^Remove / }).click();
    await expect(refused).toBeVisible();
    expect((await owner.get("/settings")).status()).toBe(200);
  });

  await test.step("a new role counts at once", async () => {
    await page.goto("/team");
    await row.getByLabel(/^Role of/).selectOption("instructor");
    await row.getByRole("button", { name: "Change" }).click();
    await expect(page.getByText("The role is changed.")).toBeVisible();
    expect((await newcomer.get("/bench")).status()).toBe(200);
    expect((await newcomer.get("/settings")).status()).toBe(403);
  });

  await test.step("who is removed is signed out everywhere and cannot come back", async () => {
    await row.getByText("Remove", { exact: true }).click();
    await row.getByRole("button", { name: /^Remove / }).click();
    await expect(page.getByText(/signed out everywhere and off the team/)).toBeVisible();
    expect((await newcomer.get("/")).headers()["location"]).toMatch(/^\/sign-in/);
    const again = await newcomer.post("/sign-in", { email, password: OWN_PASSWORD });
    expect(again.status()).toBe(400);
  });
});

test("signing out ends the session, not only the cookie", async ({ somebody }) => {
  const owner = await signUpShop(somebody);
  const kept = await somebody({ storageState: await owner.context.storageState() });
  expect((await kept.get("/team")).status()).toBe(200);
  await owner.page.goto("/account");
  await owner.page.getByRole("button", { name: "Sign out", exact: true }).click();
  await expect(owner.page.getByRole("heading", { level: 1 })).toHaveText("Sign in");
  expect((await kept.get("/team")).status()).toBe(302);
});

test("a new password signs every other device out", async ({ somebody, signedIn }) => {
  const owner = await signUpShop(somebody);
  const tablet = await signedIn(owner.email, {}, OWN_PASSWORD);
  expect((await tablet.get("/team")).status()).toBe(200);
  const { page } = owner;
  await page.goto("/account");
  await page.getByLabel("Present password").fill("wrong one here");
  await page.getByLabel("New password").fill("four blind mice");
  await page.getByRole("button", { name: "Change the password" }).click();
  await expect(page.getByLabel("Present password")).toHaveAccessibleDescription(
    /This is not your present password\./,
  );
  await page.getByLabel("Present password").fill(OWN_PASSWORD);
  await page.getByLabel("New password").fill("four blind mice");
  await page.getByRole("button", { name: "Change the password" }).click();
  await expect(page.getByText("The password is changed. Every other device is signed out.")).toBeVisible();
  expect((await tablet.get("/team")).status()).toBe(302);
  expect((await owner.get("/team")).status()).toBe(200);
});

test("two people accept one invitation at the same time: one joins", async ({ somebody }) => {
  const owner = await signUpShop(somebody);
  const email = newAddress("pia");
  await owner.post("/team", { intent: "invite", name: "Pia", email, role: "trainee" });
  const path = linkIn(await mailTo(email, /invites you/));
  const [a, b] = [await somebody(), await somebody()];
  const form = { name: "Pia", password: OWN_PASSWORD };
  const answers = await Promise.all([a.post(path, form), b.post(path, form)]);
  const joined = answers.filter((answer) => answer.headers()["location"] === "/");
  expect(joined).toHaveLength(1);
  const trainee = await join(somebody, owner, "Rolf", "trainee");
  expect((await trainee.get("/team")).status()).toBe(403);
});
