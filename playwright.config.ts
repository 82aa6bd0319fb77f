import { mkdtempSync } from "node:fs";
import { tmpdir } from "node:os";
import { join } from "node:path";
import { defineConfig } from "@playwright/test";
import { findChromium } from "./tests/runner/chromium";

const port = Number(process.env.BROWSER_TEST_PORT ?? 4311);
const dataFolder = process.env.BROWSER_TEST_DATA ?? mkdtempSync(join(tmpdir(), "loadline-browser-"));
process.env.BROWSER_TEST_DATA = dataFolder;
const chromium = findChromium();

/** Browser tests on the built app, on a port and a data folder of their own, in the system's Chromium. */
export default defineConfig({
  testDir: "tests/browser",
  outputDir: "test-results",
  timeout: 120_000,
  expect: { timeout: 20_000 },
  workers: 1,
  retries: process.env.CI ? 1 : 0,
  use: {
    baseURL: `http://localhost:${port}`,
    viewport: { width: 1440, height: 900 },
    launchOptions: {
      ...(chromium ? { executablePath: chromium } : {}),
      args: [
        "--no-sandbox",
        "--disable-gpu",
        "--disable-quic",
        "--no-first-run",
        "--disable-background-networking",
        "--disable-component-update",
        "--disable-sync",
      ],
    },
  },
  webServer: {
    command: "node --import tsx lib/platform/start/main.ts",
    url: `http://localhost:${port}/api/health`,
    timeout: 300_000,
    reuseExistingServer: false,
    env: {
      PORT: String(port),
      DATA_DIR: dataFolder,
      DATABASE_URL: "",
      NEXT_MANUAL_SIG_HANDLE: "true",
      PUBLIC_URL: `http://localhost:${port}`,
    },
  },
});
