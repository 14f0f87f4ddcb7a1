import os from 'node:os';
import { defineConfig } from '@playwright/test';

const state = process.env.OHMSTEAD_STATE ?? '.local/test';

/**
 * The browser tests run against the server whose address is in BASE_URL; `npm test` and `npm test -- e2e` make one.
 * Debian's Chromium is used, with everything off by which a browser would speak to hosts of its own.
 */
export default defineConfig({
  testDir: 'tests/e2e',
  outputDir: `${state}/browser`,
  // The web server, MariaDB and a browser want a core each; on two cores a second browser would time others out.
  workers: Math.max(1, Math.floor(os.availableParallelism() / 2)),
  retries: 0,
  timeout: 120_000,
  // Patience costs nothing when a page is in time; on a busy machine a page that comes late is not a page that fails.
  expect: { timeout: 15_000 },
  reporter: [['list'], ['json', { outputFile: process.env.PLAYWRIGHT_JSON_OUTPUT_NAME ?? `${state}/playwright.json` }]],
  use: {
    baseURL: process.env.BASE_URL ?? 'http://localhost:3000',
    locale: 'en-GB',
    viewport: { width: 1440, height: 900 },
    trace: 'retain-on-failure',
    launchOptions: {
      executablePath: '/usr/bin/chromium',
      args: [
        // Chromium refuses to run as root with its sandbox, and a bare test machine has no other account.
        '--no-sandbox',
        '--disable-background-networking',
        '--disable-component-update',
        '--disable-sync',
        '--no-first-run',
        '--disable-quic',
      ],
    },
  },
});
