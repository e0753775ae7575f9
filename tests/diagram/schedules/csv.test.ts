import { describe, expect, it } from 'vitest';
import { csvText } from '@/lib/shared/csv';
import { TABLE_IDS } from '@/diagram/schedules/types';
import { csvRows } from '@/diagram/schedules/csv';
import { house, rowIn, tableIn, typed } from './home';
import { readCsv } from './read-csv';

const head = {
  number: 'OH-207',
  title: 'Quarry Steps',
  revision: 'B',
  drawnOn: '2026-11-30',
  drawnBy: 'T. B.',
  state: 'issued',
  practice: 'IEC',
};

describe('a table as a file', () => {
  it.each(TABLE_IDS)('%s: every record has as many fields as the next, and every row is there', (id) => {
    const table = tableIn(house, id);
    const records = readCsv(csvText(csvRows(house, table, head)));
    expect(new Set(records.map(({ length }) => length)).size).toBe(1);
    const heads = records.findIndex(([first]) => first === 'Row' || first === 'Number, fed by');
    expect(records.length - heads - 1).toBe(table.rows.length);
  });

  it('says what it is, of which revision, by whom, in which state, with the cautions', () => {
    const records = readCsv(csvText(csvRows(house, tableIn(house, 'ways'), head)));
    expect(Object.fromEntries(records.slice(0, 7).map(([name, value]) => [name, value]))).toEqual({
      Schedule: 'Schedule of ways',
      Drawing: 'OH-207 Quarry Steps',
      Revision: 'B',
      Date: '2026-11-30',
      'Drawn by': 'T. B.',
      State: 'issued',
      Practice: 'IEC',
    });
    expect(records.filter(([name]) => name === 'Caution').map(([, words]) => words)).toEqual([
      'Design aid, not a permission. Verify every value by test.',
      'Isolate both sources, lock off, prove dead. Battery terminals are never dead.',
    ]);
  });

  it('gives figures as numbers and runs no formula', () => {
    const table = tableIn(house, 'ways');
    const evil = '=HYPERLINK("https://elsewhere.example","x"), "y"\nz';
    const { document } = typed(house, table, rowIn(table, 'kitchen.way-heavy1'), 'label', evil);
    const records = readCsv(csvText(csvRows(document, tableIn(document, 'ways'), head)));
    const heads = records.find(([first]) => first === 'Number, fed by')!;
    const row = records.find(([first]) => first === '5 mains')!;
    const at = (name: string) => row[heads.indexOf(name)];
    expect(at('Name')).toBe(`'${evil}`);
    expect([at('Cable, mm²'), at('Run, metres'), at('Capacity Iz, A'), at('Rating In, A')]).toEqual([
      '2.5',
      '15',
      '16.8',
      '16',
    ]);
  });
});
