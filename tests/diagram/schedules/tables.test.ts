import { describe, expect, it } from 'vitest';
import { isPoint } from '@/diagram/terminals/roles-of-parts';
import { examine } from '@/diagram/rules/examine';
import { emptyDocument } from '@/diagram/document/schema';
import { applyPatch } from '@/diagram/document/patch';
import { TABLE_IDS, isTyped, type FigureCell, type Row } from '@/diagram/schedules/types';
import { findingsOf } from '@/diagram/schedules/row-findings';
import { house, rowIn, shown, tableIn, typed } from './home';

const examination = examine(house);
const ways = tableIn(house, 'ways');

const value = (row: Row, column: string): number | null => {
  const cell = row.cells[column] as FigureCell;
  return cell.value ?? null;
};

describe('the schedule of ways', () => {
  it('prints the figures of the engine, way by way', () => {
    expect(ways.rows.map(({ id }) => id)).toEqual(examination.ways.map(({ part }) => part));
    for (const result of examination.ways) {
      const row = rowIn(ways, result.part);
      expect([result.part, value(row, 'ib'), value(row, 'iz'), value(row, 'capacity'), value(row, 'demand')]).toEqual([
        result.part,
        result.ib,
        result.iz,
        result.capacity,
        result.demandWatts,
      ]);
      for (const [column, figure] of [
        ['drop', result.dropPercent],
        ['zs', result.zs],
        ['zsMax', result.zsMax],
        ['opens', result.disconnects],
      ] as const)
        if (figure === null) expect([result.part, column, value(row, column)]).toEqual([result.part, column, null]);
        else expect(value(row, column)).toBeCloseTo(figure, 5);
    }
  });

  it('numbers the ways as the drawing does, mains first, each group by itself', () => {
    expect(ways.rows.map(({ name }) => name)).toEqual(ways.rows.map((_, i) => `Way ${i + 1}`));
    const groups = ways.rows.map(({ group }) => group);
    expect(
      groups.slice(0, 12).every((group) => group === 'mains') && groups.slice(12).every((group) => group === 'backup'),
    ).toBe(true);
  });

  it('names as its cable the run that leaves the board, not those in the room', () => {
    const oven = rowIn(ways, 'kitchen.way-heavy1');
    expect(['csa', 'length', 'laying'].map((column) => shown(house, oven, column))).toEqual(['2.5', '15', 'B1, 3']);
  });

  it('gives behind the inverter no more short circuit than the inverter can drive', () => {
    // The demonstration's inverter states 1200 VA at a start: 1200 / 230 = 5.2 A, by hand.
    for (const row of ways.rows.filter(({ group }) => group === 'backup'))
      expect(value(row, 'fault')).toBeCloseTo(1200 / 230, 6);
  });

  it('says by hand what a short circuit at the end of the oven comes to', () => {
    // 15 + 2 m of 2.5 mm2 twice over: 2 x 17 m x 7.41 mohm/m x 1.1965 at 70 degC, IEC 60228; the loop of the supply 0.32 ohm; Cmin 0.95.
    const ohm = 0.32 + 2 * 17 * 0.00741 * (1 + 0.00393 * 50);
    expect(value(rowIn(ways, 'kitchen.way-heavy1'), 'fault')).toBeCloseTo((0.95 * 230) / ohm, 3);
  });

  it('marks a cable that the device does not protect, with the finding that says so', () => {
    const oven = rowIn(ways, 'kitchen.way-heavy1');
    const { document, label } = typed(house, ways, oven, 'csa', '1.5');
    expect(label).toBe('Way 5: 2.5 to 1.5 mm2');
    const table = tableIn(document, 'ways');
    const thin = rowIn(table, oven.id);
    expect(thin.cells.iz).toMatchObject({ text: '12.3 < In', beyond: true });
    const found = findingsOf(thin, examine(document).findings).map(({ rule }) => rule);
    expect(found).toContain('undersized-cable');
    expect(findingsOf(oven, examination.findings).map(({ rule }) => rule)).not.toContain('undersized-cable');
  });

  it('says what a missing figure waits for', () => {
    const device = house.parts.find(({ id }) => id === 'kitchen.way-heavy1')!;
    const { rating: _gone, ...bare } = device as { rating?: number } & typeof device;
    const wires = house.wires.map((wire) => {
      const { cable, ...rest } = wire;
      return cable?.startsWith('kitchen.heavy1') ? rest : wire;
    });
    const document = {
      ...applyPatch(house, { set: { parts: [bare] } }),
      wires,
      supply: { ...house.supply, ra: undefined },
    };
    const row = rowIn(tableIn(document, 'ways'), 'kitchen.way-heavy1');
    const lacks = (column: string) => (row.cells[column] as FigureCell).lacks;
    expect([lacks('iz'), lacks('zs'), lacks('in'), lacks('csa')]).toEqual([
      'Iz needs how it is laid',
      'Zs needs the ohms of the electrode',
      'In needs the rating of the device',
      'The way has no cable yet: draw one on sheet 3',
    ]);
  });
});

describe('the other schedules', () => {
  it('have every cable, every load and every named part once', () => {
    const ids = (id: 'cables' | 'loads' | 'designations') =>
      tableIn(house, id)
        .rows.map((row) => row.id)
        .sort();
    expect(ids('cables')).toEqual(house.cables.map(({ id }) => id).sort());
    expect(ids('loads')).toEqual(
      house.parts
        .filter(isPoint)
        .map(({ id }) => id)
        .sort(),
    );
    expect(ids('designations')).toEqual(
      house.parts
        .filter(({ kind }) => kind !== 'joint')
        .map(({ id }) => id)
        .sort(),
    );
  });

  it('say of each load what it gets in each condition, as the examination does', () => {
    const loads = tableIn(house, 'loads');
    for (const { part, conditions } of examination.loads)
      for (const [condition, { fed, volts }] of Object.entries(conditions)) {
        const cell = rowIn(loads, part).cells[`on ${condition}`] as FigureCell;
        expect([part, condition, cell.text === 'dead']).toEqual([part, condition, !fed]);
        if (fed) expect(cell.value).toBe(volts);
      }
  });

  it('say how long the backup lasts, and how much longer without each load', () => {
    const [result] = examination.backup;
    const source = rowIn(tableIn(house, 'sources'), 'inverter');
    expect(value(source, 'hours')).toBeCloseTo(result!.autonomyHours!, 5);
    const loads = tableIn(house, 'backup').rows;
    expect(loads.reduce((sum, row) => sum + Number(shown(house, row, 'watts')), 0)).toBe(result!.watts);
    for (const row of loads) expect(value(row, 'without')!).toBeGreaterThan(result!.autonomyHours!);
  });

  it('fill every column of every row', () => {
    for (const id of TABLE_IDS) {
      const table = tableIn(house, id);
      for (const row of table.rows)
        for (const { id: column } of table.columns)
          expect([id, row.id, column, row.cells[column] !== undefined]).toEqual([id, row.id, column, true]);
    }
  });

  it('are empty, with words, of an empty drawing', () => {
    const empty = emptyDocument('Nothing yet', 'IEC', { system: 'TN-S', voltage: 230, frequency: 50 });
    for (const id of TABLE_IDS) expect(tableIn(empty, id).rows).toEqual([]);
    expect(tableIn(empty, 'ways').empty).toBe('No way yet: extend from the line bar.');
  });

  it('point typed cells at what is drawn, and at a field that it has', () => {
    const drawn = new Set([...house.parts, ...house.cables].map(({ id }) => id));
    for (const id of TABLE_IDS)
      for (const row of tableIn(house, id).rows)
        for (const cell of Object.values(row.cells))
          if (isTyped(cell)) expect(cell.field.ids.every((each) => drawn.has(each))).toBe(true);
  });
});
