import path from 'node:path';
import { buildIfChanged } from './build.mjs';
import { startCluster } from './cluster.mjs';
import { explain } from './explain.mjs';
import { installDependencies } from './install.mjs';
import { holdLock } from './lock.mjs';
import { migrate } from './migrate.mjs';
import { freePort, isFree } from './ports.mjs';
import { Stop } from './run.mjs';
import { loadSecrets, rememberPort } from './secrets.mjs';
import { seedDemo } from './seed-demo.mjs';
import { serve } from './serve.mjs';
import { needRoom } from './room.mjs';

const DATA = path.resolve('.data');

/** What a person may set: where to listen, how others reach it, and a database they have already. */
function settings() {
  const port = Number(process.env.PORT ?? 3000);
  if (!Number.isInteger(port) || port < 1 || port > 65535)
    throw new Stop(`PORT=${process.env.PORT} is not a port. Give a number like PORT=3100.`);
  const host = process.env.HOST ?? '127.0.0.1';
  const address = process.env.NEXTAUTH_URL ?? `http://${host}:${port}`;
  const own = ['127.0.0.1', 'localhost'].includes(host);
  if (!own && !process.env.NEXTAUTH_URL)
    throw new Stop(`Say how others reach it: HOST=${host} NEXTAUTH_URL=http://name-of-this-machine:${port} npm start`);
  return { port, host, own, address, given: process.env.DATABASE_URL };
}

/** The database: the person's own, or a cluster under .data that is made the first time. */
async function openDatabase(given, secrets) {
  if (given) return { app: given, owner: process.env.DATABASE_OWNER_URL ?? given, stop: async () => {} };
  const port = secrets.clusterPort && (await isFree(secrets.clusterPort)) ? secrets.clusterPort : await freePort();
  const cluster = await startCluster({ folder: path.join(DATA, 'postgres'), port, passwords: secrets.passwords });
  await rememberPort(DATA, cluster.port);
  await cluster.createDatabase('ohmstead');
  return { app: cluster.url('ohmstead'), owner: cluster.url('ohmstead', 'owner'), stop: cluster.stop };
}

/** Everything from an empty clone to a page that answers. Each step does nothing when it was done before. */
export async function start({ dev }) {
  const began = Date.now();
  const undo = [];
  let stopping = false;
  const shutDown = async () => {
    if (stopping) return;
    stopping = true;
    for (const step of undo.reverse()) await step();
  };
  try {
    const { port, host, own, address, given } = settings();
    if (!(await isFree(port, host)))
      throw new Stop(
        `Port ${port} is taken, by another program or an Ohmstead that runs already. Stop it, or take another: PORT=${port + 1} npm start`,
      );
    await needRoom('.', 200);
    undo.push(await holdLock(DATA, address));
    await installDependencies();
    const secrets = await loadSecrets(DATA);
    // Ctrl-C from here on ends in an orderly stop, also in the middle of a step.
    let child = null;
    const signalled = new Promise((resolve) => {
      for (const signal of ['SIGINT', 'SIGTERM', 'SIGHUP']) process.on(signal, () => resolve(signal));
    });
    const unlessSignalled = (work) => Promise.race([work, signalled.then(() => Promise.reject(new Stop('')))]);

    const database = await openDatabase(given, secrets);
    undo.push(database.stop);
    await unlessSignalled(migrate(database.owner));
    const env = {
      DATABASE_URL: database.app,
      NEXTAUTH_SECRET: process.env.NEXTAUTH_SECRET ?? secrets.auth,
      NEXTAUTH_URL: address,
    };
    const demo = await unlessSignalled(seedDemo({ env, wanted: !given && own }));
    if (!dev) await unlessSignalled(buildIfChanged('.next'));
    child = serve({ dev, host, port, env });
    undo.push(child.stop);
    await unlessSignalled(child.ready(address));
    console.log(welcome({ address, demo, own, seconds: (Date.now() - began) / 1000 }));
    const ended = await Promise.race([child.ended, signalled]);
    await shutDown();
    if (typeof ended === 'number')
      throw new Stop(`The server ended by itself with status ${ended}; what it said stands above.`);
    console.log('Stopped. Your drawings are kept in .data/.');
    process.exit(0);
  } catch (error) {
    await shutDown();
    const text = explain(error);
    if (text) console.error(text);
    process.exit(text ? 1 : 0);
  }
}

function welcome({ address, demo, own, seconds }) {
  const lines = ['', `Ohmstead is ready at ${address}  (${seconds.toFixed(1)} s)`, ''];
  if (demo) {
    lines.push(`  Demo team ${demo.team}. Password of all four: ${demo.password}`);
    for (const { roles, email } of demo.people) lines.push(`    ${roles.join(', ').padEnd(12)} ${email}`);
    if (!own)
      lines.push(
        '',
        '  Others can reach this and the password above is no secret: switch these people off on the sheet People.',
      );
    lines.push('');
  } else lines.push('  A first team is made with: npm run team -- "Name of the firm" "Your name" you@example.org', '');
  lines.push('  Stop with Ctrl-C.', '');
  return lines.join('\n');
}
