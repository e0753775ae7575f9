import { seen } from './clauses';
import type { Context } from './context';
import { listNames } from '../document/names';
import type { Remedy, Rule } from './types';
import { say } from './readings/words';

/** The rooms that a way feeds, as its name. */
function nameAfter({ graph }: Context, device: string, places: readonly string[]): Remedy[] {
  const label = listNames(places.map((id) => graph.places.get(id)?.name ?? '').filter((name) => name !== ''));
  return label === ''
    ? []
    : [
        {
          label: `Name it ${label}`,
          patch: { set: { parts: [{ ...graph.parts.get(device)!, label: label.slice(0, 80) }] } },
        },
      ];
}

/** A way without a label for the circuit chart. */
export const unnamedWay: Rule = {
  meta: {
    id: 'unnamed-way',
    severity: 'advice',
    group: 'drawing',
    title: 'A way without a name',
    clauses: [seen('BS 7671', '514.1.2')],
    lesson:
      'In the dark, with something smoking, nobody traces wires. The chart on the door must say what each breaker feeds.',
    remedy: 'Write what the way feeds.',
  },
  *check(context) {
    for (const { device, label, number, places } of context.ways) {
      if (label.trim() !== '') continue;
      yield {
        heading: `Way ${number} has no name`,
        message: `${say(context, device)} feeds way ${number}, and the circuit chart has no word for it.`,
        parts: [device],
        remedies: nameAfter(context, device, places),
      };
    }
  },
};
