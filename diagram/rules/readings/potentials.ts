import type { Reach } from '../../terminals/reach';
import type { Context } from '../context';
import { once } from './once';

/** What a conductor is in some condition and position of the switches; several where a drawing mixes them. */
export interface Potentials {
  /** by node, 1 where it is so */
  line: Uint8Array;
  neutral: Uint8Array;
  earth: Uint8Array;
}

const mark = (into: Uint8Array, walks: readonly Reach[]) => {
  for (const { order } of walks) for (const node of order) into[node] = 1;
};

/** Nodes that are line, neutral or earth in one of these conditions. */
export function potentialsIn({ graph, evaluated, earth }: Context, names: readonly string[]): Potentials {
  const found = {
    line: new Uint8Array(graph.size),
    neutral: new Uint8Array(graph.size),
    earth: new Uint8Array(graph.size),
  };
  for (const { condition, stands } of evaluated) {
    if (!names.includes(condition.name)) continue;
    for (const stand of stands) {
      if (stand.shorted) continue;
      mark(found.line, stand.line);
      mark(found.neutral, stand.neutral);
    }
  }
  mark(found.earth, [earth.reached]);
  return found;
}

/** Every node that is ever line, neutral or earth. */
export const potentials = once((context: Context): Potentials =>
  potentialsIn(
    context,
    context.evaluated.map(({ condition }) => condition.name),
  ),
);
