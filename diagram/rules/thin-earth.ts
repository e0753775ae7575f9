import { adiabaticMm2, kFactor } from '../calculations/adiabatic';
import type { Cable, Wire } from '../document/schema';
import type { Practice } from '../practices/types';
import { exceeds, mm2, sayCable } from './readings/amounts';
import { recalled, seen } from './clauses';
import type { Context } from './context';
import { figuresOf } from './readings/figures';
import { changeCables } from './readings/remedies';
import type { Rule } from './types';
import { capital, say, sayParts, sayWire } from './readings/words';

interface Need {
  mm2: number;
  why: string;
}

/** Table 54.2 of IEC 60364-5-54 (54.7 of BS 7671): by the line conductor, where the heat of the fault is not known. */
export const tableMm2 = (lineMm2: number): number => (lineMm2 <= 16 ? lineMm2 : lineMm2 <= 35 ? 16 : lineMm2 / 2);

/** Main bonding, mm2 copper: 10 on TN-C-S with a neutral up to 35 (BS 7671 Table 54.8, seen), else 6 at least (544.1.1, from memory). */
const bondingMm2 = (system: string): number => (system === 'TN-C-S' ? 10 : 6);

/** What a fault asks of each cable's protective core, by the cable's id: the most of all ways behind it. */
function needs(context: Context): Map<string, { need: Need; wires: Set<string>; points: Set<string> }> {
  const { graph } = context;
  const { ways, earth } = figuresOf(context);
  const found = new Map<string, { need: Need; wires: Set<string>; points: Set<string> }>();
  const ask = (edges: readonly number[], point: string, needOf: (cable: Cable) => Need | null) => {
    for (const number of edges) {
      const { wire } = graph.edges[number]!;
      const cable = wire?.role === 'earth' && wire.cable !== undefined ? graph.cables.get(wire.cable) : undefined;
      const need = cable && needOf(cable);
      if (!wire || !cable || !need) continue;
      const entry = found.get(cable.id) ?? { need, wires: new Set(), points: new Set() };
      if (need.mm2 > entry.need.mm2) entry.need = need;
      entry.wires.add(wire.id);
      entry.points.add(point);
      found.set(cable.id, entry);
    }
  };
  for (const { drawn, fault, device } of ways.values())
    for (const { part, isPoint } of drawn) {
      const path = earth.path(graph.node(part.id, isPoint ? 'E' : 'in.E'));
      if (!path) continue;
      const energy = fault?.energyA2s;
      ask(path, part.id, (cable) => {
        if (energy !== undefined && Number.isFinite(energy))
          return { mm2: adiabaticMm2(energy, kFactor(cable.material, cable.insulation, true)), why: `a fault behind ${say(context, device.id)} heats it` };
        // A fault that nothing clears is the finding of `slow-disconnection`; its heat has no end.
        return energy === undefined && sharesLine(context, cable) ? { mm2: tableMm2(cable.csa), why: 'the line core beside it asks for it' } : null;
      });
    }
  return found;
}

/** A cable with a line core in it: the table goes by that core. */
const sharesLine = ({ document }: Context, { id }: Cable): boolean =>
  document.wires.some((wire) => wire.cable === id && (wire.role === 'line' || wire.role === 'switched'));

const sizeOf = ({ csa, cpc }: Cable): number => cpc ?? csa;

const thicker = (practice: Practice, cable: Cable, need: number) => {
  const cpc = practice.csaMm2.find((size) => size >= need);
  return cpc === undefined ? [] : [changeCables(`Pull an earth core of ${cpc} mm2`, [{ ...cable, cpc, csa: Math.max(cable.csa, alone(cable) ? cpc : 0) }])];
};

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
      'For the tenth of a second before the breaker opens, the whole fault current flows in the earth core. One that is too thin melts ' +
      'first: the fault is gone, and so is the earth of everything behind it.',
    remedy: 'Pull a cable with a thicker earth core, or a separate earth of the size asked for.',
  },
  *check(context) {
    const { practice } = figuresOf(context);
    const { graph } = context;
    for (const [id, { need, wires, points }] of needs(context)) {
      const cable = graph.cables.get(id)!;
      if (!exceeds(need.mm2, sizeOf(cable))) continue;
      yield {
        heading: `The earth of ${sayParts(context, points, 3)} is too thin`,
        message: `The earth core of ${sayCable(cable)} has ${mm2(sizeOf(cable))}; ${need.why}, and ${mm2(Math.ceil(need.mm2 * 100) / 100)} is the least.`,
        parts: [],
        wires: [...wires],
        remedies: thicker(practice, cable, need.mm2),
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
        remedies: thicker(practice, cable, least),
      };
    }
  },
};
