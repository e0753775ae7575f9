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
  it('is drawn in only where pictures are, and those only when one is shown: no other sheet carries it', async () => {
    const all = await sources();
    const charts = all.filter(({ text }) => /from 'recharts'/.test(text)).map(({ file }) => file);
    expect(charts.sort()).toEqual(
      ['condition', 'drop', 'hours', 'time-current'].map((name) => `components/plots/${name}-chart.tsx`),
    );
    for (const { file, text } of all) {
      const whole = [...text.matchAll(/^import .* from '.*-chart'/gm)].map(([line]) => line);
      expect([file, whole]).toEqual([file, []]);
    }
  });
});
