import { describe, expect, it } from 'vitest';
import { isRefusal } from '@/diagram/commands/types';
import { PatchSchema, applyPatch, invert } from '@/diagram/document/patch';
import { DocumentSchema } from '@/diagram/document/schema';
import { editCells } from '@/diagram/schedules/edit';
import type { TableId } from '@/diagram/schedules/types';
import { house, refOf, rowIn, shown, tableIn, typed } from './home';

const tables = { ways: tableIn(house, 'ways'), cables: tableIn(house, 'cables'), loads: tableIn(house, 'loads') };
const oven = rowIn(tables.ways, 'kitchen.way-heavy1');

const refused = (id: TableId, row: string, column: string, text: string): string => {
  const table = tableIn(house, id);
  const target = rowIn(table, row);
  const outcome = editCells(house, [{ name: target.name, ref: refOf(target, column) }], text, table.noun);
  return isRefusal(outcome) ? outcome.refused : 'taken';
};

describe('typing into a cell', () => {
  it.each([
    ['label', 'Oven and hob', 'Way 5: Kitchen oven to Oven and hob'],
    ['ref', 'Q40', 'Way 5: Q8 to Q40'],
    ['rating', 'B20', 'Way 5: C16 to B20'],
    ['csa', '4', 'Way 5: 2.5 to 4 mm2'],
    ['csa', '4 mm²', 'Way 5: 2.5 to 4 mm2'],
    ['length', '17,5', 'Way 5: 15 to 17.5 m'],
    ['length', '21 m', 'Way 5: 15 to 21 m'],
    ['laying', 'c 2', 'Way 5: B1, 3 to C, 2'],
    ['laying', 'B2', 'Way 5: B1, 3 to B2, 3'],
  ])('%s takes %s', (column, text, label) => {
    const after = typed(house, tables.ways, oven, column, text);
    expect(after.label).toBe(label);
    expect(shown(after.document, oven, column)).toBe(
      label
        .split(' to ')
        .at(-1)!
        .replace(/ (mm2|m)$/, ''),
    );
    expect(DocumentSchema.safeParse(after.document).success).toBe(true);
  });

  it('is a change as data that the server takes, and one undo gives the bytes back', () => {
    const outcome = editCells(house, [{ name: oven.name, ref: refOf(oven, 'csa') }], '4', 'ways');
    if (isRefusal(outcome)) throw new Error(outcome.refused);
    expect(PatchSchema.safeParse(outcome.patch).success).toBe(true);
    const after = applyPatch(house, outcome.patch);
    expect(JSON.stringify(applyPatch(after, invert(house, outcome.patch)))).toBe(JSON.stringify(house));
  });

  it('changes every run of the way that was as thick, and the protective core with it', () => {
    const { document } = typed(house, tables.ways, oven, 'csa', '4');
    const changed = document.cables.filter(({ id }) => id.startsWith('kitchen.heavy1'));
    expect(changed.map(({ csa, cpc }) => [csa, cpc])).toEqual([
      [4, 4],
      [4, 4],
    ]);
    expect(document.cables.filter(({ id }) => !id.startsWith('kitchen.heavy1'))).toEqual(
      house.cables.filter(({ id }) => !id.startsWith('kitchen.heavy1')),
    );
  });

  it('takes the protective core as it is sold where it stood so', () => {
    const flat = { ...house, practice: 'GB' as const, cables: house.cables.map((cable) => ({ ...cable, cpc: 1.5 })) };
    const { document } = typed(flat, tableIn(flat, 'ways'), oven, 'csa', '6');
    expect(document.cables.find(({ id }) => id === 'kitchen.heavy1.run')).toMatchObject({ csa: 6, cpc: 2.5 });
  });

  it('takes away what is typed away, where that may be missing', () => {
    const lamp = rowIn(tables.loads, 'hall.lamp2');
    const { document, label } = typed(house, tables.loads, lamp, 'pf', '');
    expect(label).toBe('E2: no power factor');
    expect(document.parts.find(({ id }) => id === 'hall.lamp2')).not.toHaveProperty('pf');
  });

  it('keeps percent as a share of one', () => {
    const table = tableIn(house, 'sources');
    const { document, label } = typed(house, table, rowIn(table, 'inverter'), 'efficiency', '90 %');
    expect(label).toBe('G1: 85 to 90 %');
    expect(document.parts.find(({ id }) => id === 'inverter')).toMatchObject({ efficiency: 0.9 });
  });

  it('takes a word by its first letters', () => {
    const table = tableIn(house, 'batteries');
    const { document } = typed(house, table, table.rows[0]!, 'chemistry', 'fl');
    expect(document.parts.find(({ kind }) => kind === 'battery')).toMatchObject({ chemistry: 'flooded' });
  });
});

describe('a text that cannot be read', () => {
  it.each([
    ['ways', 'kitchen.way-heavy1', 'length', '0', 'Metres, 1 to 500'],
    ['ways', 'kitchen.way-heavy1', 'length', '600', 'Metres, 1 to 500'],
    ['ways', 'kitchen.way-heavy1', 'length', 'far', 'Metres, 1 to 500'],
    ['ways', 'kitchen.way-heavy1', 'length', '', 'Metres, 1 to 500'],
    ['ways', 'kitchen.way-heavy1', 'csa', '3', 'Cable, mm²: one of 1.5, 2.5, 4, 6, 10, 16, 25, 35'],
    [
      'ways',
      'kitchen.way-heavy1',
      'laying',
      'under the floor',
      'How it is laid: A1, A2, B1, B2, C, D1, then 1 to 40 circuits together, for instance B1, 3',
    ],
    ['ways', 'kitchen.way-heavy1', 'label', 'x'.repeat(81), 'Name, 80 letters at most'],
    ['ways', 'kitchen.way-heavy1', 'rating', '', 'Rating: for instance B16'],
    ['loads', 'hall.lamp2', 'pf', '1.2', 'Power factor, 0.05 to 1'],
    ['loads', 'hall.lamp2', 'watts', '-9', 'Watts, 0 to 20000'],
    ['batteries', 'battery', 'count', '1.5', 'Batteries, 1 to 64'],
    ['batteries', 'battery', 'chemistry', 'l', 'taken'],
    ['batteries', 'battery', 'chemistry', 'salt', 'Chemistry: flooded, vrla, lfp'],
    ['cables', 'kitchen.heavy1.run', 'material', '', 'Conductor: Cu, Al'],
  ] as const)('%s, %s, %s "%s" is refused in words: %s', (table, row, column, text, message) => {
    expect(refused(table, row, column, text)).toBe(message);
  });

  it('names the kind of device whose rating is not understood', () => {
    expect(refused('ways', 'kitchen.way-heavy1', 'rating', 'lots')).toMatch(/^Rating of a .*"lots" is no rating/);
  });
});

describe('typing into several rows', () => {
  const outlets = tables.ways.rows.filter(({ id }) => /outlets\d$/.test(id));
  const targets = outlets.map((row) => ({ name: row.name, ref: refOf(row, 'rating') }));

  it('is one named change', () => {
    const outcome = editCells(house, targets, 'B20', 'ways');
    if (isRefusal(outcome)) throw new Error(outcome.refused);
    expect(outcome.label).toBe('5 ways: rating B20');
    const after = applyPatch(house, outcome.patch);
    expect(outlets.map((row) => shown(after, row, 'rating'))).toEqual(outlets.map(() => 'B20'));
    expect(JSON.stringify(applyPatch(after, invert(house, outcome.patch)))).toBe(JSON.stringify(house));
  });

  it('changes all of them or none', () => {
    const mixed = [...targets, { name: 'Way 99', ref: { of: 'part', ids: ['gone'], field: 'rating' } as const }];
    expect(editCells(house, mixed, 'B20', 'ways')).toEqual({ refused: 'Way 99 is no longer drawn.' });
  });
});
