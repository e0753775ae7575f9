import { chmod, mkdtemp, rm } from 'node:fs/promises';
import os from 'node:os';
import path from 'node:path';
import { startCluster } from './cluster.mjs';
import { migrate } from './migrate.mjs';
import { freePort } from './ports.mjs';
import { runServerScript } from './seed-demo.mjs';

/**
 * How long a save takes until its durable answer, on a database of its own that keeps its promises (fsync on):
 * node lib/scripts/bench-saves.mjs [saves a second, 100] [seconds, 15]
 */
const parent = await mkdtemp(path.join(os.tmpdir(), 'ohmstead-bench-'));
await chmod(parent, 0o755);
const cluster = await startCluster({
  folder: path.join(parent, 'cluster'),
  port: await freePort(),
  passwords: { owner: 'bench-only', app: 'bench-only' },
});
try {
  await cluster.createDatabase('ohmstead');
  await migrate(cluster.url('ohmstead', 'owner'));
  const env = { DATABASE_URL: cluster.url('ohmstead'), NEXTAUTH_SECRET: 'x'.repeat(32), NEXTAUTH_URL: 'http://127.0.0.1' };
  const { status, output } = await runServerScript('lib/scripts/bench-saves.ts', process.argv.slice(2), env);
  console.log(output.trim());
  process.exitCode = status;
} finally {
  await cluster.stop();
  await rm(parent, { recursive: true, force: true });
}
