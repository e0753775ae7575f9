import fc from 'fast-check';
import { describe, expect, test } from 'vitest';
import { capacity } from '@/diagram/calculations/capacity';
import { sizeCable, type CableNeed } from '@/diagram/calculations/size-cable';
import { practices } from '@/diagram/practices';

const base: CableNeed = {
  practice: practices.IEC,
  device: { kind: 'mcb', curve: 'B', ratingA: 16 },
  ibA: 13,
  method: 'B1',
  material: 'Cu',
  insulation: 'PVC',
  ambientC: 30,
  grouped: 1,
  lengthM: 10,
  voltage: 230,
  dropLimitPercent: 5,
  zsBeforeOhm: 0.4,
  disconnectS: 0.4,
};

describe('the criterion that decides', () => {
  test('least: the smallest size meets all', () =>
    expect(sizeCable(base)).toMatchObject({ csaMm2: 1.5, decidedBy: 'least' }));
  test('capacity: four circuits together', () =>
    expect(sizeCable({ ...base, grouped: 4 })).toMatchObject({
      csaMm2: 4,
      decidedBy: 'capacity',
      tried: [{ csaMm2: 1.5 }, { csaMm2: 2.5 }],
    }));
  test('drop: a long run of lamps at 3 %', () =>
    expect(sizeCable({ ...base, lengthM: 40, dropLimitPercent: 3, zsBeforeOhm: undefined })).toMatchObject({
      csaMm2: 4,
      decidedBy: 'drop',
    }));
  test('zs: a type D device far away', () => {
    const size = sizeCable({
      ...base,
      device: { kind: 'mcb', curve: 'D', ratingA: 16 },
      ibA: 2,
      lengthM: 20,
      zsBeforeOhm: 0.35,
    })!;
    expect(size.decidedBy).toBe('zs');
    expect(size.zsOhm!).toBeLessThanOrEqual(size.zsMaxOhm!);
  });
  test('adiabatic: a fuse that clears slowly, with a thin protective core', () => {
    const size = sizeCable({
      ...base,
      practice: practices.GB,
      device: { kind: 'gG', ratingA: 32 },
      ibA: 20,
      method: 'C',
      lengthM: 5,
      zsBeforeOhm: 1.2,
      disconnectS: 5,
    })!;
    expect(size.decidedBy).toBe('adiabatic');
    expect(size.cpcMm2).toBeGreaterThanOrEqual(size.adiabaticMm2!);
  });
});

test('null where nothing on sale will do, or the practice has no table', () => {
  expect(sizeCable({ ...base, device: { kind: 'mcb', ratingA: 200 } })).toBeNull();
  expect(sizeCable({ ...base, lengthM: 5000 })).toBeNull();
});

test('an rcd that clears the fault leaves the loop unjudged', () =>
  expect(sizeCable({ ...base, zsBeforeOhm: 100, disconnectS: undefined })).toMatchObject({
    csaMm2: 1.5,
    zsMaxOhm: null,
  }));

test('whatever is asked, what is given meets it, and the next smaller size does not', () => {
  fc.assert(
    fc.property(
      fc.record({
        id: fc.constantFrom('IEC', 'IN', 'GB'),
        ratingA: fc.constantFrom(6, 10, 16, 20, 32, 40),
        share: fc.double({ min: 0.1, max: 1, noNaN: true }),
        lengthM: fc.double({ min: 0, max: 80, noNaN: true }),
        grouped: fc.integer({ min: 1, max: 9 }),
        ambientC: fc.integer({ min: 20, max: 50 }),
        method: fc.constantFrom('A1', 'A2', 'B1', 'B2', 'C'),
      }),
      ({ id, ratingA, share, lengthM, grouped, ambientC, method }) => {
        const need = {
          ...base,
          practice: practices[id],
          device: { kind: 'mcb', curve: 'B', ratingA },
          ibA: ratingA * share,
          lengthM,
          grouped,
          ambientC,
          method,
        } as CableNeed;
        const size = sizeCable(need);
        if (!size) return;
        expect(size.izA).toBeGreaterThanOrEqual(ratingA);
        expect(size.dropPercent).toBeLessThanOrEqual(5);
        expect(size.zsOhm!).toBeLessThanOrEqual(size.zsMaxOhm!);
        expect(size.izA).toBe(capacity(need.practice, size.csaMm2, need)!.izA);
        for (const { failed } of size.tried) expect(failed.length).toBeGreaterThan(0);
        expect(Object.values(size).every((value) => typeof value !== 'number' || Number.isFinite(value))).toBe(true);
      },
    ),
    { numRuns: 300, seed: 7 },
  );
});

test.each([
  ['ibA', { ibA: -1 }],
  ['ratingA', { device: { kind: 'mcb', ratingA: 0 } }],
  ['voltage', { voltage: 0 }],
  ['lengthM', { lengthM: -3 }],
  ['dropLimitPercent', { dropLimitPercent: 0 }],
  ['zsBeforeOhm', { zsBeforeOhm: -1 }],
])('refuses %s', (field, wrong) =>
  expect(() => sizeCable({ ...base, ...wrong } as CableNeed)).toThrow(new RegExp(`^${field} is`)),
);
