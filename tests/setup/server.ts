import { afterAll, inject, vi } from 'vitest';

process.env.DATABASE_URL = inject('databaseUrl');
process.env.NEXTAUTH_SECRET = 'a secret of the tests, long enough to sign a cookie';
process.env.NEXTAUTH_URL = 'http://127.0.0.1:3000';

/** The cookies of the request that is being answered: each test's browser puts its own here (see tests/server/browser.ts). */
vi.mock('next/headers', async () => {
  const { currentJar } = await import('../server/jar');
  return { cookies: async () => currentJar() };
});

afterAll(async () => {
  const { stopBackground } = await import('@/lib/server/drawings/background');
  const { sequelize } = await import('@/models');
  await stopBackground();
  await sequelize.close();
});
