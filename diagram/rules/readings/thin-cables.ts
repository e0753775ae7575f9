import { capacityOf, type SectionCable } from '../../circuit/way-cables';
import type { WayFigures } from '../../circuit/way-figures';
import type { Practice } from '../../practices/types';
import type { Context } from '../context';
import { exceeds } from './amounts';
import { lineLoops } from './line-loops';
import { once } from './once';
import { reversedNodes } from './reversals';

/**
 * A, what a cable carries at most: where the table begins above its size, what the table's first size carries, which
 * is more than
 * it can.
 */
export function mostA({ graph }: Context, practice: Practice, { cable, capacity }: SectionCable): number | null {
  if (capacity) return capacity.izA;
  for (const csa of practice.csaMm2.filter((size) => size > cable.csa)) {
    const found = capacityOf(graph, practice, { ...cable, csa });
    if (found) return found.izA;
  }
  return null;
}

/** True for a neutral that is line because line and neutral change places before it: the crossing is the finding. */
function isTurned(context: Context, id: string): boolean {
  const { edges, edgeOfWire } = context.graph;
  const { a, b, wire } = edges[edgeOfWire.get(id)!]!;
  const reversed = reversedNodes(context);
  return wire!.role === 'neutral' && (reversed.has(a) || reversed.has(b));
}

/** A cable that carries less than it must. */
export interface Thin extends SectionCable {
  izA: number;
}

/**
 * True for what could be a leg of a ring: where it closes over another way the joint is the finding, the leg is right
 * without it.
 */
function isLegAstray({ ring }: Practice, { cable, needA, capacity }: SectionCable): boolean {
  if (!ring) return false;
  const { deviceA, legCsaMm2, legIzAtLeastA } = ring.value;
  return cable.csa >= legCsaMm2 && needA! <= deviceA && capacity !== null && !exceeds(legIzAtLeastA, capacity.izA);
}

const loopEdges = once(
  (context: Context): ReadonlySet<number> =>
    new Set(lineLoops(context).flatMap(({ edge, loop }) => [edge, ...loop])),
);

/** Cables of a way that its device does not protect. */
export function thinCables(context: Context, practice: Practice, { cables, section }: WayFigures): Thin[] {
  const loops = loopEdges(context);
  const isOpened = [...loops].some((number) => section.edges.has(number));
  return cables.flatMap((each): Thin[] => {
    const izA = mostA(context, practice, each);
    if (izA === null || each.needA === null || !exceeds(each.needA, izA)) return [];
    if (each.wires.every((id) => isTurned(context, id))) return [];
    return isOpened && isLegAstray(practice, each) ? [] : [{ ...each, izA }];
  });
}
