import { createHash } from 'node:crypto';
import { readFile, readdir, writeFile } from 'node:fs/promises';
import path from 'node:path';
import { needRoom } from './room.mjs';
import { Stop, run } from './run.mjs';

/** What ends up in the built app. */
const SOURCES = [
  ...['app', 'components', 'diagram', 'lib/server', 'lib/shared', 'models', 'public'],
  ...[
    'proxy.ts',
    'instrumentation.ts',
    'next.config.mjs',
    'tailwind.config.ts',
    'postcss.config.mjs',
    'tsconfig.json',
    'package-lock.json',
  ],
];

async function filesUnder(place) {
  const entries = await readdir(place, { withFileTypes: true }).catch((error) => {
    if (error.code === 'ENOTDIR') return null;
    if (error.code === 'ENOENT') return [];
    throw error;
  });
  if (entries === null) return [place];
  const nested = await Promise.all(
    entries.map((entry) =>
      entry.isDirectory() ? filesUnder(path.join(place, entry.name)) : [path.join(place, entry.name)],
    ),
  );
  return nested.flat();
}

/** A fingerprint of the sources: the same files give the same one on every machine. */
export async function fingerprint(sources = SOURCES) {
  const files = (await Promise.all(sources.map(filesUnder))).flat().sort();
  const hash = createHash('sha256');
  for (const file of files)
    hash
      .update(`${file}\n`)
      .update(await readFile(file))
      .update('\n');
  return hash.digest('hex');
}

/** Builds the app when its sources changed since it was built into that folder. */
export async function buildIfChanged(folder) {
  const stamp = path.join(folder, 'sources.sha256');
  const now = await fingerprint();
  if ((await readFile(stamp, 'utf8').catch(() => '')) === now) return;
  await needRoom('.', 600);
  console.log('Building (about a minute, after a change of the sources only) ...');
  const { status, output } = await run(process.execPath, ['node_modules/next/dist/bin/next', 'build'], {
    env: { NODE_ENV: 'production', NEXT_TELEMETRY_DISABLED: '1', OHMSTEAD_BUILD_DIR: folder },
  });
  if (/ENOSPC/.test(output)) throw new Stop('The disk filled up during the build. Make room and start again.');
  if (status !== 0) throw new Stop(`The build failed:\n${output.trim().split('\n').slice(-30).join('\n')}`);
  await writeFile(stamp, now);
}
