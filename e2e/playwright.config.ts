import { defineConfig } from "playwright/test";

/** Debian's Chromium; the switches keep it from calling out and let it run as root. */
export const launchOptions = {
  executablePath: process.env["CHROMIUM_PATH"] ?? "/usr/bin/chromium",
  args: [
    "--no-sandbox",
    "--disable-gpu",
    "--disable-quic",
    "--no-first-run",
    "--disable-background-networking",
    "--disable-component-update",
    "--disable-sync",
  ],
};

export default defineConfig({
  testDir: ".",
  outputDir: "../test-results",
  // Each worker has a stack of its own; stories spend much of their time waiting for pauses and polls.
  workers: 2,
  fullyParallel: false,
  retries: 0,
  timeout: 90_000,
  expect: { timeout: 15_000 },
  reporter: "line",
  use: {
    launchOptions,
    viewport: { width: 1440, height: 900 },
    reducedMotion: "reduce",
    trace: "retain-on-failure",
    screenshot: "only-on-failure",
  },
});
