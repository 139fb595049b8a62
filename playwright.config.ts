import { defineConfig } from "@playwright/test";

/** `npm test -- browser` starts a server of its own and says where it is. */
const baseURL = process.env.BASE_URL;
if (!baseURL) throw new Error("The browser tests need BASE_URL; run them with: npm test -- browser");

export default defineConfig({
  testDir: "e2e",
  outputDir: ".local/browser-tests",
  forbidOnly: true,
  fullyParallel: true,
  retries: 0,
  workers: 2,
  timeout: 90_000,
  expect: { timeout: 20_000 },
  use: {
    baseURL,
    browserName: "chromium",
    viewport: { width: 1440, height: 900 },
    locale: "en-GB",
    timezoneId: "Europe/London",
    // What was done and fetched; pictures of every step would cost more than the steps.
    trace: { mode: "retain-on-failure", screenshots: false, snapshots: false, sources: false },
    screenshot: "only-on-failure",
    launchOptions: {
      executablePath: "/usr/bin/chromium",
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
  projects: [
    { name: "sign-ins", testMatch: "sign-ins.setup.ts" },
    { name: "browser", testMatch: "*.spec.ts", dependencies: ["sign-ins"] },
  ],
});
