import { findCrossedJoints } from '../../circuit/crossed-joints';
import { conductorAnchors } from '../../circuit/evaluate';
import type { Nature } from '../../circuit/natures';
import type { Context } from '../context';
import { once } from './once';

/** A wire that joins line, neutral or earth to one another, and when. */
export interface Crossing {
  edge: number;
  wire: string;
  between: readonly [Nature, Nature];
  conditions: string[];
  /** two-way and cross switches that must stand so for it to happen; empty where it is always so */
  switches: string[];
}

/** All wires that join what must stay apart, whatever the switches do or in some position of them. */
export const crossings = once((context: Context): Crossing[] => {
  const { graph } = context;
  const found = new Map<string, Crossing>();
  const add = (edge: number, between: readonly [Nature, Nature], condition: string, switches: string[]) => {
    const wire = graph.edges[edge]!.wire!.id;
    const entry = found.get(wire) ?? { edge, wire, between, conditions: [], switches };
    if (!entry.conditions.includes(condition)) entry.conditions.push(condition);
    found.set(wire, entry);
  };
  for (const { condition, crossed, stands } of context.evaluated) {
    for (const { edge, between } of crossed) add(edge, between, condition.name, []);
    for (const stand of stands.filter(({ shorted }) => shorted)) {
      for (const { edge, between } of findCrossedJoints(graph, stand.closed, conductorAnchors(graph, condition))) {
        const { a, b } = graph.edges[edge]!;
        const beside = [a, b]
          .map((node) => graph.partOf[node]!)
          .filter(({ kind }) => kind === 'switch-2way' || kind === 'switch-cross');
        add(
          edge,
          between,
          condition.name,
          beside.map(({ id }) => id),
        );
      }
    }
  }
  return [...found.values()];
});
