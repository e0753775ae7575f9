import { seen, recalled } from './clauses';
import { neutralContacts } from './readings/neutral-contacts';
import { bridge, turnMarks } from './readings/rewire';
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
      const rcbo = context.graph.parts.get(id)!.kind === 'rcbo';
      yield {
        heading: `${capital(say(context, id))} stands in the neutral`,
        message: rcbo
          ? `The neutral of ${sayParts(context, points)} returns through the pole of ${say(context, id)} that watches the current, their line through the other: a fault from line to earth is no overcurrent to it.`
          : `The neutral of ${sayParts(context, points)} returns through ${say(context, id)}. When it opens, ` +
            `nothing works and everything behind it still stands at line voltage.`,
        parts: [id],
        wires,
        conditions,
        remedies: rcbo
          ? turnMarks(context, `Change line and neutral over at ${say(context, id)}`, id, { 1: '3', 3: '1', 2: '4', 4: '2' })
          : bridge(context, `Take ${say(context, id)} out of the neutral`, id, ['1', '2']),
      };
    }
  },
};
