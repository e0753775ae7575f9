import { defineConfig } from 'playwright/test';

// Chosen once by the main process; the workers inherit it.
const port = (process.env.E2E_PORT ??= String(20_000 + (process.pid % 20_000)));
const url = `http://127.0.0.1:${port}`;

export default defineConfig({
  testDir: '.',
  outputDir: '../../test-results/browser',
  fullyParallel: false,
  workers: 2,
  // One test looks at a dozen screens with axe: on a busy machine that takes a minute.
  timeout: 180_000,
  reporter: [['list'], ['json', { outputFile: process.env.E2E_REPORT ?? '../../test-results/browser.json' }]],
  use: {
    baseURL: url,
    viewport: { width: 1440, height: 900 },
    launchOptions: {
      executablePath: '/usr/bin/chromium',
      args: [
        ...['--headless', '--no-sandbox', '--disable-gpu', '--disable-quic', '--no-first-run'],
        ...['--disable-background-networking', '--disable-component-update', '--disable-sync'],
      ],
    },
  },
  webServer: {
    command: `node lib/scripts/browser-app.mjs ${port}`,
    cwd: '../..',
    url: `${url}/api/health`,
    timeout: 240_000,
    stderr: 'pipe',
    gracefulShutdown: { signal: 'SIGTERM', timeout: 15_000 },
  },
});
