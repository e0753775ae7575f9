import { backfeed } from './backfeed';
import { backupNeutralBehindOtherRcd } from './backup-neutral-behind-other-rcd';
import { backupNeutralLost } from './backup-neutral-lost';
import { backupOverload } from './backup-overload';
import { backupSurge } from './backup-surge';
import { batteryPlace } from './battery-place';
import { batteryReversed } from './battery-reversed';
import { borrowedNeutral } from './borrowed-neutral';
import { bypassedContact } from './bypassed-contact';
import { chargerOverload } from './charger-overload';
import { crowdedTerminal } from './crowded-terminal';
import { duplicateRef } from './duplicate-ref';
import { earthNeutralJoined } from './earth-neutral-joined';
import { fusedNeutral } from './fused-neutral';
import { heavySocketOnLightWay } from './heavy-socket-on-light-way';
import { highDrop } from './high-drop';
import { lineRoleMismatch } from './line-role-mismatch';
import { liveAfterMainOff } from './live-after-main-off';
import { livePins } from './live-pins';
import { looseWire } from './loose-wire';
import { missingData } from './missing-data';
import { missingEarth } from './missing-earth';
import { mixedFeeds } from './mixed-feeds';
import { noBackupIsolation } from './no-backup-isolation';
import { noBatteryFuse } from './no-battery-fuse';
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
import { openTerminal } from './open-terminal';
import { overloadedMain } from './overloaded-main';
import { overloadedWay } from './overloaded-way';
import { permanentFeed } from './permanent-feed';
import { rcdIdleOnBackup } from './rcd-idle-on-backup';
import { rcdUnderrated } from './rcd-underrated';
import { regulatorFeedsOther } from './regulator-feeds-other';
import { residualImbalance } from './residual-imbalance';
import { reversedPolarity } from './reversed-polarity';
import { sharedBoxLines } from './shared-box-lines';
import { shortAutonomy } from './short-autonomy';
import { shortCircuit } from './short-circuit';
import { singlePoleMain } from './single-pole-main';
import { slowDisconnection } from './slow-disconnection';
import { switchedEarth } from './switched-earth';
import { switchedNeutral } from './switched-neutral';
import { thinBatteryLead } from './thin-battery-lead';
import { thinEarth } from './thin-earth';
import { tooManyPoints } from './too-many-points';
import { twoSourcesUnmarked } from './two-sources-unmarked';
import { twoWayMiswired } from './two-way-miswired';
import type { Rule } from './types';
import { undersizedCable } from './undersized-cable';
import { unnamedWay } from './unnamed-way';
import { unusedPart } from './unused-part';
import { weakBreakingCapacity } from './weak-breaking-capacity';
import { wetPlaceSocket } from './wet-place-socket';
import { wrongColour } from './wrong-colour';
import { wrongCurve } from './wrong-curve';

/** Every rule, by id; the file of a rule has its name. One line a rule, in order of the alphabet. */
export const rules: readonly Rule[] = [
  backfeed,
  backupNeutralBehindOtherRcd,
  backupNeutralLost,
  backupOverload,
  backupSurge,
  batteryPlace,
  batteryReversed,
  borrowedNeutral,
  bypassedContact,
  chargerOverload,
  crowdedTerminal,
  duplicateRef,
  earthNeutralJoined,
  fusedNeutral,
  heavySocketOnLightWay,
  highDrop,
  lineRoleMismatch,
  liveAfterMainOff,
  livePins,
  looseWire,
  missingData,
  missingEarth,
  mixedFeeds,
  noBackupIsolation,
  noBatteryFuse,
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
  openTerminal,
  overloadedMain,
  overloadedWay,
  permanentFeed,
  rcdIdleOnBackup,
  rcdUnderrated,
  regulatorFeedsOther,
  residualImbalance,
  reversedPolarity,
  sharedBoxLines,
  shortAutonomy,
  shortCircuit,
  singlePoleMain,
  slowDisconnection,
  switchedEarth,
  switchedNeutral,
  thinBatteryLead,
  thinEarth,
  tooManyPoints,
  twoSourcesUnmarked,
  twoWayMiswired,
  undersizedCable,
  unnamedWay,
  unusedPart,
  weakBreakingCapacity,
  wetPlaceSocket,
  wrongColour,
  wrongCurve,
];
