import { isOvercurrent } from '../terminals/roles-of-parts';
import { seen } from './clauses';
import { neutralFaultsOf } from './readings/neutral-faults';
import { neutralRemedies } from './readings/move-neutral';
import type { Rule } from './types';
import { capital, sayParts } from './readings/words';

/** Line from one way, back through the neutral of another way or another rcd. */
export const borrowedNeutral: Rule = {
  meta: {
    id: 'borrowed-neutral',
    severity: 'danger',
    group: 'separation',
    title: "A load returns by another way's neutral",
    clauses: [seen('BS 7671', '314.4'), seen('BS 7671', '521.8.2')],
    lesson:
      'The breaker of the second way is off, its line is proved dead, and the neutral is unscrewed. At that moment the borrowed load ' +
      'puts line voltage on the open neutral end, in the hands of somebody who has done everything right.',
    remedy: 'Lead the neutral back with its own line, to the bar and the rcd of its own way.',
  },
  *check(context) {
    for (const fault of neutralFaultsOf(context, 'borrowed')) {
      const { points, wires, devices, conditions, link } = fault;
      const names = sayParts(context, points);
      const ways = devices.filter((id) => isOvercurrent(context.graph.parts.get(id)!));
      const through = `${ways.length === devices.length ? 'the neutral of ' : ''}${sayParts(context, devices)}`;
      yield {
        heading: link
          ? 'Two neutrals are joined'
          : `${capital(names)} ${points.length === 1 ? 'borrows' : 'borrow'} a neutral`,
        message: link
          ? `A wire joins the neutrals of ${sayParts(context, devices)}, so that each carries current of the other: opened at one, it is still live from the other.`
          : `${capital(names)} ${points.length === 1 ? 'gets its' : 'get their'} line from one way and ${points.length === 1 ? 'returns' : 'return'} through ${through}. With that way switched off its neutral still carries this current.`,
        parts: points,
        wires,
        conditions,
        remedies: neutralRemedies(context, fault),
      };
    }
  },
};
