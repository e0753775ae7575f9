import { natureOfNode } from '../circuit/natures';
import type { Part } from '../document/schema';
import { COMMON_PRACTICE } from './clauses';
import type { Context } from './context';
import { hasWire } from './readings/earth-gaps';
import { openEnds } from './readings/open-ends';
import { capital, inOrder, say, sayParts } from './readings/words';
import type { Remedy, Rule } from './types';

/** A breaker with nothing behind it may be meant as spare. */
function asSpare(context: Context, part: Part): Remedy[] {
  if (part.kind !== 'mcb' && part.kind !== 'rcbo') return [];
  const behind = ['2', '4'].map((mark) => context.graph.node(part.id, mark)).filter((node) => node !== undefined);
  return behind.some((node) => hasWire(context, node))
    ? []
    : [{ label: 'Mark it as spare', patch: { set: { parts: [{ ...part, spare: true }] } } }];
}

/** A terminal that must be connected for the part to work, and is not. */
export const openTerminal: Rule = {
  meta: {
    id: 'open-terminal',
    severity: 'defect',
    group: 'polarity',
    title: 'A terminal that must be wired is not',
    clauses: [COMMON_PRACTICE],
    lesson:
      'A part with half its wires is either unfinished or wired from memory. The screw that is empty on the drawing is empty on the wall.',
    remedy: 'Wire the terminal, or mark the way as spare.',
  },
  *check(context) {
    const ends = openEnds(context);
    const isDc = ({ part, missing }: (typeof ends)[number]) =>
      missing.every((mark) => natureOfNode(context.graph, context.graph.node(part.id, mark)!) === 'D');
    for (const { part, missing } of ends.filter((end) => !isDc(end)))
      yield {
        heading: `${capital(say(context, part.id))} is not wired whole`,
        message: `Terminal ${missing.join(' and ')} of ${say(context, part.id)} ${missing.length === 1 ? 'has' : 'have'} no wire: as drawn it cannot do its work.`,
        parts: [part.id],
        remedies: asSpare(context, part),
      };
    const dc = ends.filter(isDc).map(({ part }) => part.id);
    if (dc.length === 0) return;
    yield {
      heading: 'The battery is not wired whole',
      message: `A lead of the battery is missing at ${sayParts(context, dc)}: without it nothing feeds the home in an outage.`,
      parts: inOrder(context, dc).map(({ id }) => id),
    };
  },
};
