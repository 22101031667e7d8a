import { defineConfig, devices } from '@playwright/test';

/** The browser tests: Debian's Chromium, one registry of their own per spec file. */
export default defineConfig({
  testDir: './e2e',
  outputDir: '../test-results',
  // Two cores carry a database, a server, a worker and a browser already.
  workers: 1,
  fullyParallel: false,
  retries: 0,
  forbidOnly: true,
  timeout: 120_000,
  expect: { timeout: 15_000 },
  use: {
    ...devices['Desktop Chrome'],
    viewport: { width: 1280, height: 900 },
    locale: 'en-GB',
    timezoneId: 'Europe/London',
    actionTimeout: 15_000,
    navigationTimeout: 30_000,
    // A trace of every page costs more than the pages; `--trace on` makes one where it is needed.
    screenshot: 'only-on-failure',
    launchOptions: {
      executablePath: '/usr/bin/chromium',
      args: ['--no-sandbox', '--disable-background-networking', '--disable-component-update',
        '--disable-sync', '--no-first-run'],
    },
  },
});
