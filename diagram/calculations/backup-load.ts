import { requireFraction, requireNonNegative, requirePositive, requireWithin } from './requirements';

export interface BackedLoad {
  name: string;
  watts: number;
  pf?: number;
  /** start as a multiple of running */
  surge?: number;
}

export interface BackupLoad {
  watts: number;
  /** running, added arithmetically: never less than the vector sum */
  va: number;
  /** running less that load's own, plus its start, of the load for which this is greatest */
  surgeVa: number;
  /** whose start it is; null when no load starts above its running */
  starts: string | null;
}

/**
 * Running watts and VA of what a backup source feeds, and the largest start among them. @throws RangeError naming the
 * field
 */
export function backupLoad(loads: readonly BackedLoad[]): BackupLoad {
  let watts = 0;
  let va = 0;
  let start = 0;
  let starts: string | null = null;
  loads.forEach((load, i) => {
    const pf = load.pf ?? 1;
    const surge = load.surge ?? 1;
    requireNonNegative(`loads.${i}.watts`, load.watts);
    requireFraction(`loads.${i}.pf`, pf);
    requireWithin(`loads.${i}.surge`, surge, 1, 20);
    const own = load.watts / pf;
    watts += load.watts;
    va += own;
    if (own * (surge - 1) > start) {
      start = own * (surge - 1);
      starts = load.name;
    }
  });
  return { watts, va, surgeVa: va + start, starts };
}

/** Battery current at full output and empty battery: I = S / (eta U). @returns A @throws RangeError naming the field */
export function currentAtCutoffA(inverter: { va: number; efficiency: number; cutoffV: number }): number {
  requirePositive('va', inverter.va);
  requireFraction('efficiency', inverter.efficiency);
  requirePositive('cutoffV', inverter.cutoffV);
  return inverter.va / (inverter.efficiency * inverter.cutoffV);
}
