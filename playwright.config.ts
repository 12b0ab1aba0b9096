import path from "node:path";
import { defineConfig } from "@playwright/test";

const port = Number(process.env.E2E_PORT ?? 3210);
const dataDir = path.resolve("test-results", "e2e-data");

const desk = { viewport: { width: 1280, height: 900 } };
const phone = { viewport: { width: 360, height: 740 }, hasTouch: true, isMobile: true };

export default defineConfig({
  testDir: "tests/e2e",
  outputDir: "test-results/e2e",
  timeout: 240_000,
  expect: { timeout: 15_000 },
  fullyParallel: false,
  workers: 1,
  retries: 0,
  forbidOnly: true,
  // The count of passed and failed comes from the JSON; printed only when a file for it is named.
  reporter: process.env.PLAYWRIGHT_JSON_OUTPUT_NAME === undefined ? [["list"]] : [["list"], ["json"]],
  use: {
    baseURL: `http://localhost:${port}`,
    trace: "retain-on-failure",
    timezoneId: "Europe/Copenhagen",
    locale: "en-GB",
    launchOptions: {
      executablePath: process.env.CHROMIUM_PATH ?? "/usr/bin/chromium",
      args: [
        "--no-sandbox",
        "--use-gl=angle",
        "--use-angle=swiftshader",
        "--enable-unsafe-swiftshader",
        "--ignore-gpu-blocklist",
        "--disable-background-networking",
        "--disable-component-update",
        "--disable-sync",
        "--no-first-run",
      ],
    },
  },
  projects: [
    { name: "desk", use: desk },
    { name: "phone", use: phone, testMatch: /(journey|axe|reflow)\.spec\.ts/ },
  ],
  webServer: {
    // Demo mode opens the outbox, where the tests read their mail; the database starts empty.
    command: `node scripts/support/serve-empty.mjs`,
    url: `http://localhost:${port}/api/health`,
    timeout: 60_000,
    reuseExistingServer: process.env.E2E_REUSE === "1",
    // Asks the server to end; killed, it would leave its child holding the pipes and the run would never end.
    gracefulShutdown: { signal: "SIGTERM", timeout: 15_000 },
    stdout: "ignore",
    stderr: "pipe",
    env: {
      PORT: String(port),
      DATA_DIR: dataDir,
      TRIMWAKE_DEMO: "1",
      APP_ORIGIN: `http://localhost:${port}`,
    },
  },
});
