import { mkdtempSync } from "node:fs";
import { tmpdir } from "node:os";
import { join } from "node:path";
import { defineConfig } from "@playwright/test";
import { findChromium } from "./tests/runner/chromium";

// Workers read this file again: what is chosen once is handed to them through the environment.
process.env.BROWSER_TEST_PORT ??= String(4411);
process.env.BROWSER_TEST_DATA ??= mkdtempSync(join(tmpdir(), "loadline-browser-"));
const port = process.env.BROWSER_TEST_PORT;
const address = `http://localhost:${port}`;
const chromium = findChromium();

export default defineConfig({
  testDir: "tests/browser",
  outputDir: "test-results",
  timeout: 60_000,
  expect: { timeout: 10_000 },
  workers: 2,
  retries: 0,
  use: {
    baseURL: address,
    viewport: { width: 1440, height: 900 },
    trace: "retain-on-failure",
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
    command: `npx next build && npx next start -p ${port}`,
    url: `${address}/api/health`,
    timeout: 240_000,
    env: {
      PORT: port,
      PUBLIC_URL: address,
      DATA_DIR: process.env.BROWSER_TEST_DATA,
      DATABASE_URL: "",
      NEXT_TELEMETRY_DISABLED: "1",
    },
  },
});
