import { describe, expect, test } from 'vitest';
import { adiabaticMm2, kFactor, letThroughA2s, withstandS } from '@/diagram/calculations/adiabatic';
import { coordination } from '@/diagram/calculations/capacity';
import { prospectiveA } from '@/diagram/calculations/prospective-current';
import { bandPoints, residualSelective, selectivity } from '@/diagram/calculations/selectivity';
import { rodOhm, rodsOhm } from '@/diagram/calculations/earth-electrode';
import { judgeReading } from '@/diagram/calculations/test-limits';
import { tripBand } from '@/diagram/calculations/trip-curve';
import { record } from '../reference';

describe('adiabatic k (Certsure Pocket Guide 14, BS 7671 Tables 54.2 and 54.3)', () => {
  test.each([
    ['k-cu-pvc-cable', 'Cu', 'PVC', true],
    ['k-cu-pvc-separate', 'Cu', 'PVC', false],
    ['k-cu-xlpe-cable', 'Cu', 'XLPE', true],
    ['k-cu-xlpe-separate', 'Cu', 'XLPE', false],
  ] as const)('%s', (id, material, insulation, inCable) =>
    expect(kFactor(material, insulation, inCable)).toBe(record('zs-max', id).value),
  );
  test('k-al-pvc', () =>
    expect({ separate: kFactor('Al', 'PVC', false), 'in cable': kFactor('Al', 'PVC', true) }).toEqual(
      record('zs-max', 'k-al-pvc').value,
    ));
  test("withstand and need are each other's inverse", () => {
    const t = withstandS({ csaMm2: 2.5, k: 115, currentA: 500 });
    expect(adiabaticMm2(500 ** 2 * t, 115)).toBeCloseTo(2.5, 12);
  });
  test('let-through of an mcb never exceeds a whole period nor its energy class (from memory)', () => {
    const device = { kind: 'mcb', curve: 'B', ratingA: 16 } as const;
    expect(letThroughA2s(device, 500)).toBe(500 ** 2 * 0.02);
    expect(letThroughA2s(device, 2000)).toBe(15000);
    expect(letThroughA2s(device, 6000)).toBe(35000);
    expect(letThroughA2s(device, 16)).toBe(Infinity);
  });
});

describe('coordination Ib <= In <= Iz, I2 <= 1.45 Iz (433.1.1, from memory)', () => {
  test('the limit itself is allowed', () =>
    expect(coordination({ ibA: 16, inA: 16, izA: 16 })).toEqual({
      designWithinDevice: true,
      deviceWithinCable: true,
      overloadWithinCable: true,
    }));
  test("a gG link at its cable's capacity lets 1.6 In pass", () =>
    expect(coordination({ ibA: 10, inA: 16, izA: 16, conventionalTrip: 1.6 }).overloadWithinCable).toBe(false));
  test.each([
    ['ibA', { ibA: -1, inA: 16, izA: 20 }],
    ['inA', { ibA: 1, inA: 0, izA: 20 }],
    ['izA', { ibA: 1, inA: 16, izA: NaN }],
  ])('refuses %s', (field, input) => expect(() => coordination(input)).toThrow(new RegExp(`^${field} is`)));
});

describe('prospective current', () => {
  test('Cmax over Cmin is the ratio of the two', () => {
    const at = (factor: number) => prospectiveA({ voltage: 230, loopOhm: 0.5, factor });
    expect(at(1.1) / at(0.95)).toBeCloseTo(1.1 / 0.95, 12);
  });
  test.each([
    ['voltage', { voltage: 0, loopOhm: 1 }],
    ['loopOhm', { voltage: 230, loopOhm: 0 }],
    ['factor', { voltage: 230, loopOhm: 1, factor: -1 }],
  ])('refuses %s', (field, input) => expect(() => prospectiveA(input)).toThrow(new RegExp(`^${field} is`)));
});

describe('selectivity', () => {
  const mcb = (curve: 'B' | 'C' | 'D', ratingA: number) => ({ kind: 'mcb', curve, ratingA }) as const;
  test('equal ratings are never selective', () => expect(selectivity(mcb('C', 16), mcb('B', 16), 0).alone).toBe(false));
  test('C32 before B10: alone up to 160 A, where the upper may open at once', () => {
    expect(selectivity(mcb('C', 32), mcb('B', 10), 150)).toMatchObject({ ratioHolds: true, uptoA: 160, alone: true });
    expect(selectivity(mcb('C', 32), mcb('B', 10), 400).alone).toBe(false);
  });
  test('a 63 A gG service fuse before B16 holds at 600 A', () =>
    expect(selectivity({ kind: 'gG', ratingA: 63 }, mcb('B', 16), 600).alone).toBe(true));
  test('rcds: S with three times the sensitivity (rcd.json: selectivity, from memory)', () => {
    expect(residualSelective({ sensitivityA: 0.1, delay: 'S' }, { sensitivityA: 0.03 })).toBe(true);
    expect(residualSelective({ sensitivityA: 0.1 }, { sensitivityA: 0.03 })).toBe(false);
    expect(residualSelective({ sensitivityA: 0.03, delay: 'S' }, { sensitivityA: 0.03 })).toBe(false);
  });
  test('points of a picture lie on the band and rise in current', () => {
    const points = bandPoints(mcb('B', 16), 10, 1000);
    expect(points.length).toBeGreaterThan(60);
    points.forEach((point, i) => {
      expect(tripBand(mcb('B', 16), point.currentA)).toEqual({ earliestS: point.earliestS, latestS: point.latestS });
      if (i > 0) expect(point.currentA).toBeGreaterThan(points[i - 1]!.currentA);
    });
  });
});

describe('earth electrode', () => {
  test('worked by hand: 100 ohm m, 2.4 m of 16 mm: 40.4 ohm', () => {
    const ohm = rodOhm({ resistivityOhmM: 100, lengthM: 2.4, diameterM: 0.016 });
    expect(ohm).toBeCloseTo((100 / (2 * Math.PI * 2.4)) * (Math.log(1200) - 1), 12);
    expect(ohm.toFixed(1)).toBe('40.4');
  });
  test('twice the resistivity, twice the resistance; two rods more than half of one', () => {
    const rod = { resistivityOhmM: 100, lengthM: 2, diameterM: 0.016 };
    expect(rodOhm({ ...rod, resistivityOhmM: 200 })).toBeCloseTo(2 * rodOhm(rod), 12);
    expect(rodsOhm({ oneOhm: 40, count: 2, efficiency: 0.9 })).toBeCloseTo(40 / 1.8, 12);
    expect(rodsOhm({ oneOhm: 40, count: 1, efficiency: 0.9 })).toBe(40);
  });
  test.each([
    ['resistivityOhmM', { resistivityOhmM: -1, lengthM: 2, diameterM: 0.01 }],
    ['lengthM', { resistivityOhmM: 100, lengthM: 0, diameterM: 0.01 }],
    ['diameterM', { resistivityOhmM: 100, lengthM: 2, diameterM: 3 }],
  ])('refuses %s', (field, rod) => expect(() => rodOhm(rod)).toThrow(new RegExp(`^${field} is`)));
});

describe('limits of the test sheet', () => {
  test('insulation of 1 Mohm at 500 V', () => {
    expect(judgeReading({ kind: 'insulation', megohm: 1 }).holds).toBe(true);
    expect(judgeReading({ kind: 'insulation', megohm: 0.99 })).toEqual({
      holds: false,
      limit: 'at least 1 Mohm at 500 V',
    });
  });
  test('a cold loop may read 80 % of the limit: C16 1.37 ohm, 1.09 on the sheet', () => {
    expect(judgeReading({ kind: 'zs', ohm: 1.09, limitOhm: 218.5 / 160, share: 0.8 }).holds).toBe(true);
    expect(judgeReading({ kind: 'zs', ohm: 1.1, limitOhm: 218.5 / 160, share: 0.8 }).holds).toBe(false);
  });
  test('rcd: 300 ms, 40 ms at five times, nothing at half', () => {
    const device = { sensitivityA: 0.03 };
    expect(judgeReading({ kind: 'rcd', device, multiple: 1, seconds: 0.301 }).holds).toBe(false);
    expect(judgeReading({ kind: 'rcd', device, multiple: 5, seconds: 0.04 }).holds).toBe(true);
    expect(judgeReading({ kind: 'rcd', device, multiple: 0.5, seconds: Infinity }).holds).toBe(true);
    expect(judgeReading({ kind: 'rcd', device, multiple: 0.5, seconds: 1 }).holds).toBe(false);
  });
  test('a delayed rcd that opens too early is as wrong as one too late', () =>
    expect(
      judgeReading({ kind: 'rcd', device: { sensitivityA: 0.1, delay: 'S' }, multiple: 1, seconds: 0.1 }).holds,
    ).toBe(false));
  test('continuity, polarity', () => {
    expect(judgeReading({ kind: 'continuity', ohm: 0.5, expectedOhm: 0.45 }).holds).toBe(true);
    expect(judgeReading({ kind: 'continuity', ohm: 1.5, expectedOhm: 0.45 }).holds).toBe(false);
    expect(judgeReading({ kind: 'polarity', right: false }).holds).toBe(false);
  });
  test.each([
    ['megohm', () => judgeReading({ kind: 'insulation', megohm: -1 })],
    ['ohm', () => judgeReading({ kind: 'zs', ohm: NaN, limitOhm: 1, share: 0.8 })],
    ['seconds', () => judgeReading({ kind: 'rcd', device: { sensitivityA: 0.03 }, multiple: 1, seconds: -1 })],
  ])('refuses %s', (field, run) => expect(run).toThrow(new RegExp(`^${field} is`)));
});
