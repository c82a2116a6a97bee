import { spawnSync } from "node:child_process";
import { mkdtempSync, rmSync } from "node:fs";
import { tmpdir } from "node:os";
import { join } from "node:path";
import { expect, test } from "vitest";
import { refuseDemoAccounts } from "~/auth/demo-accounts.server";
import { readEnv } from "~/env.server";
import { aDatabase, aPerson, aShop } from "./support/factories";

test("an incomplete environment is refused with every problem named at once", () => {
  expect(() => readEnv({})).toThrow(
    /PUBLIC_ORIGIN[\s\S]*SESSION_SECRET[\s\S]*DATABASE_FILE[\s\S]*S3_BUCKET[\s\S]*SMTP_URL/,
  );
  const complete = {
    PUBLIC_ORIGIN: "https://training.example",
    SESSION_SECRET: "a".repeat(32),
    DATABASE_FILE: "castlenut.db",
    S3_ENDPOINT: "https://storage.example",
    S3_PUBLIC_ENDPOINT: "https://storage.example",
    S3_BUCKET: "films",
    S3_ACCESS_KEY_ID: "id",
    S3_SECRET_ACCESS_KEY: "secret",
    SMTP_URL: "smtps://mail.example",
  };
  expect(readEnv(complete)).toMatchObject({ PORT: 3000, ALLOW_DEMO_ACCOUNTS: "no" });
  expect(() => readEnv({ ...complete, SESSION_SECRET: "short" })).toThrow(
    "SESSION_SECRET needs 32 characters or more",
  );
});

test("production refuses a database with the demo accounts, unless it is the demo", () => {
  const db = aDatabase();
  expect(() => refuseDemoAccounts(db, { NODE_ENV: "production", ALLOW_DEMO_ACCOUNTS: "no" })).not.toThrow();
  aPerson(db, aShop(db), "owner", { email: "owner@northgate.example" });
  expect(() => refuseDemoAccounts(db, { NODE_ENV: "production", ALLOW_DEMO_ACCOUNTS: "no" })).toThrow(
    "whose password everybody knows",
  );
  expect(() => refuseDemoAccounts(db, { NODE_ENV: "production", ALLOW_DEMO_ACCOUNTS: "yes" })).not.toThrow();
});

test("the start commands say what is missing instead of failing somewhere", () => {
  const folder = mkdtempSync(join(tmpdir(), "elsewhere-"));
  const script = `import { prepare } from ${JSON.stringify(join(process.cwd(), "fakes/prepare.mjs"))}; await prepare([]);`;
  const run = spawnSync(process.execPath, ["--input-type=module", "-e", script], {
    cwd: folder,
    encoding: "utf8",
  });
  rmSync(folder, { recursive: true });
  expect(run.status).toBe(1);
  expect(run.stderr).toContain("Run this in the project's top folder");
});
