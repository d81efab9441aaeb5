import { defineConfig } from '@playwright/test'
import { join } from 'node:path'

const output = process.env.HALYARD_TEST_OUTPUT ?? join(import.meta.dirname, '../../test-results')

/** Debian's Chromium without a window; the switches keep it from asking for hosts that are not there. */
const chromium = {
  executablePath: '/usr/bin/chromium-headless-shell',
  args: [
    '--no-sandbox',
    '--disable-gpu',
    '--disable-quic',
    '--no-first-run',
    '--disable-background-networking',
    '--disable-component-update',
    '--disable-sync',
  ],
}

/**
 * Every `*.browser.ts` runs on both screens; `*.desktop.browser.ts` and `*.phone.browser.ts` on the one they name, so
 * that no test is ever skipped.
 */
export default defineConfig({
  testDir: '.',
  outputDir: join(output, 'browser'),
  globalSetup: './support/global-setup.ts',
  workers: 2,
  forbidOnly: Boolean(process.env.CI),
  timeout: 120_000,
  expect: { timeout: 15_000 },
  reporter: 'list',
  use: {
    launchOptions: chromium,
    locale: 'en-US',
    // The demo group's zone, so that its days are the browser's days.
    timezoneId: 'America/Los_Angeles',
    screenshot: 'only-on-failure',
    // Asked for by `--trace on` where a failure needs one: kept for every test it costs a seventh of the run.
    trace: 'off',
  },
  projects: [
    {
      name: 'desktop',
      testMatch: /\.browser\.ts$/,
      testIgnore: /\.phone\.browser\.ts$/,
      use: { viewport: { width: 1440, height: 900 } },
    },
    {
      name: 'phone',
      testMatch: /\.browser\.ts$/,
      testIgnore: /\.desktop\.browser\.ts$/,
      use: { viewport: { width: 390, height: 844 }, isMobile: true, hasTouch: true, deviceScaleFactor: 1 },
    },
  ],
})
