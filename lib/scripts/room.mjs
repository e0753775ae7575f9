import { statfs } from 'node:fs/promises';
import { Stop } from './run.mjs';

/**
 * Refuses to begin what would fill the disk.
 * @param {number} megabytes that the next step may need
 */
export async function needRoom(folder, megabytes) {
  const { bavail, bsize } = await statfs(folder);
  const free = Math.floor((bavail * bsize) / 1_000_000);
  if (free < megabytes)
    throw new Stop(
      `The disk is full: ${megabytes} MB are needed here and ${free} MB are free. Make room and start again.`,
    );
}
