import 'server-only';
import { randomUUID } from 'node:crypto';
import { mkdir, open, readFile, rename, rm } from 'node:fs/promises';
import path from 'node:path';
import type { StorageDriver } from '@/lib/server/storage/driver';

const isMissing = (error: unknown) => (error as NodeJS.ErrnoException).code === 'ENOENT';
const KEY = /^[a-z0-9-]+(\/[a-z0-9-]+)*\.[a-z0-9]+$/;

/** Files in a folder. One is there whole or not at all: written beside, flushed, then put in its place. */
export function diskDriver(folder: string): StorageDriver {
  const fileOf = (key: string) => {
    if (!KEY.test(key)) throw new Error(`"${key}" is no key of a file.`);
    return path.resolve(/* turbopackIgnore: true */ folder, key);
  };
  return {
    async put(key, bytes) {
      const file = fileOf(key);
      await mkdir(path.dirname(file), { recursive: true, mode: 0o700 });
      const beside = `${file}.${randomUUID()}`;
      try {
        const handle = await open(beside, 'wx', 0o600);
        try {
          await handle.writeFile(bytes);
          await handle.sync();
        } finally {
          await handle.close();
        }
        await rename(beside, file);
      } catch (error) {
        await rm(beside, { force: true });
        throw error;
      }
    },
    async get(key) {
      try {
        return await readFile(fileOf(key));
      } catch (error) {
        if (isMissing(error)) return null;
        throw error;
      }
    },
    remove: (key) => rm(fileOf(key), { force: true }),
  };
}
