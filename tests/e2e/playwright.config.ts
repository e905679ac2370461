import { defineConfig } from '@playwright/test'

export default defineConfig({
  testDir: '.',
  outputDir: '../../test-results',
  // One server for all, and two cores: tests follow one another.
  workers: 1,
  fullyParallel: false,
  forbidOnly: true,
  retries: 0,
  // Patience for a busy machine: a test that passes takes a fraction of it.
  timeout: 180_000,
  expect: { timeout: 30_000 },
  reporter: 'list',
  use: {
    viewport: { width: 1440, height: 900 },
    trace: 'retain-on-failure',
    screenshot: 'only-on-failure',
    launchOptions: {
      executablePath: process.env.CHROMIUM ?? '/usr/bin/chromium',
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
})
