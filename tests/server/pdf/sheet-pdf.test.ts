import { execFile } from 'node:child_process';
import { mkdtemp, readFile, rm, writeFile } from 'node:fs/promises';
import { tmpdir } from 'node:os';
import path from 'node:path';
import { promisify } from 'node:util';
import { afterAll, beforeAll, describe, expect, it } from 'vitest';
import { connectionPages } from '@/diagram/layout/connections-page';
import { draftDocument } from '@/diagram/survey/draft';
import { runsOf } from '@/lib/server/pdf/fonts';
import { POINTS, sheetPdf } from '@/lib/server/pdf/sheet-pdf';
import { optionsOf, sixRooms } from '../../diagram/survey/surveys';

/** The PDF is read back by poppler's tools: what they see is what a printer gets. */
const run = promisify(execFile);
const doc = draftDocument(sixRooms(), optionsOf());
const title = {
  number: 'OH-214',
  title: 'Saltmarsh Row 3',
  client: 'M. Arroyo',
  address: 'Łąkowa 3, Θήβα',
  team: 'Tillmere Electrics',
  drawnBy: 'R. A.',
  drawnOn: '2026-11-30',
  checkedBy: null,
  revision: 'C',
  state: 'a != b -> c',
};

let folder: string;
const files = { A4: '', A3: '' };
beforeAll(async () => {
  folder = await mkdtemp(path.join(tmpdir(), 'sheet-pdf-'));
  for (const paper of ['A4', 'A3'] as const) {
    files[paper] = path.join(folder, `${paper}.pdf`);
    await writeFile(
      files[paper],
      await sheetPdf({
        document: doc,
        paper,
        title,
        face: 'all',
        findings: [{ severity: 'advice', heading: 'Mind the step' }],
      }),
    );
  }
}, 60_000);
afterAll(() => rm(folder, { recursive: true, force: true }));

const text = async (file: string): Promise<string> =>
  (await run('pdftotext', ['-layout', file, '-'], { maxBuffer: 1 << 26 })).stdout;

describe('the sheet as PDF', () => {
  it.each([
    ['A4', 297, 210],
    ['A3', 420, 297],
  ] as const)('has every MediaBox of %s right to 0.01 mm', async (paper, width, height) => {
    const { stdout } = await run('pdfinfo', ['-box', '-f', '1', '-l', '999', files[paper]]);
    const boxes = [...stdout.matchAll(/MediaBox:\s+([\d.]+)\s+([\d.]+)\s+([\d.]+)\s+([\d.]+)/g)].map((m) =>
      m.slice(1).map(Number),
    );
    const pages = Number(/Pages:\s+(\d+)/.exec(stdout)![1]);
    expect(boxes).toHaveLength(pages);
    for (const [x, y, right, top] of boxes) {
      expect([x, y]).toEqual([0, 0]);
      expect(Math.abs((right! / 72) * 25.4 - width)).toBeLessThan(0.01);
      expect(Math.abs((top! / 72) * 25.4 - height)).toBeLessThan(0.01);
    }
  });

  it('has the overview and a page a room', async () => {
    const all = await text(files.A3);
    expect(all).toContain('Overview, single line');
    for (const { name } of connectionPages(doc)) expect(all).toContain(`Connections, ${name}`);
  });

  it('carries title block, cautions and designations as text, with ligatures off', async () => {
    const [first] = (await text(files.A3)).split('\f');
    for (const words of [
      'OH-214',
      'Saltmarsh Row 3',
      'Tillmere Electrics',
      'R. A. 2026-11-30',
      'Design aid, not a permission',
      'prove dead',
      'Battery terminals are never dead',
      'Mind the step',
      'Q0',
      'G1',
    ])
      expect(first).toContain(words);
    expect(first).toContain('a != b -> c');
    expect(first).toContain('Łąkowa 3, Θήβα');
  });

  it('says its title, author and the date of the drawing, not of the printing', async () => {
    const { stdout } = await run('pdfinfo', ['-isodates', files.A3]);
    expect(stdout).toMatch(/Title:\s+OH-214 Saltmarsh Row 3/);
    expect(stdout).toMatch(/Author:\s+R\. A\., Tillmere Electrics/);
    expect(stdout).toMatch(/CreationDate:\s+2026-11-30T12:00:00/);
  });

  it('is the same file each time', async () => {
    const again = await sheetPdf({
      document: doc,
      paper: 'A3',
      title,
      face: 'all',
      findings: [{ severity: 'advice', heading: 'Mind the step' }],
    });
    expect(again.equals(await readFile(files.A3))).toBe(true);
  }, 30_000);

  it('measures 100.0 mm along its check line and is not blank, on every page', async () => {
    await run('pdftoppm', ['-r', '100', '-gray', '-f', '1', '-l', '3', files.A3, path.join(folder, 'page')]);
    for (const page of await pagesOf(folder)) {
      const { width, height, pixels } = page;
      expect(width).toBe(Math.round((420 / 25.4) * 100));
      const dark = pixels.reduce((n, value) => n + Number(value < 128), 0);
      expect(dark).toBeGreaterThan(0.002 * width * height);
      // the longest unbroken level line of the strip that begins 2 mm right of the frame is the check line
      const y0 = Math.round(((29700 - 1000 - 3800 - 350) / 2540) * 100);
      const x0 = Math.round(((2000 + 200) / 2540) * 100);
      const lengths = [-1, 0, 1].map((dy) => {
        let x = x0;
        while (x < width && pixels[(y0 + dy) * width + x]! < 160) x++;
        return x - x0;
      });
      expect(Math.abs((Math.max(...lengths) / 100) * 25.4 - 100)).toBeLessThan(0.4);
    }
  }, 60_000);

  it('states the length of the check line exactly in its own coordinates', async () => {
    expect(10_000 * POINTS).toBeCloseTo((100 / 25.4) * 72, 9);
  });
});

describe('the lettering of a PDF', () => {
  it('splits a text into runs of one script, each sign in its place', () => {
    expect(runsOf('RA 20 Ω')).toEqual([
      { script: 'latin', text: 'RA 20 ', offset: 0 },
      { script: 'greek', text: 'Ω', offset: 6 },
    ]);
    expect(runsOf('3×1.5 mm²')).toEqual([{ script: 'latin', text: '3×1.5 mm²', offset: 0 }]);
    expect(runsOf('\u2126')).toEqual([{ script: 'greek', text: 'Ω', offset: 0 }]);
  });

  it('draws a sign that the lettering lacks as a question mark', () => {
    expect(runsOf('a漢b')).toEqual([{ script: 'latin', text: 'a?b', offset: 0 }]);
  });
});

interface Grey {
  width: number;
  height: number;
  pixels: Uint8Array;
}

/** Reads the PGM pictures that pdftoppm wrote, in order. */
async function pagesOf(dir: string): Promise<Grey[]> {
  const { stdout } = await run('ls', [dir]);
  const names = stdout
    .split('\n')
    .filter((name) => name.endsWith('.pgm'))
    .sort();
  return Promise.all(
    names.map(async (name) => {
      const bytes = await readFile(path.join(dir, name));
      const head = /^P5\s+(\d+)\s+(\d+)\s+255\s/.exec(bytes.subarray(0, 40).toString('latin1'))!;
      return {
        width: Number(head[1]),
        height: Number(head[2]),
        pixels: new Uint8Array(bytes.subarray(head[0].length)),
      };
    }),
  );
}
