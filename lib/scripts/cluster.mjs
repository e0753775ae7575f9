import { randomBytes } from 'node:crypto';
import {
  access,
  chmod,
  chown,
  mkdir,
  readFile,
  readdir,
  readlink,
  rm,
  stat,
  symlink,
  writeFile,
} from 'node:fs/promises';
import path from 'node:path';
import { installPackages } from './debian.mjs';
import { Stop, isRoot, lastLine, run } from './run.mjs';

/** A PostgreSQL cluster of the project's own, on loopback, run by an ordinary user: PostgreSQL refuses to run as root. */

const OWNER = 'ohmstead_owner';
const APP = 'ohmstead_app';
const ROOT_RUNS_AS = 'postgres';
const VERSIONS = '/usr/lib/postgresql';

const exists = (file) =>
  access(file).then(
    () => true,
    () => false,
  );

/** @returns {Promise<Map<number, string>>} folders of server programs by major version, newest last */
async function installed() {
  const names = await readdir(VERSIONS).catch(() => []);
  const versions = names
    .map(Number)
    .filter((version) => version >= 15)
    .sort((a, b) => a - b);
  const found = new Map();
  for (const version of versions) {
    const bin = path.join(VERSIONS, String(version), 'bin');
    if (await exists(path.join(bin, 'initdb'))) found.set(version, bin);
  }
  return found;
}

/** Runs one of PostgreSQL's programs as the user that may. */
function as(bin, program, args, options = {}) {
  const command = path.join(bin, program);
  if (!isRoot()) return run(command, args, options);
  // From the root folder, because user postgres may not be able to enter where we stand.
  return run('runuser', ['-u', ROOT_RUNS_AS, '--', command, ...args], { ...options, cwd: '/' });
}

/**
 * Root in a home that user postgres may not enter: the folder becomes a link to one under /var/lib. Everybody else, and
 * root elsewhere, keeps the cluster where it was asked for.
 * @returns where it is
 */
async function makeReachable(folder) {
  await mkdir(path.dirname(folder), { recursive: true });
  if (!isRoot()) return folder;
  if (await exists(folder)) return readlink(folder).catch(() => folder);
  const canEnter = await run('runuser', ['-u', ROOT_RUNS_AS, '--', 'test', '-x', path.dirname(folder)], { cwd: '/' });
  if (canEnter.status === 0) return folder;
  const real = path.join('/var/lib/ohmstead', randomBytes(6).toString('hex'));
  await mkdir(real, { recursive: true });
  await rm(folder, { force: true });
  await symlink(real, folder);
  return real;
}

async function ownFolder(folder) {
  await mkdir(folder, { recursive: true, mode: 0o700 });
  await chmod(folder, 0o700);
  if (!isRoot()) return;
  const [uid, gid] = await Promise.all(
    ['-u', '-g'].map(async (flag) => Number((await run('id', [flag, ROOT_RUNS_AS])).output)),
  );
  await chown(folder, uid, gid);
}

async function initialise(bin, folder, passwords, durable) {
  await ownFolder(folder);
  const secret = path.join(folder, 'password');
  await writeFile(secret, passwords.owner, { mode: 0o600 });
  if (isRoot()) {
    const { uid, gid } = await stat(folder);
    await chown(secret, uid, gid);
  }
  const data = path.join(folder, 'data');
  const made = await as(bin, 'initdb', [
    ...['-D', data, '-U', OWNER, '-A', 'scram-sha-256', `--pwfile=${secret}`, '-E', 'UTF8', '--locale=C.UTF-8'],
    ...['--data-checksums', '--no-instructions', ...(durable ? [] : ['--no-sync'])],
  ]);
  await rm(secret, { force: true });
  if (made.status !== 0) throw new Stop(`PostgreSQL could not make its data folder ${data}: ${lastLine(made.output)}`);
}

const LASTING = { fsync: 'on', synchronous_commit: 'on', full_page_writes: 'on' };
const THROWAWAY = { fsync: 'off', synchronous_commit: 'off', full_page_writes: 'off' };

/** Stops whatever cluster runs in the folder, whoever started it. */
export async function stopCluster(folder) {
  const bin = [...(await installed()).values()].at(-1);
  if (bin) await as(bin, 'pg_ctl', ['-D', path.join(folder, 'data'), '-m', 'immediate', '-w', '-t', '20', 'stop']);
}

/** The address of a database in a cluster of ours, for one of its two roles. */
export const clusterUrl = ({ port, passwords }, database, role = 'app') =>
  `postgres://${role === 'owner' ? OWNER : APP}:${passwords[role]}@127.0.0.1:${port}/${database}`;

/**
 * Starts the cluster in `folder`, making it first where there is none.
 * @param {{ folder: string, port: number, passwords: { owner: string, app: string }, durable?: boolean }} wanted
 *   `durable: false` is for tests only: it trades safety for speed
 * @returns {Promise<{ port: number, url: (database: string, role?: 'owner' | 'app') => string, createDatabase: (name: string) => Promise<void>, stop: () => Promise<void> }>}
 * @throws {Stop} one line on what is wrong and what to do
 */
export async function startCluster({ folder: asked, port, passwords, durable = true }) {
  let versions = await installed();
  if (versions.size === 0) {
    await installPackages(['postgresql'], 'PostgreSQL');
    versions = await installed();
  }
  if (versions.size === 0) throw new Stop('PostgreSQL 15 or newer was not found, even after installing it.');
  const folder = await makeReachable(asked);
  const data = path.join(folder, 'data');
  const stamp = await readFile(path.join(data, 'PG_VERSION'), 'utf8').catch(() => null);
  const isNew = stamp === null;
  if (isNew && (await readdir(folder).catch(() => [])).length > 0)
    throw new Stop(
      `The database folder ${folder} is broken: data/PG_VERSION is missing. Put back a copy, or move it away to begin anew: mv ${folder} ${folder}-broken`,
    );
  const version = isNew ? [...versions.keys()].at(-1) : Number(stamp);
  const bin = versions.get(version);
  if (!bin)
    throw new Stop(
      `The drawings in ${folder} belong to PostgreSQL ${stamp.trim()}, which is not installed: apt-get install -y postgresql-${stamp.trim()}`,
    );
  if (isNew) await initialise(bin, folder, passwords, durable);

  const log = path.join(folder, 'server.log');
  const settings = {
    ...(durable ? LASTING : THROWAWAY),
    listen_addresses: '127.0.0.1',
    unix_socket_directories: "''",
    password_encryption: 'scram-sha-256',
    max_connections: 60,
  };
  const options = Object.entries({ port, ...settings })
    .map(([name, value]) => `-c ${name}=${value}`)
    .join(' ');
  const start = () => as(bin, 'pg_ctl', ['-D', data, '-w', '-t', '60', '-l', log, '-o', options, 'start']);
  const ready = async () =>
    (await run(path.join(bin, 'pg_isready'), ['-q', '-h', '127.0.0.1', '-p', String(port)])).status === 0;
  let started = await start();
  if (started.status !== 0 && !(await ready())) {
    // A killed server leaves its lock file; `pg_ctl status` misleads then, so only the answer on the port decides.
    await as(bin, 'pg_ctl', ['-D', data, '-m', 'immediate', '-t', '20', 'stop']);
    await rm(path.join(data, 'postmaster.pid'), { force: true });
    started = await start();
  }
  if (started.status !== 0) {
    const reason = lastLine(await readFile(log, 'utf8').catch(() => started.output));
    throw new Stop(
      `The database in ${folder} does not start: ${reason} (its log: ${log}). Nothing was changed; to begin anew move it away: mv ${folder} ${folder}-broken`,
    );
  }

  const url = (database, role = 'app') => clusterUrl({ port, passwords }, database, role);
  const psql = async (database, sql) => {
    const where = ['-h', '127.0.0.1', '-p', String(port), '-U', OWNER, '-d', database];
    const { status, output } = await run(
      path.join(bin, 'psql'),
      ['-X', '-q', '-A', '-t', '-v', 'ON_ERROR_STOP=1', ...where],
      {
        input: sql,
        env: { PGPASSWORD: passwords.owner },
      },
    );
    if (status === 0) return output.trim();
    throw new Stop(
      `The database refused to be set up: ${lastLine(output)}. If .data/secrets.json was changed, put it back.`,
    );
  };
  if ((await psql('postgres', `select count(*) from pg_roles where rolname = '${APP}'`)) === '0')
    await psql('postgres', `create role ${APP} login password '${passwords.app}'`);

  return {
    port,
    url,
    /** A database whose tables the app may fill but does not own; one that is there is kept. */
    async createDatabase(name) {
      if ((await psql('postgres', `select count(*) from pg_database where datname = '${name}'`)) === '0')
        await psql('postgres', `create database ${name} owner ${OWNER}`);
      await psql(
        name,
        `revoke create on schema public from public;
         alter default privileges for role ${OWNER} in schema public grant select, insert, update, delete on tables to ${APP};
         alter default privileges for role ${OWNER} in schema public grant usage on sequences to ${APP};`,
      );
    },
    async stop() {
      await as(bin, 'pg_ctl', ['-D', data, '-m', 'fast', '-w', '-t', '30', 'stop']);
    },
  };
}
