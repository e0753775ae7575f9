import { natureOfNode, natureOfRole } from '../../circuit/natures';
import { byDesignation } from '../../document/names';
import type { Part } from '../../document/schema';
import type { Edge } from '../../terminals/graph';
import { reaches } from '../../terminals/reach';
import { isLoad } from '../../terminals/roles-of-parts';
import { spread } from '../../terminals/spread';
import type { Context } from '../context';
import { once } from './once';

/** Parts cut off from earth by one gap. */
export interface EarthGap {
  /** parts that must be earthed and are not, by designation */
  parts: string[];
  /** the joints and bars between them and the gap */
  joints: string[];
  /** wires that lead their earth to a line or neutral instead, or nowhere */
  wires: string[];
  /** what their earth is joined to instead */
  on: 'nothing' | 'line' | 'neutral';
}

/** True for parts whose case or earth contact must reach the main earthing terminal. */
function needsEarth(context: Context, part: Part): boolean {
  if (part.kind === 'inverter') return true;
  if (part.kind === 'socket') return part.class !== 2 && !isTwoPin(part.pattern);
  if (!isLoad(part)) return false;
  // A class that is not stated shows in the wiring: what has an earth wire is meant to have one.
  if (part.class === undefined) return hasWire(context, context.graph.node(part.id, 'E')!);
  return part.class === 1;
}

const isEarthed = ({ reached, islands }: Context['earth'], node: number): boolean =>
  reaches(reached, node) || reaches(islands, node);

const isTwoPin = (pattern: string | undefined): boolean =>
  pattern !== undefined && /two-pin|2-pin|IS1293-2\.5|shaver/i.test(pattern);

export function hasWire(context: Context, node: number): boolean {
  const { graph } = context;
  for (let k = graph.start[node]!; k < graph.start[node + 1]!; k++)
    if (graph.edges[graph.around[k]!]!.kind === 'wire') return true;
  return false;
}

export const earthGaps = once((context: Context): EarthGap[] => {
  const { graph, earth } = context;
  if (earth.mainBar === undefined && earth.reached.order.every((node) => !hasWire(context, node))) return [];
  const earthNode = (part: Part) => graph.node(part.id, part.kind === 'inverter' ? 'in.E' : 'E')!;
  const missing = [...graph.parts.values()]
    .filter((part) => needsEarth(context, part) && !isEarthed(earth, earthNode(part)))
    .sort(byDesignation);
  // A joint is what most of its wires are drawn as.
  const isEarthJoint = (node: number) => {
    const roles: boolean[] = [];
    for (let k = graph.start[node]!; k < graph.start[node + 1]!; k++) {
      const { wire } = graph.edges[graph.around[k]!]!;
      if (wire) roles.push(natureOfRole(wire.role) === 'E');
    }
    return 2 * roles.filter(Boolean).length >= roles.length;
  };
  const alien = (node: number) => {
    const nature = natureOfNode(graph, node);
    return graph.partOf[node]!.kind === 'joint' ? !isEarthJoint(node) : nature !== undefined && nature !== 'E';
  };
  const follows = (edge: Edge, number: number) =>
    earth.closed[number] !== 0 &&
    (edge.wire
      ? natureOfRole(edge.wire.role) === 'E' ||
        natureOfNode(graph, edge.a) === 'E' ||
        natureOfNode(graph, edge.b) === 'E'
      : edge.kind !== 'bond');

  const taken = new Set<string>();
  const gaps: EarthGap[] = [];
  for (const part of missing) {
    if (taken.has(part.id)) continue;
    const region = spread(graph, [earthNode(part)], follows, alien);
    const at = [...region.nodes].map((node) => ({ node, part: graph.partOf[node]!, mark: graph.markOf[node]! }));
    const behind = missing.filter((other) => region.nodes.has(earthNode(other)));
    for (const { id } of behind) taken.add(id);
    // A plug that hangs has its earth once it is put in.
    if (at.some((end) => end.part.kind === 'plug' && end.part.in === undefined && end.mark === 'E')) continue;
    const strays = at.filter(({ node }) => alien(node));
    const joints = at
      .filter(({ node, part: { kind } }) => !alien(node) && (kind === 'joint' || kind === 'earth-bar'))
      .map((end) => end.part.id);
    const loose = graph.loose.filter((wire) =>
      at.some((end) => [wire.from, wire.to].some(([id, mark]) => graph.node(id, mark) === end.node)),
    );
    const strayWires = [...region.edges]
      .map((number) => graph.edges[number]!)
      .filter((edge) => edge.wire && (alien(edge.a) || alien(edge.b)))
      .map((edge) => edge.wire!.id);
    const live = context.evaluated.some(({ stands }) =>
      stands.some(
        ({ line, shorted }) => !shorted && line.some((walk) => [...region.nodes].some((node) => reaches(walk, node))),
      ),
    );
    const onNeutral = context.evaluated.some(({ stands }) =>
      stands.some(({ neutral }) => neutral.some((walk) => [...region.nodes].some((node) => reaches(walk, node)))),
    );
    gaps.push({
      parts: behind.map(({ id }) => id),
      joints: [...new Set(joints)].sort(),
      wires: [...new Set([...strayWires, ...loose.map(({ id }) => id)])].sort(),
      on: live ? 'line' : onNeutral || strays.length > 0 ? 'neutral' : 'nothing',
    });
  }
  return gaps;
});
