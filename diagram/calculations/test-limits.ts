import type { Material } from '../practices/types';
import { conductorOhm } from './conductor';
import { measuredLimitOhm } from './loop-impedance';
import { rcdFastS, type ResidualDevice } from './rcd-time';
import { requireNonNegative } from './requirements';

/** Expected (R1 + R2) of a cold run on the test sheet. @returns ohm at 20 degC @throws RangeError naming the field */
export function expectedContinuityOhm(run: {
  csaMm2: number;
  cpcMm2: number;
  lengthM: number;
  material: Material;
}): number {
  const leg = (csaMm2: number) =>
    conductorOhm({ csaMm2, lengthM: run.lengthM, material: run.material, temperatureC: 20 });
  return leg(run.csaMm2) + leg(run.cpcMm2);
}

/** Insulation resistance at 500 V d.c.: 1 Mohm at least, IEC 60364-6 Table 6A (from memory). */
export const INSULATION = { testVolts: 500, leastMegohm: 1 } as const;

/** A measured continuity may exceed the computed one by contacts and tolerance: common practice, no source. */
const CONTINUITY_MARGIN = { share: 0.1, ohm: 0.05 };

export type Reading =
  | { kind: 'continuity'; ohm: number; expectedOhm: number }
  | { kind: 'insulation'; megohm: number }
  | { kind: 'polarity'; right: boolean }
  | { kind: 'zs'; ohm: number; limitOhm: number; share: number }
  | {
      kind: 'rcd';
      device: ResidualDevice;
      multiple: 0.5 | 1 | 5;
      /** Infinity where it did not trip */ seconds: number;
    };

/** A measured value against its limit, in words for the sheet. */
export interface Judgement {
  holds: boolean;
  limit: string;
}

const upTo = (value: number, digits: number, symbol: string) => `at most ${value.toFixed(digits)} ${symbol}`;

/**
 * Judges one reading of the test sheet as it is typed.
 * @throws RangeError naming the field
 * @source IEC 60364-6 6.4.3; BS 7671 Part 6; rcd times IEC 61008-1
 */
export function judgeReading(reading: Reading): Judgement {
  switch (reading.kind) {
    case 'continuity': {
      requireNonNegative('ohm', reading.ohm);
      const limit = reading.expectedOhm * (1 + CONTINUITY_MARGIN.share) + CONTINUITY_MARGIN.ohm;
      return { holds: reading.ohm <= limit, limit: upTo(limit, 2, 'ohm') };
    }
    case 'insulation':
      requireNonNegative('megohm', reading.megohm);
      return {
        holds: reading.megohm >= INSULATION.leastMegohm,
        limit: `at least ${INSULATION.leastMegohm} Mohm at ${INSULATION.testVolts} V`,
      };
    case 'polarity':
      return { holds: reading.right, limit: 'line in the switched and fused conductor at every point' };
    case 'zs': {
      requireNonNegative('ohm', reading.ohm);
      const limit = measuredLimitOhm(reading.limitOhm, reading.share);
      return { holds: reading.ohm <= limit, limit: upTo(limit, 2, 'ohm, cold') };
    }
    case 'rcd': {
      if (reading.multiple === 0.5) return { holds: reading.seconds === Infinity, limit: 'does not open' };
      requireNonNegative('seconds', reading.seconds);
      const delayed = reading.device.delay === 'S';
      const atMost = reading.multiple === 5 ? rcdFastS(reading.device.delay) : delayed ? 0.5 : 0.3;
      const atLeast = delayed ? (reading.multiple === 5 ? 0.05 : 0.13) : 0;
      return {
        holds: reading.seconds <= atMost && reading.seconds >= atLeast,
        limit: `${delayed ? `${atLeast * 1000} to ` : 'at most '}${atMost * 1000} ms`,
      };
    }
  }
}
