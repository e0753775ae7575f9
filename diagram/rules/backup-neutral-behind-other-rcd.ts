import { recalled } from './clauses';
import { neutralFaultsOf } from './readings/neutral-faults';
import { neutralRemedies } from './readings/move-neutral';
import type { Rule } from './types';
import { capital, sayParts } from './readings/words';

/** A backed-up load whose line and neutral do not pass the same residual-current devices. */
export const backupNeutralBehindOtherRcd: Rule = {
  meta: {
    id: 'backup-neutral-behind-other-rcd',
    severity: 'defect',
    group: 'separation',
    title: 'Backed-up line and neutral pass different rcds',
    clauses: [recalled('IEC 60364-5-53', '531.3.1'), recalled('IEC 60364-5-55', '551.6.2')],
    lesson:
      'The backup board has its own rcd, but the neutral still goes to the old bar. On mains or on battery one of the two rcds sees the ' +
      'whole load current as a fault; the other sees nothing even when there is one.',
    remedy: 'Move the neutral to the bar behind the rcd that its line passes.',
  },
  *check(context) {
    for (const fault of neutralFaultsOf(context, 'behind')) {
      const { points, wires, devices, foreign, conditions, link } = fault;
      const names = sayParts(context, points);
      const rcds = sayParts(context, devices);
      yield {
        heading: link
          ? 'Neutrals of mains and backup are joined'
          : `The neutral of ${names} is not behind the rcd of its line`,
        message: link
          ? `A wire joins the neutral of the backup side to that of the mains, round ${rcds}: part of the current goes astray, and ${rcds} trips in normal use.`
          : foreign
            ? `On battery current of ${names} returns through ${rcds}, which its line does not pass. The rcd trips in normal use.`
            : `${capital(rcds)} carries the line of ${names} but not the neutral. It trips in normal use.`,
        parts: wires.length === 0 ? devices : points,
        wires,
        conditions,
        remedies: neutralRemedies(context, fault),
      };
    }
  },
};
