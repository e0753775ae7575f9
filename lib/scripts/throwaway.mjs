import { chmod, mkdtemp, rm } from 'node:fs/promises';
import os from 'node:os';
import path from 'node:path';
import { startCluster } from './cluster.mjs';
import { freePort } from './ports.mjs';

/** A cluster for tests: in a temporary folder, fast and unsafe, gone with everything in it when stopped. */
export async function throwawayCluster() {
  const parent = await mkdtemp(path.join(os.tmpdir(), 'ohmstead-tests-'));
  await chmod(parent, 0o755);
  const cluster = await startCluster({
    folder: path.join(parent, 'cluster'),
    port: await freePort(),
    passwords: { owner: 'tests-only', app: 'tests-only' },
    durable: false,
  });
  return {
    ...cluster,
    async stop() {
      await cluster.stop();
      await rm(parent, { recursive: true, force: true });
    },
  };
}
