import { defineConfig } from '@playwright/test'
import { SERVICES_VARIABLE, useTestServices } from './tests/e2e/support/services'

// Chromium looks up hosts of its maker at every start unless it is told that no name but ours exists.
const STAY_ON_THIS_MACHINE = [
  '--host-resolver-rules=MAP * ~NOTFOUND, EXCLUDE 127.0.0.1, EXCLUDE localhost',
  '--disable-background-networking',
  '--disable-component-update',
  '--disable-sync',
  '--disable-quic',
  '--no-first-run',
]
const isRoot = process.getuid?.() === 0

export default defineConfig({
  testDir: 'tests/e2e',
  testMatch: '**/*.test.ts',
  globalSetup: './tests/e2e/global-setup.ts',
  workers: 1,
  fullyParallel: false,
  forbidOnly: true,
  timeout: 60_000,
  expect: { timeout: 10_000 },
  outputDir: 'test-results/browser',
  reporter: [['line'], ['json', { outputFile: 'test-results/e2e.json' }]],
  use: {
    // The set-up has run when a worker reads this; the first reading, before it, starts no browser.
    baseURL: process.env[SERVICES_VARIABLE] ? useTestServices().baseUrl : undefined,
    locale: 'en-GB',
    timezoneId: 'Europe/Dublin',
    viewport: { width: 1280, height: 900 },
    trace: 'off',
    video: 'off',
    screenshot: 'only-on-failure',
    launchOptions: {
      executablePath: '/usr/bin/chromium',
      args: [...STAY_ON_THIS_MACHINE, '--disable-gpu', ...(isRoot ? ['--no-sandbox'] : [])],
    },
  },
  projects: [{ name: 'chromium' }],
})
