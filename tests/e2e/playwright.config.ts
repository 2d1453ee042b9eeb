import { defineConfig } from '@playwright/test';

/** Whole journeys on the built product; `npm test` starts it and names it in BASE_URL. */
export default defineConfig({
  testDir: '.',
  testMatch: '*.journey.ts',
  workers: 1,
  timeout: 90_000,
  expect: { timeout: 10_000 },
  forbidOnly: true,
  outputDir: '../../test-results/journeys',
  use: {
    baseURL: process.env.BASE_URL ?? 'http://127.0.0.1:4000',
    locale: 'en-GB',
    timezoneId: 'UTC',
    viewport: { width: 1280, height: 900 },
    screenshot: 'only-on-failure',
    launchOptions: {
      executablePath: process.env.CHROMIUM_PATH ?? '/usr/bin/chromium',
      args: [
        '--no-sandbox',
        '--disable-gpu',
        '--disable-quic',
        '--no-first-run',
        '--disable-background-networking',
        '--disable-component-update',
        '--disable-sync',
      ],
    },
  },
});
