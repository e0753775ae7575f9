import { dcStrings, fusesOn } from '../circuit/dc-leads';
import type { End, PartOf, Wire } from '../document/schema';
import { COMMON_PRACTICE } from './clauses';
import type { Context } from './context';
import type { Remedy, Rule } from './types';
import { be, capital, say, sayParts } from './readings/words';

/** Exchanges the ends at two terminals of a part. */
function exchange({ document }: Context, id: string, one: string, other: string): Wire[] {
  const turn = ([part, mark]: End): End => [
    part,
    part !== id ? mark : mark === one ? other : mark === other ? one : mark,
  ];
  const at = (end: End) => end[0] === id && (end[1] === one || end[1] === other);
  return document.wires
    .filter(({ from, to }) => at(from) || at(to))
    .map((wire) => ({ ...wire, from: turn(wire.from), to: turn(wire.to) }));
}

/** At the inverter where the fuse is rightly at the battery's plus, else at the batteries. */
function rightWay(context: Context, inverter: PartOf<'inverter'>, reversed: readonly PartOf<'battery'>[]): Remedy[] {
  const { strings } = dcStrings(context.graph, inverter);
  const all = strings.every(({ batteries }) => batteries.every((battery) => reversed.includes(battery)));
  const fusedAtMinus = strings.some(({ plus }) => fusesOn(context.graph, plus).length > 0);
  if (all && !fusedAtMinus)
    return [
      {
        label: `Exchange plus and minus at ${say(context, inverter.id)}`,
        patch: { set: { wires: exchange(context, inverter.id, 'bat.+', 'bat.-') } },
      },
    ];
  const wires = new Map<string, Wire>();
  for (const { id } of reversed) for (const wire of exchange(context, id, '+', '-')) wires.set(wire.id, wire);
  // A wire between two turned batteries would need both its ends turned at once: that is left to the hand.
  return reversed.length === 1
    ? [{ label: `Turn ${say(context, reversed[0]!.id)} round`, patch: { set: { wires: [...wires.values()] } } }]
    : [];
}

/** A battery whose minus goes to the inverter's plus. */
export const batteryReversed: Rule = {
  meta: {
    id: 'battery-reversed',
    severity: 'danger',
    group: 'backup',
    title: 'A battery is connected the wrong way round',
    clauses: [COMMON_PRACTICE],
    lesson:
      'An inverter fed backwards is a short circuit across the bank: its input stage burns within a breath, with ' +
      'hundreds of amperes behind it. In a string, one battery turned round is charged by all the others until ' +
      'it bursts.',
    remedy: 'Plus to plus, minus to minus; check with a meter before the last lead goes on.',
  },
  *check(context) {
    for (const inverter of context.parts('inverter')) {
      if (inverter.kind !== 'inverter') continue;
      const { reversed } = dcStrings(context.graph, inverter);
      if (reversed.length === 0) continue;
      const ids = reversed.map(({ id }) => id);
      yield {
        heading: `${capital(sayParts(context, ids))} ${be(ids.length)} the wrong way round`,
        message: `The minus of ${sayParts(context, ids)} lies towards the plus terminal of ${say(context, inverter.id)}. It burns the moment the last lead goes on.`,
        parts: [...ids, inverter.id],
        remedies: rightWay(context, inverter, reversed),
      };
    }
  },
};
