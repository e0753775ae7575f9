import { execFile } from 'node:child_process';
import { mkdtemp, readFile, rm, writeFile } from 'node:fs/promises';
import { tmpdir } from 'node:os';
import path from 'node:path';
import { promisify } from 'node:util';
import { afterAll, beforeAll, describe, expect, it } from 'vitest';
import { paperSvg } from '@/diagram/paper/svg';
import { draftDocument } from '@/diagram/survey/draft';
import { glyphs } from '@/lib/server/pdf/glyphs';
import { sheetPdf } from '@/lib/server/pdf/sheet-pdf';
import { optionsOf, room } from '../../diagram/survey/surveys';

/** Letters drawn as shapes are the very letters: poppler paints both files, and the two pictures agree. */
const run = promisify(execFile);
const document = draftDocument([room('Study', { lamps: 1, outlets: 1 })], optionsOf());
const title = {
  number: 'OH-215',
  title: 'Weir Cottage',
  client: 'Łukasz Θeo Ωm',
  address: 'Weir Cottage, Tillmere',
  team: 'Tillmere Electrics',
  drawnBy: 'R. A.',
  drawnOn: '2026-11-30',
  checkedBy: null,
  revision: '-',
  state: 'a != b -> c',
};
const options = { paper: 'A4', title } as const;

let folder: string;
beforeAll(async () => {
  folder = await mkdtemp(path.join(tmpdir(), 'outlines-'));
  await writeFile(path.join(folder, 'text.pdf'), await sheetPdf({ document, ...options }));
  await writeFile(path.join(folder, 'shapes.pdf'), await sheetPdf({ document, ...options, outlines: true }));
}, 60_000);
afterAll(() => rm(folder, { recursive: true, force: true }));

async function grey(name: string): Promise<{ width: number; pixels: Buffer }> {
  await run('pdftoppm', ['-r', '120', '-gray', '-f', '1', '-l', '1', '-singlefile', `${name}.pdf`, name], { cwd: folder });
  const file = await readFile(path.join(folder, `${name}.pgm`));
  const [head = '', width = ''] = /^P5\s+(\d+)\s+\d+\s+255\s/.exec(file.subarray(0, 40).toString('latin1')) ?? [];
  return { width: Number(width), pixels: file.subarray(head.length) };
}

describe('text as outlines', () => {
  it('needs no font in the PDF, and says nothing that text would', async () => {
    const fonts = async (name: string) =>
      (await run('pdffonts', [path.join(folder, name)])).stdout.trim().split('\n').slice(2);
    expect((await fonts('text.pdf')).length).toBeGreaterThan(0);
    expect(await fonts('shapes.pdf')).toEqual([]);
    expect((await run('pdftotext', [path.join(folder, 'shapes.pdf'), '-'])).stdout.trim()).toBe('');
  });

  it('looks like the text at the same places', async () => {
    const [text, shapes] = [await grey('text'), await grey('shapes')];
    expect(shapes.width).toBe(text.width);
    expect(shapes.pixels.length).toBe(text.pixels.length);
    // poppler sets the bitmaps of letters on whole pixels: ink is looked for within two of them
    const near = [-2, -1, 0, 1, 2].flatMap((dy) => [-2, -1, 0, 1, 2].map((dx) => dy * text.width + dx));
    const inked = (picture: typeof text, at: number) => near.some((step) => (picture.pixels[at + step] ?? 255) < 170);
    for (const [one, other] of [
      [text, shapes],
      [shapes, text],
    ] as const) {
      const ink = [...one.pixels.keys()].filter((at) => one.pixels[at]! < 90);
      expect(ink.length).toBeGreaterThan(3000);
      expect(ink.filter((at) => !inked(other, at)).length).toBeLessThan(0.002 * ink.length);
    }
  });

  it('makes an SVG of paths alone', () => {
    const svg = paperSvg(document, { ...options, glyphs });
    expect(svg).not.toMatch(/<text|@font-face|NaN|undefined/);
    expect(svg.match(/<path/g)!.length).toBeGreaterThan(100);
  });
});
