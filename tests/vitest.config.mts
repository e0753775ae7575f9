import { fileURLToPath } from 'node:url';
import react from '@vitejs/plugin-react';
import { defineConfig } from 'vitest/config';

const root = fileURLToPath(new URL('..', import.meta.url));
const resolve = {
  alias: {
    '@': root.replace(/\/$/, ''),
    // The real package throws outside a server bundle; the tests are the server here.
    'server-only': fileURLToPath(new URL('../node_modules/server-only/empty.js', import.meta.url)),
  },
};

/**
 * `node`: the engine and everything else without a database. `server`: routes and functions against PostgreSQL, which
 * its global setup starts when DATABASE_URL does not name one. `ui`: components in jsdom.
 */
export default defineConfig({
  root,
  test: {
    projects: [
      {
        root,
        resolve,
        test: {
          name: 'node',
          environment: 'node',
          include: ['tests/*.test.ts', 'tests/{diagram,shared,scripts}/**/*.test.ts'],
          testTimeout: 20_000,
        },
      },
      {
        root,
        resolve,
        test: {
          name: 'server',
          environment: 'node',
          include: ['tests/server/**/*.test.ts'],
          globalSetup: ['tests/setup/database.mts'],
          setupFiles: ['tests/setup/server.ts'],
          testTimeout: 30_000,
          hookTimeout: 60_000,
        },
      },
      {
        root,
        resolve,
        plugins: [react()],
        test: {
          name: 'ui',
          environment: 'jsdom',
          include: ['tests/components/**/*.test.{ts,tsx}'],
          setupFiles: ['tests/setup/ui.ts'],
          testTimeout: 20_000,
        },
      },
    ],
  },
});
