import { defineConfig } from "vitest/config";

export default defineConfig({
  resolve: {
    alias: {
      "~": new URL("./app", import.meta.url).pathname,
      "#drizzle": new URL("./drizzle", import.meta.url).pathname,
    },
  },
  test: {
    environment: "node",
    include: [
      "app/**/*.test.{ts,tsx}",
      "fakes/**/*.test.ts",
      "drizzle/**/*.test.ts",
      "tests/*.test.ts",
      "tests/reference/**/*.test.ts",
    ],
    testTimeout: 120_000,
    hookTimeout: 120_000,
  },
});
