import { randomBytes } from 'node:crypto';
import { mkdtemp, rm } from 'node:fs/promises';
import os from 'node:os';
import path from 'node:path';
import { buildIfChanged } from './build.mjs';
import { explain } from './explain.mjs';
import { migrate } from './migrate.mjs';
import { seedDemo } from './seed-demo.mjs';
import { serve } from './serve.mjs';
import { throwawayCluster } from './throwaway.mjs';

/**
 * The app for the browser tests: built into a folder of its own, on a throwaway database with the demo in it. Runs until
 * it is told to stop: node lib/scripts/browser-app.mjs PORT
 */
const port = Number(process.argv[2]);
const folder = process.env.OHMSTEAD_BUILD_DIR ?? '.next-test';
const address = `http://127.0.0.1:${port}`;
const undo = [];
let stopping;
/** Once: a signal and the end of the app that it causes both lead here, and the database has to be waited for. */
const stop = (status) => (stopping ??= takeDown(status));
async function takeDown(status) {
  for (const step of undo.reverse()) await step();
  process.exit(status);
}
for (const signal of ['SIGINT', 'SIGTERM']) process.on(signal, () => void stop(0));
try {
  await buildIfChanged(folder);
  const cluster = await throwawayCluster();
  undo.push(cluster.stop);
  await cluster.createDatabase('ohmstead');
  await migrate(cluster.url('ohmstead', 'owner'));
  const uploads = await mkdtemp(path.join(os.tmpdir(), 'ohmstead-uploads-'));
  undo.push(() => rm(uploads, { recursive: true, force: true }));
  const env = {
    DATABASE_URL: cluster.url('ohmstead'),
    NEXTAUTH_SECRET: randomBytes(32).toString('base64url'),
    NEXTAUTH_URL: address,
    OHMSTEAD_BUILD_DIR: folder,
    UPLOADS_FOLDER: uploads,
  };
  await seedDemo({ env, wanted: true });
  const app = serve({ host: '127.0.0.1', port, env });
  undo.push(app.stop);
  await stop(await app.ended);
} catch (error) {
  console.error(explain(error));
  await stop(1);
}
