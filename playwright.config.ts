import { defineConfig } from "@playwright/test";

const port = Number(process.env.E2E_PORT ?? 3311);
const address = `http://127.0.0.1:${port}`;

export default defineConfig({
  testDir: "./tests/e2e",
  outputDir: "./test-results",
  workers: 1,
  // The machine may be busy: these are limits, not expectations.
  timeout: 180_000,
  expect: { timeout: 45_000 },
  reporter: process.env.PLAYWRIGHT_JSON_OUTPUT_NAME ? [["list"], ["json"]] : [["list"]],
  use: {
    baseURL: address,
    trace: "retain-on-failure",
    viewport: { width: 1440, height: 900 },
    launchOptions: {
      executablePath: process.env.CHROMIUM_PATH ?? "/usr/bin/chromium",
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
    command: `node node_modules/next/dist/bin/next start -H 127.0.0.1 -p ${port}`,
    url: `${address}/api/health`,
    timeout: 180_000,
    reuseExistingServer: false,
    stdout: "ignore",
    env: { APP_LOCAL: "1", DATA_DIR: process.env.E2E_DATA_DIR ?? ".data/e2e", NEXT_TELEMETRY_DISABLED: "1" },
  },
});
