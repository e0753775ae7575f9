import { recalled, seen } from './clauses';
import { neutralContacts } from './readings/neutral-contacts';
import { throughTheLine } from './readings/through-the-line';
import type { Rule } from './types';
import { capital, inOrder, sayParts } from './readings/words';

/** A single-pole control contact through which a load's neutral returns. */
export const switchedNeutral: Rule = {
  meta: {
    id: 'switched-neutral',
    severity: 'danger',
    group: 'polarity',
    title: 'A single-pole switch stands in the neutral',
    clauses: [seen('BS 7671', '132.14.1'), seen('BS 7671', '132.14.2'), recalled('IEC 60364-5-53', '530.3.2')],
    lesson:
      'The lamp goes dark when the switch opens, so everybody takes it for dead. But its line is still there: whoever ' +
      'changes the lamp holds the live contact, and the way back is through him. A switch belongs in the line, where opening it ' +
      'takes the voltage away and not only the current.',
    remedy:
      'Lead the line through the switch and the neutral straight to the lamp, or fit a switch that opens both poles.',
  },
  *check(context) {
    for (const { contacts, points, conditions, wires } of neutralContacts(context).switched) {
      const switches = inOrder(context, contacts);
      const names = sayParts(context, contacts);
      yield {
        heading: `${capital(names)} ${switches.length === 1 ? 'opens' : 'open'} the neutral`,
        message:
          `The neutral of ${sayParts(context, points)} returns through ${names}, which ${switches.length === 1 ? 'opens' : 'open'} one pole only. ` +
          `Switched off, ${points.length === 1 ? 'it stays' : 'they stay'} at full voltage against earth.`,
        parts: switches.map(({ id }) => id),
        wires,
        conditions,
        remedies: contacts.length === 1 && points.length === 1 ? throughTheLine(context, contacts[0]!, points[0]!) : [],
      };
    }
  },
};
