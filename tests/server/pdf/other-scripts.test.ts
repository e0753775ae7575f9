import { execFile } from 'node:child_process';
import { mkdtemp, rm, writeFile } from 'node:fs/promises';
import { tmpdir } from 'node:os';
import path from 'node:path';
import { promisify } from 'node:util';
import { afterAll, beforeAll, describe, expect, it } from 'vitest';
import { draftDocument } from '@/diagram/survey/draft';
import { runsOf } from '@/lib/server/pdf/fonts';
import { sheetPdf } from '@/lib/server/pdf/sheet-pdf';
import { optionsOf, sixRooms } from '../../diagram/survey/surveys';

const run = promisify(execFile);
const NAMES = ['مطبخ كبير', 'מטבח גדול', 'शयन कक्ष'];

describe('names in other scripts on paper', () => {
  let folder: string;
  beforeAll(async () => {
    folder = await mkdtemp(path.join(tmpdir(), 'scripts-'));
    const rooms = sixRooms().map((room, i) => ({ ...room, name: NAMES[i] ?? room.name }));
    const title = {
      ...{ number: 'OH-1', title: 'בית הגפן 3', client: 'M. Orrin', address: 'Weir 3', team: 'T', drawnBy: 'R. A.' },
      ...{ drawnOn: '2026-11-30', checkedBy: null, revision: '-', state: 'draft' },
    };
    const pdf = await sheetPdf({ document: draftDocument(rooms, optionsOf()), paper: 'A3', title, face: 'overview' });
    await writeFile(path.join(folder, 'a.pdf'), pdf);
  }, 60_000);
  afterAll(() => rm(folder, { recursive: true, force: true }));

  it('are written in their own letterings, none as a stand-in', async () => {
    const file = path.join(folder, 'a.pdf');
    const fonts = (await run('pdffonts', [file])).stdout;
    for (const script of ['Arabic', 'Hebrew', 'Devanagari']) expect(fonts).toMatch(new RegExp(`NotoSans${script}|Noto ?Sans ?${script}`, 'i'));
    const text = (await run('pdftotext', ['-raw', file, '-'])).stdout.replace(/[\u200e\u200f\u202a-\u202e\u2066-\u2069]/g, '');
    // poppler reads runs from the right in their own order
    for (const word of ['מטבח', 'גדול', 'הגפן']) expect(text).toContain(word);
    expect(text).not.toContain('?');
  });
});

describe('runs of a text', () => {
  it('keep words of a script that joins together, and stand as they are seen', () => {
    expect(runsOf('Kitchen, शयन कक्ष')).toEqual([
      { script: 'latin', text: 'Kitchen, ', offset: 0 },
      { script: 'devanagari', text: 'शयन कक्ष', offset: 9 },
    ]);
    // read from the right: the number of the house stands at the left, with its space between
    expect(runsOf('בית הגפן 3')).toEqual([
      { script: 'latin', text: '3 ', offset: 0 },
      { script: 'hebrew', text: 'בית הגפן', offset: 2 },
    ]);
    expect(runsOf('3, מטבח')).toEqual([
      { script: 'hebrew', text: 'מטבח', offset: 0 },
      { script: 'latin', text: ' ,3', offset: 4 },
    ]);
  });
});
