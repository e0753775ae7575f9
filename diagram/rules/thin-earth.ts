import type { Cable, Wire } from '../document/schema';
import type { Practice } from '../practices/types';
import { exceeds, mm2, sayCable } from './readings/amounts';
import { seen } from './clauses';
import type { Context } from './context';
import { earthNeeds, type EarthNeed } from './readings/earth-needs';
import { figuresOf } from './readings/figures';
import { changeCables } from './readings/remedies';
import type { Remedy, Rule } from './types';
import { capital, say, sayParts, sayWire } from './readings/words';

/** Main bonding, mm2 copper: 10 on TN-C-S with a neutral up to 35 (BS 7671 Table 54.8, seen), else 6 at least (544.1.1, from memory). */
const bondingMm2 = (system: string): number => (system === 'TN-C-S' ? 10 : 6);

const sizeOf = ({ csa, cpc }: Cable): number => cpc ?? csa;

/** Each earth core in the least size on sale that is enough for it. */
function thicker({ csaMm2 }: Practice, thin: readonly { cable: Cable; need: number }[]): Remedy[] {
  const cables = thin.map(({ cable, need }) => {
    const cpc = csaMm2.find((size) => size >= need);
    return cpc === undefined ? null : { ...cable, cpc, ...(alone(cable) && { csa: cpc }) };
  });
  if (!cables.every((cable) => cable !== null)) return [];
  const sizes = [...new Set(cables.map(({ cpc }) => cpc))].sort((a, b) => a - b);
  return [changeCables(`Pull an earth core of ${sizes.join(' and ')} mm2`, cables)];
}

/** A single core that is the earth itself: size and earth size are one. */
const alone = ({ cores }: Cable): boolean => cores === 1;

/** Bonding conductors: the wires from an extraneous part to the first bar. */
function* bonds(context: Context): Iterable<{ wire: Wire; cable: Cable; part: string }> {
  const { graph } = context;
  const { earth } = figuresOf(context);
  for (const { id } of context.parts('bond')) {
    for (const number of [...(earth.path(graph.node(id, 'E')) ?? [])].reverse()) {
      const { wire, a, b } = graph.edges[number]!;
      const cable = wire?.cable === undefined ? undefined : graph.cables.get(wire.cable);
      if (wire && cable) yield { wire, cable, part: id };
      if ([a, b].some((node) => graph.partOf[node]!.kind === 'earth-bar')) break;
    }
  }
}

/**
 * A protective conductor below what the heat of a fault at the far end of its way asks for; by the table only where that
 * cannot be reckoned. Bonding conductors by their own table.
 */
export const thinEarth: Rule = {
  meta: {
    id: 'thin-earth',
    severity: 'defect',
    group: 'shock',
    title: 'An earth core is too thin for its fault',
    clauses: [seen('IEC 60364-5-54', '543.1'), seen('BS 7671', 'Table 54.7, 544.1.1')],
    lesson:
      'For the tenth of a second before the breaker opens, the whole fault current flows in the earth core. One ' +
      'that is too thin melts first: the fault is gone, and so is the earth of everything behind it.',
    remedy: 'Pull a cable with a thicker earth core, or a separate earth of the size asked for.',
  },
  *check(context) {
    const { practice } = figuresOf(context);
    const thin = new Map<string, EarthNeed[]>();
    for (const need of earthNeeds(context))
      if (exceeds(need.mm2, sizeOf(need.cable))) thin.set(need.device, [...(thin.get(need.device) ?? []), need]);
    for (const [device, list] of thin) {
      const worst = list.reduce((a, b) => (sizeOf(b.cable) < sizeOf(a.cable) ? b : a));
      const points = list.flatMap((each) => [...each.points]);
      const why = worst.byTable
        ? 'the line core beside it asks for it'
        : `a fault behind ${say(context, device)} heats it`;
      yield {
        heading: `The earth of ${sayParts(context, points, 3)} is too thin`,
        message:
          `The earth core of ${sayCable(worst.cable)} has ${mm2(sizeOf(worst.cable))}; ${why}, and ` +
          `${mm2(Math.ceil(worst.mm2 * 100) / 100)} is the least.`,
        parts: [device],
        wires: list.flatMap(({ wires }) => [...wires]),
        remedies: thicker(
          practice,
          list.map(({ cable, mm2: need }) => ({ cable, need })),
        ),
      };
    }
    const least = bondingMm2(context.document.supply.system);
    for (const { wire, cable, part } of bonds(context)) {
      if (!exceeds(least, sizeOf(cable))) continue;
      yield {
        heading: `${capital(say(context, part))} is bonded with too thin a core`,
        message: `The bonding conductor ${sayWire(context, wire.id)} has ${mm2(sizeOf(cable))}; ${mm2(least)} is the least on ${context.document.supply.system}.`,
        parts: [part],
        wires: [wire.id],
        remedies: thicker(practice, [{ cable, need: least }]),
      };
    }
  },
};
