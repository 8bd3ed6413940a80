import { defineConfig } from '@playwright/test';

const asRoot = process.getuid?.() === 0;

export default defineConfig({
  testDir: 'tests/e2e',
  testMatch: '**/*.spec.ts',
  globalSetup: './tests/e2e/setup/global.ts',
  outputDir: 'test-results',
  // WebGL is drawn by the processor: a second browser would starve the first.
  workers: 1,
  fullyParallel: false,
  retries: 0,
  forbidOnly: true,
  // A stuck test still ends; a slow machine, which draws WebGL by processor, does not fail one.
  timeout: 300_000,
  expect: { timeout: 15_000 },
  use: {
    // The global set-up chooses the port; the processes that run tests inherit it.
    ...(process.env['RINGSTEAD_E2E_URL'] ? { baseURL: process.env['RINGSTEAD_E2E_URL'] } : {}),
    viewport: { width: 1280, height: 800 },
    locale: 'en-GB',
    timezoneId: 'UTC',
    screenshot: 'only-on-failure',
    trace: 'retain-on-failure',
    launchOptions: {
      executablePath: process.env['CHROMIUM_PATH'] ?? '/usr/bin/chromium',
      args: [
        ...(asRoot ? ['--no-sandbox'] : []),
        '--disable-quic',
        '--no-first-run',
        '--disable-background-networking',
        '--disable-component-update',
        '--disable-sync',
      ],
    },
  },
});
