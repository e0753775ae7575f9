import { backfeed } from './backfeed';
import { backupNeutralBehindOtherRcd } from './backup-neutral-behind-other-rcd';
import { backupNeutralLost } from './backup-neutral-lost';
import { borrowedNeutral } from './borrowed-neutral';
import { duplicateRef } from './duplicate-ref';
import { earthNeutralJoined } from './earth-neutral-joined';
import { fusedNeutral } from './fused-neutral';
import { heavySocketOnLightWay } from './heavy-socket-on-light-way';
import { highDrop } from './high-drop';
import { livePins } from './live-pins';
import { looseWire } from './loose-wire';
import { missingData } from './missing-data';
import { missingEarth } from './missing-earth';
import { mixedFeeds } from './mixed-feeds';
import { noEarthReferenceOnBackup } from './no-earth-reference-on-backup';
import { noMainBond } from './no-main-bond';
import { noMainEarth } from './no-main-earth';
import { noMainSwitch } from './no-main-switch';
import { noOvercurrent } from './no-overcurrent';
import { noRcd } from './no-rcd';
import { noSelectivity } from './no-selectivity';
import { noSpd } from './no-spd';
import { openLine } from './open-line';
import { openNeutral } from './open-neutral';
import { overloadedMain } from './overloaded-main';
import { overloadedWay } from './overloaded-way';
import { rcdIdleOnBackup } from './rcd-idle-on-backup';
import { rcdUnderrated } from './rcd-underrated';
import { regulatorFeedsOther } from './regulator-feeds-other';
import { residualImbalance } from './residual-imbalance';
import { reversedPolarity } from './reversed-polarity';
import { shortCircuit } from './short-circuit';
import { singlePoleMain } from './single-pole-main';
import { slowDisconnection } from './slow-disconnection';
import { switchedEarth } from './switched-earth';
import { switchedNeutral } from './switched-neutral';
import { thinEarth } from './thin-earth';
import { tooManyPoints } from './too-many-points';
import type { Rule } from './types';
import { undersizedCable } from './undersized-cable';
import { weakBreakingCapacity } from './weak-breaking-capacity';
import { wetPlaceSocket } from './wet-place-socket';
import { wrongCurve } from './wrong-curve';

/** Every rule, by id; the file of a rule has its name. One line a rule, in order of the alphabet. */
export const rules: readonly Rule[] = [
  backfeed,
  backupNeutralBehindOtherRcd,
  backupNeutralLost,
  borrowedNeutral,
  duplicateRef,
  earthNeutralJoined,
  fusedNeutral,
  heavySocketOnLightWay,
  highDrop,
  livePins,
  looseWire,
  missingData,
  missingEarth,
  mixedFeeds,
  noEarthReferenceOnBackup,
  noMainBond,
  noMainEarth,
  noMainSwitch,
  noOvercurrent,
  noRcd,
  noSelectivity,
  noSpd,
  openLine,
  openNeutral,
  overloadedMain,
  overloadedWay,
  rcdIdleOnBackup,
  rcdUnderrated,
  regulatorFeedsOther,
  residualImbalance,
  reversedPolarity,
  shortCircuit,
  singlePoleMain,
  slowDisconnection,
  switchedEarth,
  switchedNeutral,
  thinEarth,
  tooManyPoints,
  undersizedCable,
  weakBreakingCapacity,
  wetPlaceSocket,
  wrongCurve,
];
