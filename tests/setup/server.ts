import { rm } from 'node:fs/promises';
import os from 'node:os';
import path from 'node:path';
import { afterAll, inject, vi } from 'vitest';

process.env.DATABASE_URL = inject('databaseUrl');
process.env.NEXTAUTH_SECRET = 'a secret of the tests, long enough to sign a cookie';
process.env.NEXTAUTH_URL = 'http://127.0.0.1:3000';
process.env.UPLOADS_FOLDER = path.join(os.tmpdir(), `ohmstead-uploads-${process.pid}-${Date.now()}`);

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
  await rm(process.env.UPLOADS_FOLDER!, { recursive: true, force: true });
});
