import { sizeCable } from '../../calculations/size-cable';
import { dropLimitPercent } from '../../calculations/volt-drop';
import type { Curve, Practice } from '../../practices/types';

export interface RunSize {
  csaMm2: number;
  cpcMm2: number;
  /** loaded circuits that leave the board together, this one counted */
  grouped: number;
}

/**
 * Percent of nominal that the runs before a way may take: a backed-up way hangs behind the inverter's feed and output
 * runs, so it has so much less for itself. A share of the design, not of a standard.
 */
export const BEFORE_BACKUP = { feed: 0.5, output: 0.3 } as const;
/** percent, kept back for the way's own short cores that are not reckoned one by one */
const SPARE = 0.05;

interface Need {
  practice: Practice;
  voltage: number;
  ambientC: number;
  ratingA: number;
  curve: Curve;
  /** A */
  amps: number;
  /** m, to the farthest point, as though all of the load hung there */
  lengthM: number;
  use: 'lighting' | 'other' | 'backup';
  leastMm2: number;
}

/**
 * The cable of a way behind an rcd, which clears a fault to earth: capacity and volt drop decide. One that is too heavy to
 * lie with others is run apart. Null where none on sale will do.
 */
export function sizeRun({
  practice,
  voltage,
  ambientC,
  ratingA,
  curve,
  amps,
  lengthM,
  use,
  leastMm2,
}: Need): RunSize | null {
  const { draft, voltDrop } = practice;
  const base = use === 'other' ? voltDrop.other.value : voltDrop.lighting.value;
  const limit = dropLimitPercent(base, lengthM, voltDrop.longRun.value);
  const sized = (grouped: number): RunSize | null => {
    const found = sizeCable({
      practice,
      device: { kind: 'mcb', ratingA, curve },
      ibA: amps,
      method: draft.method,
      material: draft.material,
      insulation: draft.insulation,
      ambientC,
      grouped,
      lengthM,
      voltage,
      dropLimitPercent: limit - SPARE - (use === 'backup' ? BEFORE_BACKUP.feed + BEFORE_BACKUP.output : 0),
      leastMm2,
    });
    return found && { csaMm2: found.csaMm2, cpcMm2: found.cpcMm2, grouped };
  };
  return sized(draft.grouped) ?? sized(1);
}
