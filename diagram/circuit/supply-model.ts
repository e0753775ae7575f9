import type { Supply } from '../document/schema';

/** How the external loop is shared between its conductors, ohm. */
export interface SupplyModel {
  line: number;
  neutral: number;
  /** the protective conductor of TN-S, the joint conductor of TN-C-S; null on TT */
  earth: number | null;
  /** TN-C-S: neutral and earth are one conductor up to the origin */
  joined: boolean;
}

/** Where nothing is given the source is stiff: the drop before the origin is not known, so none is shown. */
const STIFF = 1e-4;

/**
 * Splits `ze` and `zln`. Of `ze` the protective conductor has `zeEarth` where given, else half; the line has the rest;
 * of
 * `zln` the neutral has what the line leaves. A value that is missing is taken from the other; on TT from `zln` by
 * halves.
 */
export function supplyModel(supply: Supply): SupplyModel {
  const { system, zln } = supply;
  if (system === 'TT') {
    const half = zln === undefined ? STIFF : zln / 2;
    return { line: half, neutral: half, earth: null, joined: false };
  }
  const ze = supply.ze ?? zln ?? 2 * STIFF;
  const earth = Math.max(STIFF, Math.min(supply.zeEarth ?? ze / 2, ze));
  const line = Math.max(STIFF, Math.min(ze - earth, zln ?? Infinity));
  const neutral = Math.max(STIFF, (zln ?? 2 * line) - line);
  return { line, neutral, earth, joined: system === 'TN-C-S' };
}
