import { defineConfig, devices } from '@playwright/test'

const output = process.env.WHEREFORE_TEST_OUTPUT ?? '.data/test/playwright'

/** `npm run test:e2e` starts the department and says where it is; these tests start nothing themselves. */
export default defineConfig({
  testDir: 'tests/e2e',
  outputDir: output,
  workers: 1,
  fullyParallel: false,
  retries: 0,
  forbidOnly: true,
  timeout: 120_000,
  expect: { timeout: 10_000 },
  reporter: [['list'], ['json']],
  use: {
    ...devices['Desktop Chrome'],
    baseURL: process.env.WHEREFORE_TEST_BASE_URL,
    viewport: { width: 1440, height: 900 },
    actionTimeout: 15_000,
    navigationTimeout: 30_000,
    locale: 'en-US',
    timezoneId: 'America/New_York',
    // A failure leaves a picture and the page's outline; recording every step of every test would double the time on two cores.
    trace: 'off',
    screenshot: 'only-on-failure',
    launchOptions: {
      executablePath: process.env.WHEREFORE_TEST_CHROMIUM ?? '/usr/bin/chromium',
      // Debian's Chromium as root in a container: no sandbox, no graphics card, and nothing that talks to the outside.
      args: [
        '--no-sandbox', '--disable-gpu', '--disable-quic', '--disable-background-networking', '--disable-component-update',
        '--disable-sync', '--no-first-run', '--disable-dev-shm-usage',
      ],
    },
  },
})
