import { backfeed } from './backfeed';
import { backupNeutralBehindOtherRcd } from './backup-neutral-behind-other-rcd';
import { backupNeutralLost } from './backup-neutral-lost';
import { borrowedNeutral } from './borrowed-neutral';
import { duplicateRef } from './duplicate-ref';
import { earthNeutralJoined } from './earth-neutral-joined';
import { fusedNeutral } from './fused-neutral';
import { livePins } from './live-pins';
import { looseWire } from './loose-wire';
import { missingData } from './missing-data';
import { missingEarth } from './missing-earth';
import { mixedFeeds } from './mixed-feeds';
import { noEarthReferenceOnBackup } from './no-earth-reference-on-backup';
import { noMainEarth } from './no-main-earth';
import { noOvercurrent } from './no-overcurrent';
import { noRcd } from './no-rcd';
import { openLine } from './open-line';
import { openNeutral } from './open-neutral';
import { overloadedWay } from './overloaded-way';
import { rcdIdleOnBackup } from './rcd-idle-on-backup';
import { residualImbalance } from './residual-imbalance';
import { reversedPolarity } from './reversed-polarity';
import { shortCircuit } from './short-circuit';
import { switchedEarth } from './switched-earth';
import { switchedNeutral } from './switched-neutral';
import type { Rule } from './types';
import { undersizedCable } from './undersized-cable';

/** Every rule, by id; the file of a rule has its name. One line a rule, in order of the alphabet. */
export const rules: readonly Rule[] = [
  backfeed,
  backupNeutralBehindOtherRcd,
  backupNeutralLost,
  borrowedNeutral,
  duplicateRef,
  earthNeutralJoined,
  fusedNeutral,
  livePins,
  looseWire,
  missingData,
  missingEarth,
  mixedFeeds,
  noEarthReferenceOnBackup,
  noMainEarth,
  noOvercurrent,
  noRcd,
  openLine,
  openNeutral,
  overloadedWay,
  rcdIdleOnBackup,
  residualImbalance,
  reversedPolarity,
  shortCircuit,
  switchedEarth,
  switchedNeutral,
  undersizedCable,
];
