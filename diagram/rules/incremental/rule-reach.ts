/**
 * How far the rules look, as far as re-examining a part of the home goes. A rule that is named nowhere here is asked again
 * of the whole home, over what is known of it; one that then reads more than is known has the home examined from scratch.
 */

/**
 * Rules whose finding comes of one branch and the trunk alone: about a point, a wire, a terminal, a device or one stretch of
 * conductor. They are asked of the branch that changed. A finding of theirs that names the trunk as well may gather several
 * branches: it has the home examined from scratch when it changes.
 */
export const OF_A_BRANCH: ReadonlySet<string> = new Set([
  'backfeed',
  'battery-place',
  'battery-reversed',
  'bypassed-contact',
  'charger-overload',
  'crowded-terminal',
  'earth-neutral-joined',
  'fused-neutral',
  'heavy-socket-on-light-way',
  'high-drop',
  'line-role-mismatch',
  'live-pins',
  'loose-wire',
  'missing-data',
  'missing-earth',
  'mixed-feeds',
  'no-battery-fuse',
  'no-earth-reference-on-backup',
  'no-main-bond',
  'no-main-earth',
  'no-overcurrent',
  'no-spd',
  'open-line',
  'open-neutral',
  'open-terminal',
  'permanent-feed',
  'regulator-feeds-other',
  'reversed-polarity',
  'short-circuit',
  'slow-disconnection',
  'switched-earth',
  'switched-neutral',
  'thin-battery-lead',
  'thin-earth',
  'too-many-points',
  'two-way-miswired',
  'undersized-cable',
  'unused-part',
  'wet-place-socket',
  'wrong-colour',
  'wrong-curve',
]);
