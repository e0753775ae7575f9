import { chmod, mkdir, mkdtemp, readFile, rm, writeFile } from 'node:fs/promises';
import os from 'node:os';
import path from 'node:path';
import pg from 'pg';
import { afterAll, beforeAll, describe, expect, it } from 'vitest';
import { startCluster } from '@/lib/scripts/cluster.mjs';
import { freePort } from '@/lib/scripts/ports.mjs';

const passwords = { owner: 'of-the-owner', app: 'of-the-app' };
let parent: string;
let folder: string;
beforeAll(async () => {
  parent = await mkdtemp(path.join(os.tmpdir(), 'ohmstead-cluster-'));
  await chmod(parent, 0o755);
  folder = path.join(parent, 'postgres');
});
afterAll(() => rm(parent, { recursive: true, force: true }));

async function ask(url: string, sql: string): Promise<Record<string, string>[]> {
  const client = new pg.Client({ connectionString: url });
  await client.connect();
  try {
    return (await client.query(sql)).rows;
  } finally {
    await client.end();
  }
}

describe('the cluster of the drawings', () => {
  it('is made once, keeps what was written through a kill, and lets nobody in without the password', async () => {
    const port = await freePort();
    const cluster = await startCluster({ folder, port, passwords });
    await cluster.createDatabase('ohmstead');
    await ask(cluster.url('ohmstead', 'owner'), 'create table kept (id int)');
    await ask(cluster.url('ohmstead'), 'insert into kept values (7)');
    const settings = await ask(
      cluster.url('ohmstead'),
      `select name, setting from pg_settings where name in ('fsync', 'synchronous_commit', 'full_page_writes', 'data_checksums', 'listen_addresses')`,
    );
    expect(Object.fromEntries(settings.map(({ name, setting }) => [name, setting]))).toEqual({
      fsync: 'on',
      synchronous_commit: 'on',
      full_page_writes: 'on',
      data_checksums: 'on',
      listen_addresses: '127.0.0.1',
    });
    await expect(ask(cluster.url('ohmstead').replace(passwords.app, 'a-guess'), 'select 1')).rejects.toThrow(
      /password authentication failed/,
    );

    const pid = Number((await readFile(path.join(folder, 'data/postmaster.pid'), 'utf8')).split('\n')[0]);
    process.kill(pid, 'SIGKILL');
    const again = await startCluster({ folder, port: await freePort(), passwords });
    await again.createDatabase('ohmstead');
    expect(await ask(again.url('ohmstead'), 'select id from kept')).toEqual([{ id: 7 }]);
    await again.stop();
    await expect(ask(again.url('ohmstead'), 'select 1')).rejects.toThrow(/ECONNREFUSED/);
  }, 60_000);

  it('whose folder is broken says so in one line and touches nothing', async () => {
    const broken = path.join(parent, 'broken');
    await mkdir(path.join(broken, 'data'), { recursive: true });
    await writeFile(path.join(broken, 'data/base'), 'something of a person');
    await expect(startCluster({ folder: broken, port: await freePort(), passwords })).rejects.toThrow(
      /PG_VERSION is missing.*mv /,
    );
    expect(await readFile(path.join(broken, 'data/base'), 'utf8')).toBe('something of a person');
    await writeFile(path.join(broken, 'data/PG_VERSION'), '9\n');
    await expect(startCluster({ folder: broken, port: await freePort(), passwords })).rejects.toThrow(
      /belong to PostgreSQL 9, which is not installed/,
    );
  }, 30_000);

  it('that does not start tells why and where its log is', async () => {
    const port = await freePort();
    const cluster = await startCluster({ folder: path.join(parent, 'other'), port, passwords });
    await cluster.stop();
    await rm(path.join(parent, 'other/data/global/pg_control'));
    const failed = startCluster({ folder: path.join(parent, 'other'), port, passwords });
    await expect(failed).rejects.toThrow(/does not start: .*server\.log/s);
    await expect(failed).rejects.toThrow(/Nothing was changed/);
  }, 60_000);
});
