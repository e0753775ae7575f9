import { COMMON_PRACTICE } from './clauses';
import type { Rule } from './types';
import { capital, say } from './readings/words';

/** A part joined to nothing. */
export const unusedPart: Rule = {
  meta: {
    id: 'unused-part',
    severity: 'advice',
    group: 'drawing',
    title: 'A part joined to nothing',
    clauses: [COMMON_PRACTICE],
    lesson: 'It stands on the sheet and in the list of materials, and nobody knows where it goes.',
    remedy: 'Wire it, or take it off the sheet.',
  },
  *check(context) {
    const { document, graph } = context;
    const used = new Set(document.wires.flatMap(({ from, to }) => [from[0], to[0]]));
    for (const part of graph.parts.values()) {
      const spare = (part.kind === 'mcb' || part.kind === 'rcbo') && part.spare;
      const plugged = part.kind === 'plug' && part.in !== undefined && graph.parts.has(part.in);
      if (used.has(part.id) || spare || plugged) continue;
      yield {
        heading: `${capital(say(context, part.id))} is joined to nothing`,
        message: `No wire leads to ${say(context, part.id)}.`,
        parts: [part.id],
        remedies: [{ label: 'Take it off the sheet', patch: { remove: { parts: [part.id] } } }],
      };
    }
  },
};
