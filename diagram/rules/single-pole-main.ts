import type { Drawn } from '../circuit/drawn';
import { polesOf } from '../document/kinds';
import type { Part, PartOf, Wire } from '../document/schema';
import { isResidual } from '../terminals/roles-of-parts';
import { recalled, seen } from './clauses';
import type { Context } from './context';
import { commanders } from './readings/command';
import { figuresOf, onMains } from './readings/figures';
import type { Remedy, Rule } from './types';
import { capital, say } from './readings/words';

/** A two-pole switch in its place, with the neutral that leaves the meter led through it. */
function twoPoles({ graph, document, parts }: Context, main: Part): Remedy[] {
  if (main.kind !== 'isolator' && main.kind !== 'mcb') return [];
  const from = parts('meter')[0];
  const leaving = from
    ? document.wires.filter((wire) => [wire.from, wire.to].some(([id, mark]) => id === from.id && mark === '3'))
    : [];
  if (polesOf(main) === 2 || leaving.length !== 1) return [];
  const [wire] = leaving as [Wire];
  const far = wire.from[0] === from!.id ? wire.to : wire.from;
  let id = `${main.id}.neutral`;
  for (let n = 2; graph.wires.has(id); n++) id = `${main.id}.neutral${n}`;
  const into: Wire = { ...wire, from: [from!.id, '3'], to: [main.id, '3'] };
  const onward: Wire = { ...wire, id, from: [main.id, '4'], to: far };
  const part = { ...main, poles: 2 } as PartOf<'isolator' | 'mcb'>;
  return [
    {
      label: 'Fit a two-pole switch and lead the neutral through it',
      patch: { set: { parts: [part], wires: [into, onward] } },
    },
  ];
}

/** A main switch that leaves the neutral joined to the street. */
export const singlePoleMain: Rule = {
  meta: {
    id: 'single-pole-main',
    severity: 'defect',
    group: 'overload',
    title: 'The main switch leaves the neutral on',
    clauses: [seen('BS 7671', '462.1.201'), recalled('IEC 60364-4-46', '461.2, 462.2')],
    lesson:
      'A neutral is harmless only as long as the street keeps it at earth. With a broken neutral outside, or ' +
      'line and neutral swapped at the pole, a home whose main switch opens the line alone is live through its ' +
      'neutral while everybody thinks it is off.',
    remedy: 'Fit a two-pole main switch that opens line and neutral together.',
  },
  *check(context) {
    const { graph } = context;
    const all = commanders(context);
    const main = all.find(({ id }) => id === context.mainSwitch?.id) ?? all[0];
    if (!main) return;
    const fed = figuresOf(context).drawn.filter(
      ({ source, neutralEdges }) => source?.kind === 'mains' && neutralEdges.length > 0,
    );
    // A neutral that is led past an rcd of its line too is a crossed neutral, and said as such.
    const crossed = (each: Drawn) =>
      each.lineDevices.some(
        (id) => isResidual(graph.parts.get(id)!) && !each.neutralDevices.includes(id) && id !== main.id,
      );
    const past = fed.filter(
      (each) => !each.neutralDevices.includes(main.id) && (polesOf(main) === 1 || !crossed(each)),
    );
    if (fed.length === 0 || past.length === 0) return;
    yield {
      heading: `${capital(say(context, main.id))} leaves the neutral on`,
      message:
        polesOf(main) === 1
          ? `${capital(say(context, main.id))} opens the line alone. The neutral of the home stays joined to the street when it is off.`
          : `The neutral passes ${say(context, main.id)} by: it stays joined to the street when the switch is off.`,
      parts: [main.id],
      conditions: onMains(context),
      get remedies() {
        return twoPoles(context, main);
      },
    };
  },
};
