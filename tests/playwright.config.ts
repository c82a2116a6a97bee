import { defineConfig } from "@playwright/test";

// Fixed ports, so that the pages, the storage and the inbox are found by every journey.
export const PORTS = { application: 4310, s3: 4311, smtp: 4312, inbox: 4313 };
const storage = "test-results/storage";

export default defineConfig({
  testDir: "./journeys",
  outputDir: "../test-results/traces",
  timeout: 120_000,
  expect: { timeout: 15_000 },
  fullyParallel: false,
  workers: 2,
  retries: 0,
  forbidOnly: true,
  reporter: [["list"], ["json"]],
  use: {
    baseURL: `http://localhost:${PORTS.application}`,
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
    timeout: 120_000,
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
