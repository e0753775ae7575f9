import { seen, recalled } from './clauses';
import { neutralContacts } from './readings/neutral-contacts';
import { bridge } from './readings/rewire';
import type { Rule } from './types';
import { capital, say, sayParts } from './readings/words';

/** A fuse or a single-pole breaker in a neutral. */
export const fusedNeutral: Rule = {
  meta: {
    id: 'fused-neutral',
    severity: 'danger',
    group: 'polarity',
    title: 'A fuse or single-pole breaker stands in the neutral',
    clauses: [seen('BS 7671', '132.14.2'), recalled('IEC 60364-4-43', '431.2.1')],
    lesson:
      'When the fuse in the neutral blows before the one in the line, the circuit stops working and looks dead, but all of it ' +
      'stands at line voltage. A fuse or single breaker belongs in the line only; what opens the neutral must open the line with it.',
    remedy:
      'Join the neutral straight to its bar and put the protection in the line, or fit a linked two-pole breaker.',
  },
  *check(context) {
    for (const { contacts, points, wires, conditions } of neutralContacts(context).fused) {
      const id = contacts[0]!;
      yield {
        heading: `${capital(say(context, id))} stands in the neutral`,
        message:
          `The neutral of ${sayParts(context, points)} returns through ${say(context, id)}. When it opens, ` +
          `nothing works and everything behind it still stands at line voltage.`,
        parts: [id],
        wires,
        conditions,
        remedies: bridge(context, `Take ${say(context, id)} out of the neutral`, id, ['1', '2']),
      };
    }
  },
};
