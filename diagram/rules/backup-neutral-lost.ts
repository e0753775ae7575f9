import { recalled, seen } from './clauses';
import { neutralFaultsOf } from './readings/neutral-faults';
import { neutralRemedies } from './readings/move-neutral';
import type { Rule } from './types';
import { capital, sayParts } from './readings/words';

/** A backed-up load whose neutral is gone on battery, or goes with one rcd, two-pole device or plug. */
export const backupNeutralLost: Rule = {
  meta: {
    id: 'backup-neutral-lost',
    severity: 'danger',
    group: 'separation',
    title: 'On battery a load has no sure way back to the inverter',
    clauses: [recalled('IEC 60364-5-55', '551.4.1'), seen('BS 7671', '521.8.2')],
    lesson:
      'On mains both neutrals meet somewhere and all is well. On battery, once the device or plug that joined them is open, the ' +
      'current has no way back: the neutral of the whole mains side floats up to line voltage through the load, behind a main ' +
      'switch that is off.',
    remedy: "Lead the neutral of a backed-up load to the neutral bar of the inverter's own output.",
  },
  *check(context) {
    for (const fault of neutralFaultsOf(context, 'lost')) {
      const { points, wires, devices, conditions } = fault;
      const names = sayParts(context, points);
      const one = points.length === 1;
      yield {
        heading: `${capital(names)} ${one ? 'loses its' : 'lose their'} neutral on battery`,
        message:
          devices.length > 0
            ? `On battery the neutral of ${names} returns through ${sayParts(context, devices)}, which ${one ? 'its' : 'their'} line does not pass. With ${devices.length === 1 ? sayParts(context, devices) : 'any of them'} open, ${one ? 'it has' : 'they have'} no way back and the neutral stands at line voltage.`
            : `On battery the neutral of ${names} no longer reaches the neutral of the inverter. ${one ? 'It stops' : 'They stop'}, and the mains neutral stands at line voltage.`,
        parts: points,
        wires,
        conditions,
        remedies: neutralRemedies(context, fault),
      };
    }
  },
};
