import { defineConfig } from '@playwright/test';

/**
 * `npm test` starts the built application and names it in BASE_URL; by itself (`npx playwright test`) this drives `npm run dev`.
 * The browser is Debian's: the one that Playwright would fetch does not come from a package registry.
 */
export default defineConfig({
  testDir: 'e2e',
  outputDir: 'test-results',
  workers: 1,
  fullyParallel: false,
  retries: 0,
  timeout: 60_000,
  expect: { timeout: 10_000 },
  forbidOnly: Boolean(process.env.CI),
  use: {
    baseURL: process.env.BASE_URL ?? 'http://127.0.0.1:4310',
    locale: 'en-GB',
    trace: 'retain-on-failure',
    screenshot: 'only-on-failure',
    launchOptions: {
      executablePath: '/usr/bin/chromium',
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
  projects: [
    { name: 'desktop', testIgnore: 'pictures.spec.ts', use: { viewport: { width: 1440, height: 900 } } },
    // The pictures of README.md: `npm run pictures`, on the demo as `npm run dev` or BASE_URL has it.
    { name: 'pictures', testMatch: 'pictures.spec.ts' },
  ],
});
