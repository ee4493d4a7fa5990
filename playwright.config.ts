import { defineConfig, devices } from '@playwright/test';

const port = Number(process.env.UNDERFALL_E2E_PORT ?? 3111);

// scripts/test.sh starts the product and passes its address; the tests only drive a browser.
export default defineConfig({
  testDir: 'tests/e2e',
  timeout: 60_000,
  workers: 1, // two shared cores
  retries: process.env.CI ? 1 : 0,
  reporter: [['list'], ['json', { outputFile: 'test-results/e2e.json' }]],
  use: {
    ...devices['Desktop Chrome'],
    channel: undefined,
    baseURL: process.env.UNDERFALL_E2E_URL ?? `http://127.0.0.1:${port}`,
    trace: 'retain-on-failure',
    launchOptions: {
      executablePath: process.env.CHROMIUM_PATH ?? '/usr/bin/chromium',
      args: [
        '--no-sandbox', // the tests may run as root
        '--disable-gpu',
        '--disable-quic',
        '--no-first-run',
        '--disable-background-networking',
        '--disable-component-update',
        '--disable-sync',
        '--disable-dev-shm-usage',
      ],
    },
  },
});
