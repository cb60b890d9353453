import { defineConfig } from '@playwright/test';

const asRoot = process.getuid?.() === 0;

/** The browser stories run against a practice that scripts/test.mjs has opened; they leave it changed. */
export default defineConfig({
  testDir: 'tests/e2e',
  outputDir: 'test-results',
  timeout: 300_000,
  expect: { timeout: 15_000 },
  retries: 0,
  workers: 1,
  fullyParallel: false,
  reporter: [['list'], ['json', { outputFile: 'test-results/report.json' }]],
  use: {
    baseURL: process.env['E2E_ORIGIN'] ?? 'http://localhost:4321',
    actionTimeout: 15_000,
    navigationTimeout: 30_000,
    locale: 'en-GB',
    timezoneId: 'Europe/London',
    launchOptions: {
      executablePath: '/usr/bin/chromium',
      args: [
        '--disable-background-networking',
        '--no-first-run',
        '--disable-quic',
        ...(asRoot ? ['--no-sandbox'] : []),
      ],
    },
  },
  projects: [
    { name: 'pages', testMatch: /pages\/.*\.spec\.ts/, use: { viewport: { width: 1440, height: 900 } } },
    // The stories move the practice's one clock forward, so they come last and one after the other.
    {
      name: 'story-1440',
      testMatch: /story\/.*\.spec\.ts/,
      dependencies: ['pages'],
      use: { viewport: { width: 1440, height: 900 } },
    },
    {
      name: 'story-390',
      testMatch: /story\/.*\.spec\.ts/,
      dependencies: ['story-1440'],
      use: { viewport: { width: 390, height: 844 }, isMobile: true, hasTouch: true },
    },
  ],
});
