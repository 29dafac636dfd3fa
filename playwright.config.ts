import { defineConfig, devices } from '@playwright/test'

// Debian's Chromium; as root it runs without its sandbox. The rest keeps it off the network.
const args = ['--no-sandbox', '--disable-gpu', '--disable-quic', '--no-first-run']
const quiet = ['--disable-background-networking', '--disable-component-update', '--disable-sync']

/** `npm test -- browser` builds, seeds and serves, and gives the address in BASE_URL. */
export default defineConfig({
  testDir: 'tests/e2e',
  outputDir: '.local/browser',
  forbidOnly: true,
  workers: 1,
  timeout: 60_000,
  expect: { timeout: 10_000 },
  reporter: [['list'], ['json', { outputFile: '.local/results/browser.json' }]],
  use: {
    ...devices['Desktop Chrome'],
    viewport: { width: 1440, height: 900 },
    baseURL: process.env.BASE_URL ?? 'http://127.0.0.1:3100',
    locale: 'en-US',
    timezoneId: 'America/Los_Angeles',
    trace: 'retain-on-failure',
    screenshot: 'only-on-failure',
    launchOptions: {
      executablePath: process.env.CHROMIUM ?? '/usr/bin/chromium',
      args: [...args, ...quiet],
    },
  },
})
