import { describe, expect, test } from 'vitest';
import { loopOhm, maximumLoopOhm, measuredLimitOhm } from '@/diagram/calculations/loop-impedance';
import {
  leakageBudget,
  maximumElectrodeOhm,
  maximumSensitivityA,
  rcdBand,
  rcdFastS,
} from '@/diagram/calculations/rcd-time';
import { INSTANT, operatingCurrentA, tripBand } from '@/diagram/calculations/trip-curve';
import type { Curve } from '@/diagram/practices/types';
import { printed, record, reference } from '../reference';

const mcb = (curve: Curve, ratingA: number) => ({ kind: 'mcb', curve, ratingA }) as const;

describe('maximum Zs recomputed and equal to print (BS 7671 Table 41.3; Cmin 0.95)', () => {
  const rows = reference('zs-max').filter((entry) => /^[BCD]\d+$/.test(entry.id));
  test('13 ratings of three types', () => expect(rows).toHaveLength(39));
  for (const entry of rows)
    test(entry.id, () => {
      const device = mcb(entry.type as Curve, entry.In_A as number);
      const limit = maximumLoopOhm({ device, voltage: 230, withinS: 0.4, cMin: 0.95 });
      expect(operatingCurrentA(device, 0.4)).toBe(entry.Ia_A);
      expect(printed(limit, 6)).toBe(entry.value_exact);
      expect(printed(limit, 2)).toBe(entry.value);
      if (entry.table_value !== undefined) expect(printed(limit, 2)).toBe(entry.table_value);
      expect(printed(measuredLimitOhm(limit), 2)).toBe(entry.site_test_limit_80pc);
    });
  for (const entry of reference('zs-max').filter((each) => each.id.endsWith('-5s')))
    test(`${entry.id}: type D within 5 s (${entry.source.how})`, () =>
      expect(
        printed(maximumLoopOhm({ device: mcb('D', entry.In_A as number), voltage: 230, withinS: 5, cMin: 0.95 }), 2),
      ).toBe(entry.value));
  for (const entry of reference('zs-max').filter((each) => each.id.startsWith('old17th')))
    test(`${entry.id}: the 2008 edition had no Cmin`, () => {
      const limit = maximumLoopOhm({ device: mcb('B', entry.In_A as number), voltage: 230, withinS: 0.4, cMin: 1 });
      // Printed there cut off (2.875 as 2.87) or rounded.
      expect(Math.abs(limit - (entry.value as number))).toBeLessThan(0.0076);
    });
  test('Zs = Ze + R1 + R2', () => expect(loopOhm({ zeOhm: 0.35, r1Ohm: 0.2, r2Ohm: 0.3 })).toBeCloseTo(0.85, 12));
  test.each([
    ['voltage', () => maximumLoopOhm({ device: mcb('B', 6), voltage: 0, withinS: 0.4, cMin: 0.95 })],
    ['cMin', () => maximumLoopOhm({ device: mcb('B', 6), voltage: 230, withinS: 0.4, cMin: 1.2 })],
    ['withinS', () => maximumLoopOhm({ device: mcb('B', 6), voltage: 230, withinS: 0, cMin: 0.95 })],
    ['ratingA', () => maximumLoopOhm({ device: mcb('B', -6), voltage: 230, withinS: 0.4, cMin: 0.95 })],
    ['zeOhm', () => loopOhm({ zeOhm: -1, r1Ohm: 0, r2Ohm: 0 })],
    ['r2Ohm', () => loopOhm({ zeOhm: 0, r1Ohm: 0, r2Ohm: NaN })],
    ['limitOhm', () => measuredLimitOhm(0)],
  ])('refuses %s', (field, run) => expect(run).toThrow(new RegExp(`^${field} is`)));
});

describe('bands of an mcb (IEC 60898-1; mcb.json)', () => {
  for (const curve of ['B', 'C', 'D'] as const)
    test(`type ${curve} holds at its lower and opens within 0.1 s at its upper multiple`, () => {
      const value = record('mcb', `type-${curve}`).value as { holds_at: number; trips_at: number };
      expect(INSTANT[curve]).toEqual({ holds: value.holds_at, trips: value.trips_at });
      expect(tripBand(mcb(curve, 16), value.trips_at * 16).latestS).toBeLessThanOrEqual(0.1);
      expect(tripBand(mcb(curve, 16), value.holds_at * 16 * 0.999).earliestS).toBeGreaterThanOrEqual(0.1);
    });
  test('1.13 In may hold for ever, 1.45 In opens within the hour, two hours above 63 A', () => {
    const hold = record('mcb', 'conventional-non-tripping').value as number;
    const trip = record('mcb', 'conventional-tripping').value as number;
    expect(tripBand(mcb('B', 16), hold * 16 * 0.999).earliestS).toBe(Infinity);
    expect(tripBand(mcb('B', 16), trip * 16 * 0.999).latestS).toBe(Infinity);
    expect(tripBand(mcb('B', 16), trip * 16).latestS).toBeCloseTo(3600, 6);
    expect(tripBand(mcb('B', 80), trip * 80).latestS).toBeCloseTo(7200, 6);
  });
  test('2.55 In: 1 to 60 s up to 32 A, 1 to 120 s above (from memory)', () => {
    const value = record('mcb', 'test-2.55In').value as Record<string, [number, number]>;
    const at = (ratingA: number) => tripBand(mcb('C', ratingA), 2.55 * ratingA);
    expect(at(32).earliestS).toBeCloseTo(value['In<=32A']![0], 9);
    expect(at(32).latestS).toBeCloseTo(value['In<=32A']![1], 9);
    expect(at(40).earliestS).toBeCloseTo(value['In>32A']![0], 9);
    expect(at(40).latestS).toBeCloseTo(value['In>32A']![1], 9);
  });
  test('the band never widens backwards: more current, no later', () => {
    for (const device of [mcb('B', 6), mcb('C', 32), mcb('D', 63), { kind: 'gG', ratingA: 63 } as const]) {
      let last = tripBand(device, device.ratingA);
      for (let currentA = device.ratingA; currentA < 5000; currentA *= 1.05) {
        const band = tripBand(device, currentA);
        expect(band.earliestS).toBeLessThanOrEqual(band.latestS);
        expect(band.latestS).toBeLessThanOrEqual(last.latestS);
        expect(band.earliestS).toBeLessThanOrEqual(last.earliestS);
        last = band;
      }
    }
  });
  test('gates of gG links (IEC 60269-1 Table 3, from memory): 63 A melts within 5 s at 320 A and 0.1 s at 820 A', () => {
    const link = { kind: 'gG', ratingA: 63 } as const;
    expect(tripBand(link, 320).latestS).toBeCloseTo(5, 9);
    expect(tripBand(link, 820).latestS).toBeCloseTo(0.1, 9);
    expect(tripBand(link, 160).earliestS).toBeCloseTo(10, 9);
    expect(tripBand(link, 78).earliestS).toBe(Infinity);
    expect(operatingCurrentA(link, 5)).toBe(320);
    expect(operatingCurrentA(link, 0.4)).toBeGreaterThan(320);
    expect(operatingCurrentA(link, 0.4)).toBeLessThan(820);
  });
});

describe('classes of rcd (IEC 61008-1; rcd.json)', () => {
  const general = { sensitivityA: 0.03 };
  const delayed = { sensitivityA: 0.1, delay: 'S' } as const;
  test.each([
    [1, 'general-1x'],
    [2, 'general-2x'],
    [5, 'general-5x'],
  ] as const)('general at %s times', (multiple, id) =>
    expect(rcdBand(general, multiple * 0.03).latestS).toBe(record('rcd', id).value),
  );
  test.each([
    [1, 'S-1x'],
    [2, 'S-2x'],
    [5, 'S-5x'],
  ] as const)('S at %s times', (multiple, id) => {
    const value = record('rcd', id).value as { max: number; min: number };
    expect(rcdBand(delayed, multiple * 0.1)).toEqual({ earliestS: value.min, latestS: value.max });
  });
  test('holds at half its sensitivity; between half and whole it may open', () => {
    expect(rcdBand(general, (record('rcd', 'non-operating').value as number) * 0.03)).toEqual({
      earliestS: Infinity,
      latestS: Infinity,
    });
    const between = rcdBand(general, 0.02);
    expect(between.latestS).toBe(Infinity);
    expect(between.earliestS).toBeLessThan(Infinity);
  });
  test('additional protection: 30 mA, 40 ms', () => {
    const rule = record('rcd', 'additional-protection').value as { time_max_s: number };
    expect(rcdFastS()).toBe(rule.time_max_s);
  });
  for (const entry of reference('rcd').filter((each) => each.id.startsWith('tt-max-')))
    test(`${entry.id}: RA x IdN <= 50 V (${entry.source.title})`, () =>
      expect(printed(maximumElectrodeOhm(entry.IdN_A as number), 0)).toBe(entry.value));
  test('RA 200 ohm: 250 mA (On-Site Guide p. 78)', () =>
    expect(maximumSensitivityA(200)).toBe(record('rcd', 'tt-example-200').value));
  test('leakage budget of 30 % (from memory)', () => {
    expect(leakageBudget(0.03, 0.009)).toEqual({ allowedA: 0.3 * 0.03, holds: true });
    expect(leakageBudget(0.03, 0.0091).holds).toBe(false);
  });
  test.each([
    ['sensitivityA', () => rcdBand({ sensitivityA: 0 }, 1)],
    ['residualA', () => rcdBand(general, -1)],
    ['electrodeOhm', () => maximumSensitivityA(0)],
  ])('refuses %s', (field, run) => expect(run).toThrow(new RegExp(`^${field} is`)));
});
