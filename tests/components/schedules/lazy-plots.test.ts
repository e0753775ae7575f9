import { readFile, readdir } from 'node:fs/promises';
import path from 'node:path';
import { describe, expect, it } from 'vitest';

const ROOT = path.resolve(import.meta.dirname, '../../..');

async function sources(): Promise<{ file: string; text: string }[]> {
  const folders = await Promise.all(
    ['components', 'app', 'lib', 'diagram'].map(async (folder) =>
      (await readdir(path.join(ROOT, folder), { recursive: true }))
        .filter((name) => /\.tsx?$/.test(name))
        .map((name) => path.posix.join(folder, name)),
    ),
  );
  return Promise.all(
    folders.flat().map(async (file) => ({ file, text: await readFile(path.join(ROOT, file), 'utf8') })),
  );
}

describe('the plotting package', () => {
  it('is fetched only when a picture is shown: the sheets that show these do not carry it with their first paint', async () => {
    const all = await sources();
    const charts = all
      .filter(({ file, text }) => file.startsWith('components/plots/') && /from 'recharts'/.test(text))
      .map(({ file }) => path.posix.basename(file, '.tsx'));
    expect(charts.sort()).toEqual(['condition-chart', 'drop-chart', 'hours-chart', 'time-current-chart']);
    const whole = new RegExp(`^import (?!type ).* from '[^']*/(${charts.join('|')})'`, 'm');
    expect(all.filter(({ text }) => whole.test(text)).map(({ file }) => file)).toEqual([]);
  });
});
