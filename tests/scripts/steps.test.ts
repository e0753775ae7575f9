import { mkdir, mkdtemp, readFile, rm, stat, writeFile } from 'node:fs/promises';
import net from 'node:net';
import os from 'node:os';
import path from 'node:path';
import { afterEach, beforeEach, describe, expect, it } from 'vitest';
import { fingerprint } from '@/lib/scripts/build.mjs';
import { explain } from '@/lib/scripts/explain.mjs';
import { isInstalled } from '@/lib/scripts/install.mjs';
import { holdLock } from '@/lib/scripts/lock.mjs';
import { freePort, isFree } from '@/lib/scripts/ports.mjs';
import { needRoom } from '@/lib/scripts/room.mjs';
import { Stop, run } from '@/lib/scripts/run.mjs';
import { loadSecrets, rememberPort } from '@/lib/scripts/secrets.mjs';

const ROOT = path.resolve(import.meta.dirname, '../..');
let folder: string;
beforeEach(async () => {
  folder = await mkdtemp(path.join(os.tmpdir(), 'ohmstead-steps-'));
});
afterEach(() => rm(folder, { recursive: true, force: true }));

describe('secrets', () => {
  it('are made once, differ, and can be read by their owner only', async () => {
    const made = await loadSecrets(folder);
    expect(await loadSecrets(folder)).toEqual(made);
    const values = [made.auth, made.passwords.owner, made.passwords.app];
    expect(new Set(values).size).toBe(3);
    for (const value of values) expect(Buffer.from(value, 'base64url')).toHaveLength(32);
    expect((await stat(path.join(folder, 'secrets.json'))).mode & 0o777).toBe(0o600);
    await rememberPort(folder, 4321);
    expect(await loadSecrets(folder)).toEqual({ ...made, clusterPort: 4321 });
    expect((await stat(path.join(folder, 'secrets.json'))).mode & 0o777).toBe(0o600);
  });

  it('are not made anew beside a database that the old ones open', async () => {
    await mkdir(path.join(folder, 'postgres'));
    await expect(loadSecrets(folder)).rejects.toThrow(/secrets\.json is missing/);
    await writeFile(path.join(folder, 'secrets.json'), '{"auth": "x", ');
    await expect(loadSecrets(folder)).rejects.toThrow(/is broken/);
  });
});

describe('dependencies', () => {
  const lock = path.join(os.tmpdir(), `ohmstead-lock-${process.pid}.json`);
  const packages = {
    '': { name: 'ohmstead' },
    'node_modules/a': { version: '1.0.0', integrity: 'sha512-a' },
    'node_modules/b-linux': { version: '2.0.0', integrity: 'sha512-b', optional: true },
  };
  const write = (file: string, content: object) => writeFile(file, JSON.stringify({ packages: content }));
  const fresh = async (installed: object) => {
    await write(lock, packages);
    const list = path.join(folder, 'list.json');
    await write(list, installed);
    return isInstalled(lock, list);
  };
  afterEach(() => rm(lock, { force: true }));

  it('are fresh when what is installed is what the lock file names', async () => {
    const { '': _, ...both } = packages;
    expect(await fresh(both)).toBe(true);
    expect(await fresh({ 'node_modules/a': packages['node_modules/a'] })).toBe(true); // made for another system
    expect(await fresh({})).toBe(false);
    expect(await fresh({ ...both, 'node_modules/a': { version: '1.0.1', integrity: 'sha512-x' } })).toBe(false);
    expect(await isInstalled(lock, path.join(folder, 'nothing.json'))).toBe(false);
  });

  it('of this very checkout are fresh', async () => {
    expect(
      await isInstalled(path.join(ROOT, 'package-lock.json'), path.join(ROOT, 'node_modules/.package-lock.json')),
    ).toBe(true);
  });
});

describe('the fingerprint of the sources', () => {
  it('changes with a byte, a name, a new file, and not with the time', async () => {
    const file = (name: string) => path.join(folder, 'app', name);
    await mkdir(path.join(folder, 'app'));
    await writeFile(file('a.ts'), 'one');
    const sources = [path.join(folder, 'app'), path.join(folder, 'missing')];
    const first = await fingerprint(sources);
    await writeFile(file('a.ts'), 'one');
    expect(await fingerprint(sources)).toBe(first);
    await writeFile(file('a.ts'), 'onE');
    const second = await fingerprint(sources);
    await writeFile(file('b.ts'), '');
    expect(new Set([first, second, await fingerprint(sources)]).size).toBe(3);
  });
});

describe('the lock', () => {
  it('is taken over from a process that is gone, and not from one that runs', async () => {
    await writeFile(
      path.join(folder, 'running.json'),
      JSON.stringify({ pid: 2 ** 22 - 1, address: 'http://127.0.0.1:1' }),
    );
    const release = await holdLock(folder, 'http://127.0.0.1:3000');
    expect(JSON.parse(await readFile(path.join(folder, 'running.json'), 'utf8')).pid).toBe(process.pid);
    await release();
    await release();
    const other = path.join(folder, 'start.mjs');
    await writeFile(other, 'setTimeout(() => {}, 20_000)');
    const { spawn } = await import('node:child_process');
    const child = spawn(process.execPath, [other]);
    try {
      await writeFile(
        path.join(folder, 'running.json'),
        JSON.stringify({ pid: child.pid, address: 'http://127.0.0.1:3000' }),
      );
      await expect(holdLock(folder, 'http://127.0.0.1:3100')).rejects.toThrow(
        /runs already, at http:\/\/127\.0\.0\.1:3000/,
      );
    } finally {
      child.kill();
    }
  });
});

describe('ports', () => {
  it('are told free from taken', async () => {
    const port = await freePort();
    expect(await isFree(port)).toBe(true);
    const server = net.createServer().listen(port, '127.0.0.1');
    await new Promise((resolve) => server.once('listening', resolve));
    expect(await isFree(port)).toBe(false);
    await new Promise((resolve) => server.close(resolve));
  });
});

describe('what a person is told', () => {
  it('is one line, with what to do', async () => {
    expect(explain(new Stop('Say it.'))).toBe('\nSay it.');
    expect(explain(new Stop(''))).toBe('');
    expect(explain(Object.assign(new Error('write'), { code: 'ENOSPC' }))).toMatch(/disk is full/);
    expect(explain(Object.assign(new Error('open'), { code: 'EACCES', path: '/data' }))).toMatch(
      /may not write \/data/,
    );
    expect(explain(new TypeError('x is undefined'))).toMatch(/x is undefined\n\s+at /);
    await expect(needRoom(folder, 1e9)).rejects.toThrow(/disk is full: 1000000000 MB are needed/);
    await expect(needRoom(folder, 1)).resolves.toBeUndefined();
  });

  it('when the port is taken names another one', async () => {
    const server = net.createServer().listen(0, '127.0.0.1');
    await new Promise((resolve) => server.once('listening', resolve));
    const { port } = server.address() as net.AddressInfo;
    const { status, output } = await run(process.execPath, [path.join(ROOT, 'lib/scripts/start.mjs')], {
      cwd: folder,
      env: { PORT: String(port) },
    });
    server.close();
    expect(status).toBe(1);
    expect(output.trim()).toBe(
      `Port ${port} is taken, by another program or an Ohmstead that runs already. Stop it, or take another: PORT=${port + 1} npm start`,
    );
  });

  it('when PORT is no port says so', async () => {
    const { status, output } = await run(process.execPath, [path.join(ROOT, 'lib/scripts/start.mjs')], {
      cwd: folder,
      env: { PORT: 'web' },
    });
    expect([status, output.trim()]).toEqual([1, 'PORT=web is not a port. Give a number like PORT=3100.']);
  });

  it('by a Node that is too old is told as well', async () => {
    const old = path.join(folder, 'old.mjs');
    await writeFile(old, `Object.defineProperty(process.versions, 'node', { value: '18.20.4' });`);
    const { status, output } = await run(
      process.execPath,
      ['--import', old, path.join(ROOT, 'lib/scripts/start.mjs')],
      { cwd: folder },
    );
    expect(status).toBe(1);
    expect(output).toMatch(/^Ohmstead needs Node 20\.19 or newer/);
  });
});
