import path from 'node:path';
import { defineConfig } from '@playwright/test';

const root = path.resolve(__dirname, '../..');
const chromium = {
  executablePath: '/usr/bin/chromium',
  args: ['--no-sandbox', '--disable-gpu', '--disable-quic', '--no-first-run', '--disable-background-networking', '--disable-component-update', '--disable-sync'],
};

/**
 * Every spec runs on both devices, against a seeded demonstration of the device's own (tests/setup/e2eServers.mjs).
 * A spec for one device only is named *.phone.spec.ts or *.wide.spec.ts.
 */
export default defineConfig({
  testDir: __dirname,
  testMatch: '**/*.spec.ts',
  outputDir: path.join(root, 'test-results'),
  globalSetup: path.join(root, 'tests/setup/e2eServers.mjs'),
  workers: 1,
  fullyParallel: false,
  forbidOnly: true,
  retries: 0,
  timeout: 60_000,
  expect: { timeout: 10_000 },
  reporter: [['list'], ['json', { outputFile: process.env.E2E_RESULTS ?? path.join(root, 'test-results/results.json') }]],
  use: { actionTimeout: 20_000, navigationTimeout: 30_000, browserName: 'chromium', launchOptions: chromium, locale: 'en-US', timezoneId: 'America/Los_Angeles', trace: 'retain-on-failure', screenshot: 'only-on-failure' },
  projects: [
    {
      name: 'phone',
      testIgnore: '**/*.wide.spec.ts',
      use: { baseURL: process.env.E2E_PHONE_URL, viewport: { width: 390, height: 844 }, deviceScaleFactor: 2, isMobile: true, hasTouch: true },
    },
    {
      name: 'wide',
      testIgnore: '**/*.phone.spec.ts',
      use: { baseURL: process.env.E2E_WIDE_URL, viewport: { width: 1280, height: 800 } },
    },
  ],
});
