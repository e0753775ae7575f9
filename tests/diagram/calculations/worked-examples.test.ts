import { describe, expect, test } from 'vitest';
import { adiabaticMm2, withstandS } from '@/diagram/calculations/adiabatic';
import { allowedA } from '@/diagram/calculations/allowance';
import { autonomyHours, batteryCurrentA, peukertHours } from '@/diagram/calculations/autonomy';
import type { Assumptions } from '@/diagram/calculations/battery-bank';
import { constantPowerDrop } from '@/diagram/calculations/battery-lead';
import { capacity, neededTableA } from '@/diagram/calculations/capacity';
import { resistance20OhmPerM } from '@/diagram/calculations/conductor';
import { designCurrentA } from '@/diagram/calculations/design-current';
import { electrodeVolts } from '@/diagram/calculations/earth-electrode';
import { loopOhm, maximumLoopOhm } from '@/diagram/calculations/loop-impedance';
import { prospectiveA } from '@/diagram/calculations/prospective-current';
import { maximumSensitivityA } from '@/diagram/calculations/rcd-time';
import { expectedContinuityOhm } from '@/diagram/calculations/test-limits';
import { tripBand } from '@/diagram/calculations/trip-curve';
import { tableDropV } from '@/diagram/calculations/volt-drop';
import { practices } from '@/diagram/practices';
import { printed, record, reference } from '../reference';

/** Every published worked example, to its published rounding; where the print slips, the slip is named. */

const GB = practices.GB;
const published = <T>(id: string): T => record('worked-examples', id).value as T;
const seen = new Set<string>();
const example = (id: string, run: () => void) => {
  seen.add(id);
  const { topic, source } = record('worked-examples', id);
  test(`${id} ${String(topic)} (${source.title}, ${source.locator})`, run);
};
const laying = { method: 'A1', material: 'Cu', insulation: 'PVC', ambientC: 30, grouped: 1 } as const;

describe('cable size and volt drop', () => {
  example('WE01', () => {
    const want = published<{ Ib_A: number; It_A: number; csa_mm2: number; It_table_A: number }>('WE01');
    const ib = designCurrentA({ watts: 6000, voltage: 230 });
    expect(printed(ib, 2)).toBe(want.Ib_A);
    const it = neededTableA(32, { ambient: 0.94 });
    expect(printed(it, 2)).toBe(want.It_A);
    // 6 mm2 prints 34 A and just fails 34.04 A.
    expect(capacity(GB, 6, laying)!.tableA).toBeLessThan(it);
    expect(capacity(GB, want.csa_mm2, laying)!.tableA).toBe(want.It_table_A);
    const drop = tableDropV({ milliVoltPerAmpereMetre: 4.4, currentA: ib, lengthM: 18 });
    expect(printed(drop, 3)).toBe(2.066); // printed 2.06, cut off
    expect(Math.floor(drop * 100) / 100).toBe(2.06);
  });
  example('WE02', () => {
    const want = published<{ It_A: number; Vd_V: number; csa_after_correction: number }>('WE02');
    const ib = designCurrentA({ watts: 5000, voltage: 230 });
    expect(Math.floor(ib * 100) / 100).toBe(21.73); // 21.74 cut off
    const it = neededTableA(25, { ambient: 0.94, grouping: 0.8, insulation: 0.51 });
    expect(Math.floor(it * 100) / 100).toBe(want.It_A);
    expect(capacity(GB, 10, { ...laying, method: 'C' })!.tableA).toBeLessThan(it);
    expect(capacity(GB, want.csa_after_correction, { ...laying, method: 'C' })!.tableA).toBeGreaterThan(it);
    expect(printed(tableDropV({ milliVoltPerAmpereMetre: 4.4, currentA: ib, lengthM: 18 }), 2)).toBe(want.Vd_V);
  });
  example('WE03', () => {
    // Iz = 34 x 0.77 x 0.65 x 0.5: what the table must print for that Iz is 34 A again.
    const iz = 34 / neededTableA(1, { ambient: 0.77, grouping: 0.65, insulation: 0.5 });
    expect(printed(iz, 1)).toBe(published<{ Iz_A: number }>('WE03').Iz_A);
  });
  example('WE04', () => {
    const want = published<{ Vd_V: number; Vd_pc: number }>('WE04');
    const drop = tableDropV({
      milliVoltPerAmpereMetre: 11,
      currentA: designCurrentA({ watts: 6000, voltage: 240 }),
      lengthM: 16,
    });
    expect(printed(drop, 1)).toBe(want.Vd_V);
    expect(printed((100 * drop) / 240, 2)).toBe(want.Vd_pc);
  });
});

describe('loops, faults and heat', () => {
  example('WE05', () => {
    // The print adds 0.15 and 0.38 to 0.52: exact 0.5276.
    const legs = 1.2 * expectedContinuityOhm({ csaMm2: 6, cpcMm2: 2.5, lengthM: 30, material: 'Cu' });
    expect(printed(legs, 2)).toBe(published<{ R1R2_ohm: number }>('WE05').R1R2_ohm);
    const zs = loopOhm({ zeOhm: 0.15, r1Ohm: legs, r2Ohm: 0 });
    expect(printed(zs, 4)).toBe(0.5276);
    expect(Math.floor(zs * 100) / 100).toBe(published<{ Zs_ohm: number }>('WE05').Zs_ohm);
  });
  example('WE06', () => {
    const want = published<{ I_A: number; S_mm2: number }>('WE06');
    const fault = prospectiveA({ voltage: 230, loopOhm: 1.15 });
    expect(printed(fault, 0)).toBe(want.I_A);
    const least = adiabaticMm2(fault ** 2 * 0.4, 115);
    expect(printed(least, 2)).toBe(want.S_mm2);
    expect(least).toBeLessThan(1.5);
  });
  example('WE07', () => {
    const least = adiabaticMm2(90 ** 2 * 0.4, 115);
    expect(Math.floor(least * 100) / 100).toBe(published<{ S_mm2: number }>('WE07').S_mm2); // 0.495 cut off
    expect(least).toBeLessThan(1.5);
  });
  example('WE08', () => {
    const t = withstandS({ csaMm2: 10, k: 115, currentA: 4000 });
    expect(printed(t * 1000, 2)).toBe(published<{ t_ms: number }>('WE08').t_ms);
    expect(t).toBeGreaterThan(0.02);
  });
  example('WE09', () => {
    const device = { kind: 'mcb', curve: 'B', ratingA: 6 } as const;
    const old = maximumLoopOhm({ device, voltage: 230, withinS: 0.4, cMin: 1 });
    expect(printed(old, 2)).toBe(published<{ Zs_max_ohm: number }>('WE09').Zs_max_ohm);
    expect(printed(maximumLoopOhm({ device, voltage: 230, withinS: 0.4, cMin: 0.95 }), 2)).toBe(7.28);
  });
  example('WE10', () => {
    const limit = maximumLoopOhm({
      device: { kind: 'mcb', curve: 'B', ratingA: 45 },
      voltage: 230,
      withinS: 0.4,
      cMin: 0.95,
    });
    expect(printed(limit, 2)).toBe(published<{ Zs_max_ohm: number }>('WE10').Zs_max_ohm);
  });
  example('WE17', () => expect(maximumSensitivityA(200)).toBe(published<{ IdN_max_A: number }>('WE17').IdN_max_A));
  example('WE18', () => {
    const fault = prospectiveA({ voltage: 230, loopOhm: 50 });
    expect(printed(fault, 1)).toBe(published<{ I_fault_A: number }>('WE18').I_fault_A);
    expect(tripBand({ kind: 'mcb', curve: 'B', ratingA: 5 }, fault).earliestS).toBe(Infinity);
    expect(electrodeVolts({ currentA: fault, electrodeOhm: 50 })).toBeCloseTo(230, 9);
  });
  example('WE19', () => {
    const perM = 2 * resistance20OhmPerM(1, 'Cu');
    expect(printed(perM * 1000, 1)).toBe(36.2);
    const length = (9.58 * 0.75 - 0.45) / perM;
    // Published 185 (cut off); 186 when 7.185 is kept. The 498 m of a textbook quoted there is an error.
    expect(printed(length, 1)).toBeCloseTo(186.0, 0);
    expect(Math.floor((7.17 - 0.45) / perM)).toBe(published<{ length_m: number }>('WE19').length_m);
  });
  example('WE20', () =>
    expect(printed(expectedContinuityOhm({ csaMm2: 2.5, cpcMm2: 1.5, lengthM: 50, material: 'Cu' }), 2)).toBe(
      published<{ R_ohm: number }>('WE20').R_ohm,
    ),
  );
  example('WE21', () =>
    expect([0.35, 0.8].map((loop) => Math.round(prospectiveA({ voltage: 230, loopOhm: loop })))).toEqual(
      published<{ I_A: number[] }>('WE21').I_A,
    ),
  );
});

describe('diversity and demand', () => {
  const { cooker } = GB.diversity;
  example('WE11', () => {
    const want = published<{ I_full_A: number; I_A: number }>('WE11');
    const full = designCurrentA({ watts: 12000, voltage: 230 });
    expect(printed(full, 2)).toBe(want.I_full_A);
    expect(printed(allowedA([full], cooker.value, { perItem: true, outlets: 1 }), 2)).toBe(want.I_A);
  });
  example('WE12', () =>
    expect(allowedA([30], cooker.value, { perItem: true })).toBe(published<{ I_A: number }>('WE12').I_A),
  );
  example('WE13', () => {
    // 66.67 A is cut to 66 in print, which makes 27.0 A into 26.8 A.
    expect(
      printed(allowedA([designCurrentA({ watts: 16000, voltage: 240 })], cooker.value, { perItem: true }), 2),
    ).toBe(27);
    expect(printed(allowedA([66], cooker.value, { perItem: true }), 1)).toBe(published<{ I_A: number }>('WE13').I_A);
  });
  example('WE14', () => {
    const want = published<{ cooker_A: number; total_A: number }>('WE14');
    const cooking = allowedA([24.16], cooker.value, { perItem: true, outlets: 1 });
    expect(printed(cooking, 2)).toBe(want.cooker_A);
    const rings = allowedA([32, 32, 32], GB.diversity.sockets.value);
    expect(rings).toBeCloseTo(32 + 12.8 + 12.8, 9);
    expect(printed(1.51 + 0.41 + 2.11 + rings + 10 + cooking + 6.41, 2)).toBe(want.total_A);
  });
  example('WE15', () => {
    // Negative check: the print breaks its own rule (the cooker's 5 A twice, lighting below 66 %); ours is 111.62 A.
    const amps = (watts: number) => designCurrentA({ watts, voltage: 230 });
    const items = [
      amps(8000),
      allowedA([amps(7000)], cooker.value, { perItem: true }),
      allowedA([32, 32], GB.diversity.sockets.value),
      amps(3000),
      allowedA([amps(1000)], GB.diversity.lighting.value),
    ];
    const total = items.reduce((sum, item) => sum + printed(item, 2), 0);
    expect(printed(total, 2)).toBe(111.62);
    expect(Math.round(total)).not.toBe(published<{ total_A: number }>('WE15').total_A);
  });
  example('WE16', () => {
    // A shop; its answer was not seen, so that this only exercises the ranked shares: 433.5 A over three phases.
    const each = (kW: number[]) => kW.map((k) => designCurrentA({ watts: k * 1000, voltage: 240 }));
    const total =
      allowedA(each([6, 6, 3, 3, 3, 3, 3, 3, 3]), { rest: 1 }) +
      allowedA(each([3, 3]), { ranked: [1, 1], rest: 0.25 }) +
      allowedA(each([6, 6, 4]), { ranked: [1, 0.8], rest: 0.6 }) +
      allowedA([designCurrentA({ watts: 12000 * 1.8, voltage: 240 })], { rest: 0.9 }) +
      allowedA(Array<number>(8).fill(30), { ranked: [1], rest: 0.5 });
    expect(printed(total, 1)).toBe(433.5);
  });
});

describe('batteries', () => {
  /** As blogs reckon: no Peukert, no depth, no ageing. */
  const bare: Assumptions = { peukert: 1, dischargeDepth: 1, ageing: 1, chargeReturn: 1, coldPerK: 0 };
  const hours = (ah: number, watts: number, efficiency: number) =>
    autonomyHours({ bank: { volts: 12, ah, hours: 20, chemistry: 'flooded' }, watts, efficiency, assumed: bare });
  const want = (id: string) => published<{ h: number }>(id).h;
  example('WE22', () => expect(printed(hours(150, 300, 0.8), 1)).toBe(want('WE22')));
  example('WE23', () => expect(Math.floor(hours(150, 400, 0.75) * 10) / 10).toBe(want('WE23'))); // 3.375 cut to 3.3
  example('WE24', () => expect(printed(hours(60, 150, 0.8), 2)).toBe(want('WE24')));
  example('WE25', () => expect(Math.floor(hours(150, 145, 1) * 100) / 100).toBe(want('WE25')));
  example('WE26', () => {
    const print = published<{ I_A: number; drop_V: number; V_inverter: number; I_after_A: number }>('WE26');
    const first = batteryCurrentA({ watts: 2400, efficiency: 1, volts: 12 });
    expect(first).toBe(print.I_A);
    expect(printed(first * 2 * 0.0016, 2)).toBe(print.drop_V);
    expect(printed(12 - print.drop_V, 1)).toBe(print.V_inverter);
    expect(Math.floor(2400 / print.V_inverter / 10) * 10).toBe(print.I_after_A);
    // The print stops after one step; the fixed point is 11.32 V and 212 A.
    const settled = constantPowerDrop({ volts: 12, watts: 2400, loopOhm: 0.0032 });
    expect(printed(settled.volts, 3)).toBe(11.322);
    expect(printed(settled.currentA, 2)).toBe(211.98);
  });
  example('WE27', () => {
    const print = published<{ P_in_W: number; I_first_A: number }>('WE27');
    const first = batteryCurrentA({ watts: 1000, efficiency: 0.92, volts: 13 });
    expect(Math.round(first * 13)).toBe(print.P_in_W);
    expect(printed(first, 1)).toBe(print.I_first_A);
    const settled = constantPowerDrop({ volts: 13, watts: print.P_in_W, loopOhm: 0.0108 });
    expect(printed(settled.volts, 3)).toBe(12.024);
    expect(printed(settled.currentA, 2)).toBe(90.41);
  });
  example('WE28', () => {
    // A maker's rule of thumb, 0.015 mm2 V per A and foot; exact copper at 20 degC asks for 42 mm2, so the rule is
    // safe.
    const amps = batteryCurrentA({ watts: 2000, efficiency: 1, volts: 12 });
    expect(printed((0.015 * amps * 12) / 0.5, 0)).toBe(published<{ csa_mm2: number }>('WE28').csa_mm2);
    const exact = (2 * 0.017241 * 12 * 0.3048 * amps) / 0.5;
    expect(exact).toBeLessThan(published<{ csa_mm2: number }>('WE28').csa_mm2);
  });
  example('WE29', () => {
    expect(printed(peukertHours({ ah: 100, hours: 20, currentA: 10, exponent: 1.2 }), 2)).toBe(
      published<{ t_h: number }>('WE29').t_h,
    );
    expect(peukertHours({ ah: 100, hours: 20, currentA: 5, exponent: 1.2 })).toBeCloseTo(20, 12);
  });
  example('WE30', () => {
    // The trap: C / I^k gives 14.5 h; a battery stated at 20 h gives 20 h at 5 A.
    expect(printed(100 / 5 ** 1.2, 1)).toBe(published<{ t_h: number }>('WE30').t_h);
    expect(peukertHours({ ah: 100, hours: 20, currentA: 5, exponent: 1.2 })).toBeCloseTo(20, 12);
  });
});

test('no worked example is left out', () =>
  expect([...seen].sort()).toEqual(
    reference('worked-examples')
      .map((entry) => entry.id)
      .sort(),
  ));
