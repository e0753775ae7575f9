import { access, chmod, mkdtemp, readFile, readdir, rm, writeFile } from 'node:fs/promises';
import os from 'node:os';
import path from 'node:path';
import { startCluster, stopCluster } from './cluster.mjs';
import { freePort } from './ports.mjs';

const PREFIX = 'ohmstead-tests-';

/** Clusters whose maker was killed before it could stop them: nobody else would. */
async function sweepAbandoned() {
  for (const name of await readdir(os.tmpdir())) {
    if (!name.startsWith(PREFIX)) continue;
    const parent = path.join(os.tmpdir(), name);
    const maker = await readFile(path.join(parent, 'maker'), 'utf8').catch(() => null);
    const runs =
      maker === null ||
      (await access(`/proc/${maker}`).then(
        () => true,
        () => false,
      ));
    if (runs) continue;
    await stopCluster(path.join(parent, 'cluster'));
    await rm(parent, { recursive: true, force: true });
  }
}

/** A cluster for tests: in a temporary folder, fast and unsafe, gone with everything in it when stopped. */
export async function throwawayCluster() {
  await sweepAbandoned();
  const parent = await mkdtemp(path.join(os.tmpdir(), PREFIX));
  await chmod(parent, 0o755);
  await writeFile(path.join(parent, 'maker'), String(process.pid));
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
