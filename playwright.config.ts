import { defineConfig, devices } from '@playwright/test'

const port = Number(process.env.TEST_PORT ?? 3199)
const report = process.env.PLAYWRIGHT_REPORT

export default defineConfig({
  testDir: 'tests/browser',
  outputDir: '.data/browser',
  forbidOnly: true,
  workers: 2,
  fullyParallel: true,
  retries: 0,
  // A test with several scans for accessibility takes seconds on a quiet machine and a minute on a busy one.
  timeout: 120_000,
  expect: { timeout: 15_000 },
  reporter: report ? [['list'], ['json', { outputFile: report }]] : [['list']],
  use: {
    baseURL: `http://127.0.0.1:${port}`,
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
  projects: [
    {
      name: 'phone',
      use: {
        browserName: 'chromium',
        viewport: { width: 390, height: 844 },
        hasTouch: true,
        isMobile: true,
        deviceScaleFactor: 2,
        userAgent: devices['Pixel 7'].userAgent,
      },
    },
    { name: 'wide', use: { browserName: 'chromium', viewport: { width: 1440, height: 900 } } },
  ],
  webServer: {
    command: 'node --enable-source-maps --import tsx tests/support/builtProduct.ts',
    url: `http://127.0.0.1:${port}/readyz`,
    reuseExistingServer: false,
    timeout: 60_000,
    gracefulShutdown: { signal: 'SIGTERM', timeout: 10_000 },
  },
})
