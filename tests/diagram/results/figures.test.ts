import { describe, expect, test } from 'vitest';
import { backupHome, smallHome } from '@/diagram/document/home';
import type { Drawing } from '@/diagram/document/builder';
import { examine } from '@/diagram/rules/examine';

const way = (home: Drawing, id: string) => examine(home.document()).ways.find(({ part }) => part === id)!;
/** ohm/m of copper at 70 degC, IEC 60228 and 0.00393 per K */
const hot = (per20: number) => per20 * 1.1965;

describe('ways, by hand', () => {
  // Q11 B6: 9 m of 1.5 mm2 to the box, 5 m more to the lamp E1 of 12 W at 0.9; outlet X1 of 100 W at the box. TN-S, Ze 0.4.
  const q11 = way(smallHome(), 'Q11');
  test('design current: 12 / (230 x 0.9) + 100 / 230', () => {
    expect(q11.ib).toBeCloseTo(12 / 207 + 100 / 230, 6);
    expect(q11).toMatchObject({ in: 6, connectedWatts: 112, demandWatts: 112, points: 2, rcd: 'Q2' });
  });
  test('capacity by method C: 19.5 A, nothing to correct', () =>
    expect(q11).toMatchObject({ capacity: 19.5, iz: 19.5 }));
  test('drop at the lamp: both currents over 9 m, its own over 5 m, line and neutral', () => {
    const lamp = 12 / 207;
    const drop = 2 * hot(0.0121) * (9 * (lamp + 100 / 230) + 5 * lamp);
    expect(q11.dropPercent).toBeCloseTo((100 * drop) / 230, 5);
  });
  test('Zs at the lamp: Ze + (R1 + R2) of 14 m, hot; limit 0.95 x 230 / 30', () => {
    expect(q11.zs).toBeCloseTo(0.4 + 2 * hot(0.0121) * 14, 6);
    expect(q11.zsMax).toBeCloseTo((0.95 * 230) / 30, 6);
  });
  test('cleared by the rcd in 40 ms; without it by the breaker in 0.1 s', () => {
    expect(q11.disconnects).toBe(0.04);
    expect(way(smallHome({ rcd: false }), 'Q11')).toMatchObject({ disconnects: 0.1, rcd: null });
  });
  test('TT: Zs is the electrode plus the copper, its limit 50 V over the sensitivity', () => {
    const tt = way(smallHome({ supply: { system: 'TT', ra: 60, ze: undefined } }), 'Q11');
    expect(tt.zs).toBeCloseTo(60 + 2 * hot(0.0121) * 14, 6);
    expect(tt.zsMax).toBeCloseTo(50 / 0.03, 6);
    expect(tt.disconnects).toBe(0.04);
  });
  test('four circuits together by B1: 17.5 x 0.65', () => {
    const grouped = way(smallHome().cable('k11', 1.5, 9, { method: 'B1', grouped: 4 }), 'Q11');
    expect(grouped).toMatchObject({ capacity: 17.5 });
    expect(grouped.iz).toBeCloseTo(17.5 * 0.65, 9);
  });
  test('what is not known is null, not a guess', () => {
    expect(way(smallHome({ supply: { ze: undefined } }), 'Q11')).toMatchObject({
      zs: null,
      zsMax: null,
      disconnects: null,
    });
    expect(way(smallHome().set('E1', { watts: undefined }), 'Q11').ib).toBeNull();
    expect(way(smallHome().set('Q11', { rating: undefined }), 'Q11').in).toBeNull();
  });
  test('the way of an inverter carries its charger and what passes through it', () => {
    // 20 A x 12 V / 0.85 = 282.4 W charging; 12 W and 100 W pass: lighting 66 %, the only outlets whole.
    const { ib, connectedWatts } = way(backupHome(), 'Q3');
    expect(connectedWatts).toBeCloseTo(282.352941 + 112, 5);
    expect(ib).toBeCloseTo(282.352941 / 230 + 0.66 * (12 / 207) + 100 / 230, 6);
  });
});

describe('the supply', () => {
  test('ipf is voltage over zln, without voltage factor', () => {
    expect(examine(smallHome({ supply: { zln: 0.25 } }).document()).supply.ipf).toBe(920);
    expect(examine(smallHome({ supply: { zln: undefined } }).document()).supply.ipf).toBeNull();
  });
  test('the lines of the demand add up to it', () => {
    const { supply } = examine(backupHome().heater('E9', 'S9', 'Q11', { watts: 1000 }).document());
    expect(supply.lines.reduce((sum, { demand }) => sum + demand, 0)).toBeCloseTo(supply.demandWatts, 4);
    expect(supply.lines.map(({ what }) => what)).toEqual([
      'Lamps and fans (2)',
      'Outlets, by way (2)',
      'Heating and power',
      'Charging of the backup source',
    ]);
    for (const line of supply.lines) expect(line.source.length).toBeGreaterThan(10);
    expect(supply.conditions).toEqual(['mains', 'outage', 'main-off']);
  });
});

describe('the backup source', () => {
  const [g1] = examine(backupHome().document()).backup;
  test('running, start, charger and battery current', () => {
    expect(g1).toMatchObject({ inverter: 'G1', watts: 112, dischargeDepth: 0.5, ageing: 0.8, peukert: 1.1 });
    expect(g1!.va).toBeCloseTo(12 / 0.9 + 100, 6);
    expect(g1!.surgeVa).toBeCloseTo(g1!.va, 6);
    expect(g1!.chargeWatts).toBeCloseTo(282.352941, 6);
    expect(g1!.dcAmps).toBeCloseTo(700 / (0.85 * 10.5), 5);
  });
  test('hours by hand: 20 (160 / (10.98 x 20))^1.1 x 0.5', () =>
    expect(g1!.autonomyHours).toBeCloseTo(20 * (160 / ((112 / (0.85 * 12)) * 20)) ** 1.1 * 0.5, 5));
  test('an inverter that is off, or without a battery, is none', () => {
    expect(examine(backupHome({ state: 'off' }).document()).backup).toEqual([]);
    expect(examine(backupHome().drop('G2').document()).backup).toEqual([]);
  });
});

describe('loads', () => {
  const { loads } = examine(backupHome().document());
  const at = (part: string) => loads.find((load) => load.part === part)!.conditions;
  test('who feeds whom in each condition', () => {
    expect(at('E2').mains).toMatchObject({ fed: true, from: 'SUP', overcurrent: 'Q21', rcd: 'Q5' });
    expect(at('E2').outage).toMatchObject({ fed: true, from: 'G1' });
    expect(at('E1').outage).toEqual({ fed: false, from: null, volts: 0, overcurrent: null, rcd: null });
  });
  test('volts: below the supply by what its loop and the run lose', () => {
    const { volts } = at('X1').mains!;
    expect(volts).toBeLessThan(230);
    expect(volts).toBeGreaterThan(229);
    expect(examine(smallHome({ supply: { zln: undefined } }).document()).loads[0]!.conditions.mains!.volts).toBeNull();
  });
  test('sockets without an assumed load are not listed', () =>
    expect(examine(smallHome().set('X1', { load: undefined }).document()).loads.map(({ part }) => part)).toEqual([
      'E1',
    ]));
});
