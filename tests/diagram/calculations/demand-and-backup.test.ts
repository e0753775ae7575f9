import { describe, expect, test } from 'vitest';
import { allowanceText, allowedA } from '@/diagram/calculations/allowance';
import {
  autonomyCurve,
  autonomyHours,
  chargingWatts,
  peukertHours,
  rechargeHours,
  whatIfs,
} from '@/diagram/calculations/autonomy';
import { bankOf, joined } from '@/diagram/calculations/battery-bank';
import { batteryFuseA, batteryLead, constantPowerDrop } from '@/diagram/calculations/battery-lead';
import { backupLoad, currentAtCutoffA } from '@/diagram/calculations/backup-load';
import { apparentCurrentA, designCurrentA } from '@/diagram/calculations/design-current';
import { maximumDemand, type DemandItem } from '@/diagram/calculations/maximum-demand';
import { practices } from '@/diagram/practices';
import { record } from '../reference';

describe('design current', () => {
  test('P / (U pf)', () => expect(designCurrentA({ watts: 27, voltage: 230, pf: 0.9 })).toBeCloseTo(27 / 207, 12));
  test('lamps with drivers by their stated VA', () => expect(apparentCurrentA({ va: 46, voltage: 230 })).toBe(0.2));
  test.each([
    ['watts', { watts: -1, voltage: 230 }],
    ['voltage', { watts: 1, voltage: 0 }],
    ['pf', { watts: 1, voltage: 230, pf: 0 }],
  ])('refuses %s', (field, load) => expect(() => designCurrentA(load)).toThrow(new RegExp(`^${field} is`)));
});

describe('maximum demand, line by line', () => {
  const load = (group: DemandItem['group'], watts: number): DemandItem => ({ group, watts, currentA: watts / 230 });
  const items = [
    load('lighting', 460),
    load('sockets', 2300),
    load('sockets', 1150),
    load('cooker', 6900),
    load('thermostatic-water', 3000),
  ];
  test('every line can be checked by hand', () => {
    const demand = maximumDemand(items, practices.GB);
    const amps = Object.fromEntries(demand.rows.map((row) => [row.group, row.demandA]));
    expect(amps.lighting).toBeCloseTo(2 * 0.66, 12);
    expect(amps.sockets).toBeCloseTo(10 + 0.4 * 5, 12);
    expect(amps.cooker).toBeCloseTo(10 + 0.3 * 20, 12);
    expect(amps['thermostatic-water']).toBeCloseTo(3000 / 230, 12);
    expect(demand.demandA).toBeCloseTo(
      Object.values(amps).reduce((sum, a) => sum + a, 0),
      12,
    );
    expect(demand.demandWatts).toBeCloseTo(demand.demandA * 230, 9);
    expect(demand.connectedWatts).toBe(13810);
    for (const row of demand.rows) expect(row.source).not.toBe('');
  });
  test('an allowance in words', () => {
    const d = practices.GB.diversity;
    expect(allowanceText(d.lighting.value)).toBe('66 %');
    expect(allowanceText(d.sockets.value)).toBe('the largest whole, 40 % of the rest');
    expect(allowanceText(d['instant-water'].value)).toBe('the 2 largest whole, 25 % of the rest');
    expect(allowanceText(d.cooker.value)).toBe(
      '10 A whole, 30 % of what is above, 5 A more for an outlet in its switch',
    );
    expect(allowanceText(d['storage-heating'].value)).toBe('whole');
  });
  test('no allowance counts more than is connected', () => {
    for (const { value } of Object.values(practices.IEC.diversity))
      for (const list of [[3], [1, 2, 30], [12, 12, 12]]) {
        const sum = list.reduce((total, a) => total + a, 0);
        expect(allowedA(list, value)).toBeLessThanOrEqual(sum + 1e-9);
      }
  });
  test('an empty home demands nothing', () =>
    expect(maximumDemand([], practices.IN)).toMatchObject({ demandA: 0, demandWatts: 0, rows: [] }));
  test('a negative load is refused by name', () =>
    expect(() => maximumDemand([load('lighting', -1)], practices.GB)).toThrow(/^items\.0\.watts is/));
});

describe('batteries', () => {
  const bank = bankOf({ volts: 12, ah: 200, chemistry: 'vrla' });
  test('series adds volts, parallel adds Ah', () => {
    expect(bankOf({ volts: 12, ah: 150, count: 2, arrangement: 'series' })).toMatchObject({
      volts: 24,
      ah: 150,
      hours: 20,
    });
    expect(bankOf({ volts: 12, ah: 150, count: 2, arrangement: 'parallel' })).toMatchObject({ volts: 12, ah: 300 });
    expect(joined([bank, bank], 'series')).toMatchObject({ volts: 24, ah: 200 });
    expect(joined([bank, bank], 'parallel')).toMatchObject({ volts: 12, ah: 400 });
  });
  test('C10 over C20 is 0.5^(k - 1) (factors.json: battery-c10-c20)', () => {
    const list = record('factors', 'battery-c10-c20').value as Record<string, number>;
    for (const [name, ratio] of Object.entries(list)) {
      const exponent = Number(name.slice(2));
      // The current that empties a 100 Ah (C20) battery in 10 h, times 10 h, is its C10.
      const currentA = 5 * (20 / 10) ** (1 / exponent);
      expect(peukertHours({ ah: 100, hours: 20, currentA, exponent })).toBeCloseTo(10, 9);
      // 0.5^(k - 1) is the ratio read at twice the C20 current, the reference's form.
      const atTwice = (peukertHours({ ah: 100, hours: 20, currentA: 10, exponent }) * 10) / 100;
      expect(atTwice).toBeCloseTo(ratio, 3);
    }
  });
  test('the table that breaks its own exponent is not followed (factors.json: battery-bad-table)', () => {
    const bad = record('factors', 'battery-bad-table').value as Record<string, number>;
    expect(peukertHours({ ah: 100, hours: 20, currentA: 10, exponent: 1.1 }) * 10).not.toBeCloseTo(bad['C/10']!, 0);
  });
  test('12 V 200 Ah vrla, 169 W at 0.85: by hand 20 (160 / 331.4)^1.1 x 0.5', () => {
    const hours = autonomyHours({ bank, watts: 169, efficiency: 0.85 });
    expect(hours).toBeCloseTo(20 * ((200 * 0.8) / ((169 / (0.85 * 12)) * 20)) ** 1.1 * 0.5, 12);
    expect(autonomyHours({ bank, watts: 169, efficiency: 0.85, temperatureC: 5 })).toBeLessThan(hours);
    expect(autonomyHours({ bank, watts: 0, efficiency: 0.85 })).toBe(Infinity);
  });
  test('the curve falls; dropping a load never costs hours', () => {
    const curve = autonomyCurve({ bank, efficiency: 0.85 }, 50, 600);
    curve.forEach((point, i) => i > 0 && expect(point.hours).toBeLessThan(curve[i - 1]!.hours));
    const loads = [
      { name: 'fans', watts: 150 },
      { name: 'router', watts: 20 },
    ];
    const all = autonomyHours({ bank, watts: 170, efficiency: 0.85 });
    const [withoutFans, withoutRouter] = whatIfs({ bank, efficiency: 0.85 }, loads);
    expect(withoutFans!.hours).toBeGreaterThan(withoutRouter!.hours);
    expect(withoutRouter!.hours).toBeGreaterThan(all);
  });
  test('running, start, current at cutoff', () => {
    const load = backupLoad([
      { name: 'fan', watts: 50, pf: 0.9, surge: 2 },
      { name: 'fridge', watts: 150, pf: 0.75, surge: 5 },
      { name: 'lamp', watts: 9 },
    ]);
    expect(load.watts).toBe(209);
    expect(load.va).toBeCloseTo(50 / 0.9 + 200 + 9, 12);
    expect(load.surgeVa).toBeCloseTo(load.va - 200 + 1000, 12);
    expect(load.starts).toBe('fridge');
    expect(currentAtCutoffA({ va: 700, efficiency: 0.85, cutoffV: 10.5 })).toBeCloseTo(78.43, 2);
  });
  test('fuse and lead: 78 A takes 100 A and 25 mm2 at least', () => {
    expect(batteryFuseA(78.4)).toBe(100);
    const lead = batteryLead({
      practice: practices.IN,
      currentA: 78.4,
      bankVolts: 12,
      lengthM: 1,
      method: 'B1',
      material: 'Cu',
      insulation: 'PVC',
      ambientC: 30,
    })!;
    expect(lead).toMatchObject({ csaMm2: 25, fuseA: 100 });
    expect(lead.dropPercent).toBeLessThanOrEqual(2);
    expect(
      batteryLead({
        practice: practices.IN,
        currentA: 78.4,
        bankVolts: 12,
        lengthM: 40,
        method: 'B1',
        material: 'Cu',
        insulation: 'PVC',
        ambientC: 30,
      }),
    ).toBeNull();
  });
  test('recharge and what it draws from the mains', () => {
    expect(rechargeHours({ bank, chargeA: 20 })).toBeCloseTo(100 / (20 * 0.85), 12);
    expect(chargingWatts({ chargeA: 20, bankVolts: 12, efficiency: 0.85 })).toBeCloseTo(282.35, 2);
  });
  test.each([
    ['ah', () => bankOf({ volts: 12, ah: 0 })],
    ['count', () => bankOf({ volts: 12, ah: 100, count: 1.5 })],
    ['exponent', () => peukertHours({ ah: 100, hours: 20, currentA: 5, exponent: 0.9 })],
    ['currentA', () => peukertHours({ ah: 100, hours: 20, currentA: 0, exponent: 1.1 })],
    ['efficiency', () => autonomyHours({ bank, watts: 10, efficiency: 1.2 })],
    ['temperatureC', () => autonomyHours({ bank, watts: 10, efficiency: 0.8, temperatureC: NaN })],
    ['chargeA', () => rechargeHours({ bank, chargeA: 0 })],
    ['loads.0.surge', () => backupLoad([{ name: 'x', watts: 1, surge: 0.5 }])],
    ['cutoffV', () => currentAtCutoffA({ va: 1, efficiency: 1, cutoffV: 0 })],
    ['loopOhm', () => constantPowerDrop({ volts: 12, watts: 5000, loopOhm: 0.1 })],
  ])('refuses %s', (field, run) => expect(run).toThrow(new RegExp(`^${field} is`)));
});
