import { describe, expect, it } from 'vitest';
import { examine } from '@/diagram/rules/examine';
import { buildContext } from '@/diagram/rules/context';
import { backupPlots, hoursWithout, type BackupPlot } from '@/diagram/schedules/backup-plot';
import { conditionLoads } from '@/diagram/schedules/condition-loads';
import { dropWords, hoursWords, timeCurrentWords } from '@/diagram/schedules/plot-words';
import { bandFor, withstandLine } from '@/diagram/schedules/trip-points';
import { wayPlot } from '@/diagram/schedules/way-plot';
import type { OvercurrentDevice } from '@/diagram/calculations/trip-curve';
import { record } from '../reference';
import { house, rowIn, tableIn, typed } from './home';

const context = buildContext(house);
const examination = examine(house);

const mcb = (curve: 'B' | 'C' | 'D'): OvercurrentDevice => ({ kind: 'mcb', curve, ratingA: 16 });
const near = (points: ReturnType<typeof bandFor>, multiple: number) =>
  points.filter(({ currentA }) => Math.abs(currentA / 16 - multiple) < 1e-4);

describe('the band of a device (IEC 60898-1; sources in mcb.json)', () => {
  it.each(['B', 'C', 'D'] as const)('type %s stands upright at both printed multiples', (curve) => {
    const { holds_at, trips_at } = record('mcb', `type-${curve}`).value as { holds_at: number; trips_at: number };
    const points = bandFor(mcb(curve), 10, 1000);
    // Just below the lower multiple it holds 0.1 s, at it it may open at once; from the upper on it opens within 0.1 s.
    const [below, at] = near(points, holds_at);
    expect(below!.earliestS).toBeGreaterThanOrEqual(0.1);
    expect(at!.earliestS).toBe(0.01);
    const [before, surely] = near(points, trips_at);
    expect(before!.latestS).toBeGreaterThan(0.1);
    expect(surely!.latestS).toBe(0.1);
  });

  it('begins at the current that must never trip it, and has an end from the current that must', () => {
    const points = bandFor(mcb('B'), 10, 1000);
    const never = record('mcb', 'conventional-non-tripping').value as number;
    const must = record('mcb', 'conventional-tripping').value as number;
    expect(points[0]!.currentA).toBeCloseTo(16 * never, 3);
    const open = points.filter(({ latestS }) => latestS === 10_000);
    expect(Math.max(...open.map(({ currentA }) => currentA))).toBeLessThan(16 * must);
    expect(near(points, must).at(-1)!.latestS).toBeCloseTo(3600, 0);
    // At 2.55 In within 1 to 60 s: IEC 60898-1 Table 7, test c, from memory.
    const [test] = near(points, 2.55);
    expect(test!.earliestS).toBeGreaterThanOrEqual(0.99);
    expect(test!.latestS).toBeLessThanOrEqual(60.01);
  });

  it('of a gG fuse keeps its gates: 25 A holds 0.1 s at 150 A, melts within 0.1 s at 260 A (IEC 60269-1 Table 3, from memory)', () => {
    const points = bandFor({ kind: 'gG', ratingA: 25 }, 20, 1000);
    expect(points.every((point, i) => i === 0 || point.latestS <= points[i - 1]!.latestS)).toBe(true);
    expect(points.find(({ currentA }) => currentA >= 260)!.latestS).toBeLessThanOrEqual(0.1);
    expect(points.findLast(({ currentA }) => currentA <= 150)!.earliestS).toBeGreaterThanOrEqual(0.1);
  });

  it('refuses a picture without an extent', () => expect(() => bandFor(mcb('B'), 0, 10)).toThrow(/fromA/));
});

describe('what a conductor stands (IEC 60364-4-43 434.5.2)', () => {
  it('goes through the published points', () => {
    // T. Linsley, Basic Electrical Installation Work, p. 246: 10 mm2 stands 4000 A for 82.66 ms.
    const { t_ms } = record('worked-examples', 'WE08').value as { t_ms: number };
    const [point] = withstandLine({ csaMm2: 10, k: 115 }, t_ms / 1000, t_ms / 1000);
    expect(point!.currentA).toBeGreaterThan(3999);
    expect(point!.currentA).toBeLessThan(4001);
    // The same, Example 1: 1.1 mm2 is needed for 200 A during 0.4 s.
    const { I_A, S_mm2 } = record('worked-examples', 'WE06').value as { I_A: number; S_mm2: number };
    expect(withstandLine({ csaMm2: S_mm2, k: 115 }, 0.4, 5)[2]!.currentA).toBeCloseTo(I_A, 0);
  });

  it('is a straight line of slope -2 on log paper', () => {
    const [a, b, c] = withstandLine({ csaMm2: 2.5, k: 115 }, 0.01, 5);
    const slope = (p: typeof a, q: typeof a) => Math.log(q!.seconds / p!.seconds) / Math.log(q!.currentA / p!.currentA);
    expect([slope(a, b), slope(b, c)].map((each) => Number(each.toFixed(9)))).toEqual([-2, -2]);
  });
});

describe('the picture of a way', () => {
  it('has stations that rise to the drop which the schedule prints, for every way', () => {
    for (const { part, dropPercent } of examination.ways) {
      const plot = wayPlot(context, part)!;
      if (dropPercent === null) {
        expect(plot.drop).toBeNull();
        continue;
      }
      const { stations } = plot.drop!;
      expect(stations[0]).toMatchObject({ metres: 0, percent: 0 });
      expect(stations.at(-1)!.percent).toBeCloseTo(dropPercent, 5);
      expect(
        stations.every(
          (each, i) => i === 0 || (each.metres > stations[i - 1]!.metres && each.percent >= stations[i - 1]!.percent),
        ),
      ).toBe(true);
    }
  });

  it('has the oven at 17 m and the drop of 2.5 mm2 by the mV/A/m table, within the 2.5 % that the table rounds', () => {
    // BS 7671 Table 4D2B, 18 mV/A/m for 2.5 mm2; Ib 13.04 A; 17 m.
    const last = wayPlot(context, 'kitchen.way-heavy1')!.drop!.stations.at(-1)!;
    const published = (18 * (3000 / 230) * 17) / 1000 / 2.3;
    expect(last.metres).toBe(17);
    expect(Math.abs(last.percent / published - 1)).toBeLessThan(0.025);
  });

  it('says in words what is so, of a thin cable too', () => {
    const table = tableIn(house, 'ways');
    const plot = wayPlot(context, 'kitchen.way-heavy1')!;
    expect(timeCurrentWords(plot)[0]).toBe(
      'A short circuit at the end, 352 A, opens Q8 C16 within 100 ms; 2.5 mm² copper stands it for 669 ms.',
    );
    expect(timeCurrentWords(plot)[1]).toBe(
      'A fault to earth, 7.72 A, does not open Q8 C16 for sure; it is cleared in 40 ms, with Q2, 200 ms are allowed.',
    );
    expect(dropWords(plot)[0]).toBe(
      '1.71 % is lost up to E7, 17 m from the meter; 5 % is allowed for outlets, fans and heat.',
    );
    const { document } = typed(house, table, rowIn(table, 'kitchen.way-heavy1'), 'csa', '1.5');
    expect(timeCurrentWords(wayPlot(buildContext(document), 'kitchen.way-heavy1')!).at(-1)).toBe(
      'The trouble is overload: from 12.3 A to 23.2 A the device may let it pass for an hour.',
    );
  });
});

describe('the hours of a backup source', () => {
  it('are those of Peukert at the 20 h rate: 100 Ah at 10 A last 8.71 h with exponent 1.2', () => {
    const { t_h } = record('worked-examples', 'WE29').value as { t_h: number };
    const plot: BackupPlot = {
      inverter: 'g',
      name: 'G1',
      bank: { volts: 12, ah: 100, hours: 20, chemistry: 'flooded' },
      efficiency: 1,
      va: null,
      hoursWanted: null,
      loads: [
        { id: 'a', name: 'A', room: '', watts: 70, va: 70 },
        { id: 'b', name: 'B', room: '', watts: 50, va: 50 },
      ],
      assumed: '',
    };
    // Of the flooded bank half is taken, and 80 % is left by age: 8.71 h x 0.8^1.2 x 0.5.
    expect(hoursWithout(plot, new Set()).hours).toBeCloseTo(t_h * 0.8 ** 1.2 * 0.5, 2);
    expect(hoursWithout(plot, new Set(['a', 'b'])).hours).toBe(Infinity);
    expect(hoursWords(plot, new Set(['a']))[1]).toMatch(/^Without A: 50 W, /);
  });

  it('begin at what the examination says, and grow with each load that is off', () => {
    const [plot] = backupPlots(context);
    const all = hoursWithout(plot!, new Set());
    expect(all.hours).toBeCloseTo(examination.backup[0]!.autonomyHours!, 5);
    expect(all.watts).toBeCloseTo(examination.backup[0]!.watts, 6);
    let before = all.hours;
    const off = new Set<string>();
    for (const { id } of plot!.loads) {
      off.add(id);
      const { hours } = hoursWithout(plot!, off);
      expect(hours).toBeGreaterThan(before);
      before = hours;
    }
  });
});

describe('the load by condition', () => {
  it('is the demand on mains and all at once on battery, each against its rating', () => {
    const [result] = examination.backup;
    const loads = conditionLoads(context);
    expect(loads.map(({ condition, source }) => `${condition} ${source}`)).toEqual([
      'mains mains',
      'outage G1',
      'main-off G1',
    ]);
    expect(loads[0]).toMatchObject({ limitVa: 63 * 230, watts: expect.closeTo(examination.supply.demandWatts, 5) });
    expect(loads[1]).toMatchObject({ limitVa: 600, va: expect.closeTo(result!.va, 5) });
  });
});
