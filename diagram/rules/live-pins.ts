import type { PartOf } from '../document/schema';
import { recalled, seen } from './clauses';
import { livePins as readPins } from './readings/live-pins';
import { takeLead } from './readings/rewire';
import type { Rule } from './types';
import { capital, say } from './readings/words';

/** A plug whose exposed pins are live when it hangs or is pulled. */
export const livePins: Rule = {
  meta: {
    id: 'live-pins',
    severity: 'danger',
    group: 'separation',
    title: 'Bare pins of a plug are live',
    clauses: [recalled('IEC 60364-5-55', '551.7.2'), seen('BS 7671', '551.6.1')],
    lesson:
      'A socket hides its contacts, a plug shows them. A plug may be fed only by the socket it stands in; if anything behind it can make ' +
      'its pins live, a child who pulls it out holds them.',
    remedy:
      'Let the source end in a socket and the load in a plug; wire an inverter so that nothing returns through its input plug.',
  },
  *check(context) {
    for (const { plug, pins, through, conditions } of readPins(context)) {
      const { in: socket } = context.graph.parts.get(plug) as PartOf<'plug'>;
      const name = say(context, plug);
      yield {
        heading: `The pins of ${name} are live`,
        message:
          `${capital(name)} ${socket === undefined ? 'hangs' : 'can be pulled'} with pin ${pins.join(' and ')} at line voltage` +
          `${through ? ', through a load that returns by it' : ', from the side of its own lead'}.`,
        parts: [plug],
        remedies: takeLead(context, plug),
        conditions,
      };
    }
  },
};
