import { defineConfig } from "@playwright/test";
import { PORTS } from "./support/addresses";

const storage = "test-results/storage";

export default defineConfig({
  testDir: "./journeys",
  outputDir: "../test-results/traces",
  globalSetup: "./support/films.ts",
  timeout: 240_000,
  expect: { timeout: 15_000 },
  fullyParallel: true,
  workers: 2,
  retries: 0,
  forbidOnly: true,
  reporter: [["list"], ["json"]],
  use: {
    baseURL: `http://localhost:${PORTS.application}`,
    actionTimeout: 15_000,
    navigationTimeout: 30_000,
    trace: "retain-on-failure",
    launchOptions: {
      executablePath: "/usr/bin/chromium",
      args: [
        "--headless",
        "--no-sandbox",
        "--disable-gpu",
        "--disable-quic",
        "--no-first-run",
        "--disable-background-networking",
        "--disable-component-update",
        "--disable-sync",
        "--autoplay-policy=no-user-gesture-required",
      ],
    },
  },
  webServer: {
    command: `node --import tsx fakes/start.ts --demo --reset --storage ${storage}`,
    cwd: "..",
    url: `http://localhost:${PORTS.application}/healthz`,
    timeout: 240_000,
    reuseExistingServer: false,
    stdout: "ignore",
    stderr: "pipe",
    gracefulShutdown: { signal: "SIGTERM", timeout: 10_000 },
    env: {
      NODE_ENV: "production",
      PORT: String(PORTS.application),
      S3_PORT: String(PORTS.s3),
      SMTP_PORT: String(PORTS.smtp),
      INBOX_PORT: String(PORTS.inbox),
    },
  },
});
