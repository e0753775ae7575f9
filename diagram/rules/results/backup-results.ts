import type { Context } from '../context';
import type { BackupResult } from '../examination';
import { backupsOf } from '../readings/figures';
import { round, roundOrNull } from './round';

/** Every backup source: what it carries on battery, for how long, and what was assumed of its bank. */
export function backupResults(context: Context): BackupResult[] {
  return backupsOf(context).map(({ inverter, load, chargeWatts, hours, dcAmps, assumed }) => ({
    inverter: inverter.id,
    watts: round(load.watts),
    va: round(load.va),
    surgeVa: round(load.surgeVa),
    chargeWatts: roundOrNull(chargeWatts),
    autonomyHours: roundOrNull(hours),
    dcAmps: roundOrNull(dcAmps),
    dischargeDepth: assumed.dischargeDepth,
    ageing: assumed.ageing,
    peukert: assumed.peukert,
  }));
}
