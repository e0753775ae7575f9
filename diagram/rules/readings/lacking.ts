import { batteryStrings } from '../../circuit/loads';
import { lacksCable } from '../../circuit/way-paths';
import type { WayFigures } from '../../circuit/way-figures';
import type { Part, PartOf } from '../../document/schema';
import type { Context } from '../context';
import type { Lack } from '../types';
import { say, sayWire } from './words';

/** What rules wait for, in the same words from all of them, so that a lack is said once. */

export const lackOf = (context: Context, part: Part | string, what: string): Lack => {
  const id = typeof part === 'string' ? part : part.id;
  return { parts: [id], what: `${what} of ${say(context, id)}` };
};

export const lackOfRating = (context: Context, part: Part): Lack => lackOf(context, part, 'the rated current');

/** Loads of a way that say nothing of what they take. */
export function* lackOfWatts(context: Context, { drawn }: Pick<WayFigures, 'drawn'>): Iterable<Lack> {
  for (const { part, known } of drawn) if (!known) yield lackOf(context, part, 'the watts');
}

/** Wires from place to place whose cable is not drawn. */
export function* lackOfCables(context: Context, edges: Iterable<number>): Iterable<Lack> {
  for (const number of edges) {
    const { wire } = context.graph.edges[number]!;
    if (wire && lacksCable(context.graph, number))
      yield { parts: [], wires: [wire.id], what: `the cable of the wire ${sayWire(context, wire.id)}` };
  }
}

/** A value of the supply's data. */
export function* lackOfSupply(context: Context, what: string): Iterable<Lack> {
  for (const part of context.parts('supply')) yield { parts: [part.id], what: `${what} of the supply` };
}

/** What a bank cannot be reckoned without: volts and Ah of each battery behind an inverter. */
export function* lackOfBattery(context: Context, inverter: PartOf<'inverter'>): Iterable<Lack> {
  for (const battery of new Set(batteryStrings(context.graph, inverter).batteries.flat())) {
    if (battery.volts === undefined) yield lackOf(context, battery, 'the volts');
    if (battery.ah === undefined) yield lackOf(context, battery, 'the Ah');
  }
}
