import { defineConfig } from '@playwright/test';

/** The tests' own server and worker are started by docker-free-scripts/test.mjs, which sets APP_URL. */
const baseURL = process.env.APP_URL;
if (!baseURL) throw new Error('APP_URL is not set: run the browser tests by "npm test -- --only e2e".');

/**
 * A test runs on the desk's screen unless its tag says more: `@phone` runs on both screens, `@phone-only` on the
 * phone's alone.
 */
export default defineConfig({
  testDir: 'tests/e2e',
  outputDir: '.data-test/playwright',
  // The server, the worker and the database share the machine's cores with the browser.
  workers: 1,
  forbidOnly: true,
  retries: 0,
  timeout: 60_000,
  expect: { timeout: 10_000 },
  reporter: [['line'], ['json']],
  use: {
    baseURL,
    actionTimeout: 10_000,
    locale: 'en-US',
    screenshot: 'only-on-failure',
    trace: 'retain-on-failure',
    browserName: 'chromium',
    launchOptions: {
      executablePath: '/usr/bin/chromium',
      // No request but the tests' own, and none by UDP.
      args: [
        '--disable-background-networking',
        '--disable-component-update',
        '--disable-sync',
        '--no-first-run',
        '--disable-quic',
      ],
    },
  },
  projects: [
    { name: 'desktop', grepInvert: /@phone-only\b/, use: { viewport: { width: 1440, height: 900 } } },
    {
      name: 'phone',
      grep: /@phone(-only)?\b/,
      use: { viewport: { width: 360, height: 780 }, hasTouch: true, isMobile: true },
    },
  ],
});
