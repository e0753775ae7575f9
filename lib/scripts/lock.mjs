import { mkdir, readFile, rm, writeFile } from 'node:fs/promises';
import path from 'node:path';
import { Stop } from './run.mjs';

/** True when that process is one of ours; a number alone may since have been given to another program. */
async function runs(pid) {
  const command = await readFile(`/proc/${pid}/cmdline`, 'utf8').catch(() => '');
  return command.includes('start.mjs');
}

/**
 * Keeps a second start in the same folder from using the same database beside the first.
 * @returns {Promise<() => Promise<void>>} gives the lock back
 */
export async function holdLock(folder, address) {
  await mkdir(folder, { recursive: true });
  const file = path.join(folder, 'running.json');
  const text = JSON.stringify({ pid: process.pid, address });
  for (;;) {
    try {
      await writeFile(file, text, { flag: 'wx' });
      return () => rm(file, { force: true });
    } catch (error) {
      if (error.code !== 'EEXIST') throw error;
    }
    const other = JSON.parse((await readFile(file, 'utf8').catch(() => '{}')) || '{}');
    if (other.pid !== process.pid && (await runs(other.pid)))
      throw new Stop(`Ohmstead runs already, at ${other.address} (process ${other.pid}). Stop that one first.`);
    await rm(file, { force: true }); // left by one that was killed
  }
}
