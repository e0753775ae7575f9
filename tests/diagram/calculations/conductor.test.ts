import { describe, expect, test } from 'vitest';
import { conductorOhm, resistance20OhmPerM, temperatureFactor } from '@/diagram/calculations/conductor';
import { expectedContinuityOhm } from '@/diagram/calculations/test-limits';
import { printed, record, reference } from '../reference';

describe('IEC 60228 resistances at the digit printed', () => {
  for (const entry of reference('conductors').filter((each) => each.class_ !== undefined))
    test(`${entry.id} (${entry.source.title})`, () => {
      const material = entry.material === 'aluminium' ? 'Al' : 'Cu';
      const conductorClass = entry.class_ === '5' ? 5 : 2;
      expect(resistance20OhmPerM(entry.csa_mm2 as number, material, conductorClass) * 1000).toBeCloseTo(
        entry.value as number,
        9,
      );
    });
});

describe('R1 + R2 of pairs on sale, mohm/m at 20 degC', () => {
  for (const entry of reference('conductors').filter((each) => each.id.startsWith('r1r2-')))
    test(`${entry.id} (${entry.source.title})`, () => {
      const ohm = expectedContinuityOhm({
        csaMm2: entry.line_mm2 as number,
        cpcMm2: entry.cpc_mm2 as number,
        lengthM: 1,
        material: 'Cu',
      });
      expect(printed(ohm * 1000, 2)).toBe(entry.value);
    });
});

describe('temperature', () => {
  test('1.1965 from 20 to 70 degC by alpha 0.00393; handbooks round to 1.20, 0.3 % more', () => {
    expect(printed(temperatureFactor(70, 'Cu'), 4)).toBe(record('conductors', 'factor-20-to-70-alpha').value);
    const rounded = record('conductors', 'factor-20-to-70-rounded').value as number;
    expect(Math.abs(temperatureFactor(70, 'Cu') / rounded - 1)).toBeLessThan(0.003);
  });
  test('1.04 to 30 degC, 1.28 to 90 degC within the rounding of the published 230 + T form', () => {
    expect(printed(temperatureFactor(30, 'Cu'), 2)).toBe(record('conductors', 'factor-20-to-30').value);
    expect(printed(temperatureFactor(90, 'Cu'), 2)).toBe(record('conductors', 'factor-20-to-90').value);
  });
  test('coefficients (from memory)', () => {
    expect(temperatureFactor(21, 'Cu') - 1).toBeCloseTo(record('conductors', 'alpha-cu-20').value as number, 12);
    expect(temperatureFactor(21, 'Al') - 1).toBeCloseTo(record('conductors', 'alpha-al-20').value as number, 12);
  });
});

describe('a run', () => {
  const run = { csaMm2: 2.5, lengthM: 20, temperatureC: 20, material: 'Cu' } as const;
  test('worked by hand: 7.41 ohm/km over 20 m', () => expect(conductorOhm(run)).toBeCloseTo(0.1482, 12));
  test('twice the length, twice the resistance', () =>
    expect(conductorOhm({ ...run, lengthM: 40 })).toBeCloseTo(2 * conductorOhm(run), 12));
  test('a size that is not printed is never below the metal itself', () =>
    expect(resistance20OhmPerM(3, 'Cu')).toBeGreaterThan((record('conductors', 'rho-cu-20').value as number) / 3));
  test.each([
    ['csaMm2', { csaMm2: 0 }],
    ['lengthM', { lengthM: -1 }],
    ['temperatureC', { temperatureC: NaN }],
  ])('refuses %s', (field, wrong) =>
    expect(() => conductorOhm({ ...run, ...wrong })).toThrow(new RegExp(`^${field} is`)),
  );
});
