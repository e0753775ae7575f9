import { readFile } from 'node:fs/promises';
import { needRoom } from './room.mjs';
import { Stop, lastLine, run } from './run.mjs';

const read = async (file) => JSON.parse(await readFile(file, 'utf8'));

/**
 * True when node_modules holds what the lock file names. npm keeps its own list of what it installed; packages for other
 * systems are named in the lock and rightly missing there.
 */
export async function isInstalled(lockFile = 'package-lock.json', listFile = 'node_modules/.package-lock.json') {
  const list = await read(listFile).catch(() => null);
  if (!list) return false;
  const { packages } = await read(lockFile);
  return Object.entries(packages).every(([name, { version, integrity, optional }]) => {
    if (name === '') return true;
    const have = list.packages[name];
    return have ? have.version === version && have.integrity === integrity : optional === true;
  });
}

/** Installs the dependencies exactly as the lock file says, when they are missing or stale. */
export async function installDependencies() {
  if (await isInstalled()) return;
  await needRoom('.', 1500);
  console.log('Installing dependencies (about a minute, once) ...');
  const npm = process.env.npm_execpath;
  const args = ['ci', '--include=dev', '--no-audit', '--no-fund', '--loglevel=error'];
  const { status, output } = npm ? await run(process.execPath, [npm, ...args]) : await run('npm', args);
  if (status === 0) return;
  const said = (pattern) => output.split('\n').find((line) => pattern.test(line));
  const reason =
    said(/npm error (Invalid|Missing):/) ?? said(/npm error (?!code|A complete log)\S/) ?? lastLine(output);
  if (/ENOSPC/.test(output))
    throw new Stop('The disk filled up while dependencies were installed. Make room and start again.');
  throw new Stop(
    `npm could not install the dependencies: ${reason.replace(/^npm error\s*/, '')}. Is the network there? Try: npm ci`,
  );
}
