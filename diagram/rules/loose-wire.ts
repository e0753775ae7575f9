import { COMMON_PRACTICE } from './clauses';
import type { End } from '../document/schema';
import { takeOut } from './readings/rewire';
import type { Rule } from './types';
import { say } from './readings/words';

/** A wire whose end names a part or terminal that does not exist. */
export const looseWire: Rule = {
  meta: {
    id: 'loose-wire',
    severity: 'defect',
    group: 'drawing',
    title: 'A wire ends nowhere',
    clauses: [COMMON_PRACTICE],
    lesson:
      'The file names a terminal that no part has. Until somebody says where the wire goes, it joins nothing, and whatever it was to feed is dead.',
    remedy: 'Lead the end to an existing terminal, or take the wire away.',
  },
  *check(context) {
    const { graph } = context;
    const isThere = ([part, mark]: End) => graph.node(part, mark) !== undefined;
    const where = ([part, mark]: End) =>
      graph.parts.has(part) ? `terminal ${mark} of ${say(context, part)}` : `a part that is not drawn`;
    for (const wire of graph.loose) {
      const missing = [wire.from, wire.to].filter((end) => !isThere(end));
      yield {
        heading: 'A wire goes nowhere',
        message: `A wire of role ${wire.role} names ${missing.map(where).join(' and ')}, which does not exist. It joins nothing.`,
        parts: [...new Set([wire.from, wire.to].filter(([part]) => graph.parts.has(part)).map(([part]) => part))],
        wires: [wire.id],
        remedies: [takeOut('Take the wire away', [wire.id])],
      };
    }
  },
};
