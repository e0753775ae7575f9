import { randomBytes } from 'node:crypto';
import { mkdtemp, rm } from 'node:fs/promises';
import os from 'node:os';
import path from 'node:path';
import { migrate } from '../../lib/scripts/migrate.mjs';
import { freePort } from '../../lib/scripts/ports.mjs';
import { seedDemo } from '../../lib/scripts/seed-demo.mjs';
import { serve } from '../../lib/scripts/serve.mjs';
import { throwawayCluster } from '../../lib/scripts/throwaway.mjs';

/** A server that a test may kill, with a database of its own: the same build that all other tests use. */
export interface OwnServer {
  url: string;
  /** Ends the process as a power cut would, from one moment to the next. */
  kill(): Promise<void>;
  /** Starts it again on the same port and database. */
  start(): Promise<void>;
  /** Asks it to stop, as Ctrl-C does. @returns ms that it took */
  stop(): Promise<number>;
  close(): Promise<void>;
}

/** Makes the database, fills it with the demo and starts the server. */
export async function ownServer(): Promise<OwnServer> {
  process.chdir(path.resolve(import.meta.dirname, '../..'));
  const port = await freePort();
  const url = `http://127.0.0.1:${port}`;
  const uploads = await mkdtemp(path.join(os.tmpdir(), 'ohmstead-uploads-'));
  const cluster = await throwawayCluster();
  await cluster.createDatabase('ohmstead');
  await migrate(cluster.url('ohmstead', 'owner'));
  const env = {
    DATABASE_URL: cluster.url('ohmstead'),
    NEXTAUTH_SECRET: randomBytes(32).toString('base64url'),
    NEXTAUTH_URL: url,
    OHMSTEAD_BUILD_DIR: '.next-test',
    UPLOADS_FOLDER: uploads,
  };
  await seedDemo({ env, wanted: true });
  let app: ReturnType<typeof serve> | null = null;
  const server: OwnServer = {
    url,
    async start() {
      app = serve({ host: '127.0.0.1', port, env });
      await app.ready(url);
    },
    async kill() {
      if (!app) return;
      process.kill(app.pid!, 'SIGKILL');
      await app.ended;
      app = null;
    },
    async stop() {
      const began = performance.now();
      await app?.stop();
      app = null;
      return performance.now() - began;
    },
    async close() {
      await server.kill();
      await cluster.stop();
      await rm(uploads, { recursive: true, force: true });
    },
  };
  await server.start();
  return server;
}
