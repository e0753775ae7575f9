import { polesOf } from '../document/kinds';
import type { Part } from '../document/schema';
import { byDesignation } from '../document/names';
import type { Edge, Graph } from '../terminals/graph';
import { closedEdges, reach } from '../terminals/reach';
import { isPoint } from '../terminals/roles-of-parts';
import { spread } from '../terminals/spread';

/** Nodes at which the home's own wiring begins: the meter's outgoing line, else the supply's. */
function originLine(graph: Graph): number[] {
  const parts = [...graph.parts.values()];
  const meters = parts.filter((part) => part.kind === 'meter').map((part) => graph.node(part.id, '4')!);
  return meters.length > 0
    ? meters
    : parts.filter((part) => part.kind === 'supply').map((part) => graph.node(part.id, 'L')!);
}

const isSwitching = (part: Part): boolean => part.kind === 'isolator' || (part.kind === 'mcb' && polesOf(part) === 2);

/** Devices that everything in the home hangs on, one after the other, from the origin on. */
function trunk(graph: Graph): Part[] {
  const chain: Part[] = [];
  const passed = new Set<string>();
  const isDoor = (edge: Edge) => edge.kind === 'device' || edge.kind === 'changeover' || edge.kind === 'bypass';
  let starts = originLine(graph);
  for (;;) {
    const region = spread(
      graph,
      starts,
      (edge) => (edge.kind === 'wire' || passed.has(edge.part!)) && edge.kind !== 'bond',
    );
    const doors = new Set<string>();
    for (const node of region.nodes) {
      const part = graph.partOf[node]!;
      if (isPoint(part) || part.kind === 'switch' || part.kind === 'switch-2pole') return chain;
      for (let k = graph.start[node]!; k < graph.start[node + 1]!; k++) {
        const edge = graph.edges[graph.around[k]!]!;
        if (isDoor(edge) && part.kind !== 'meter' && !passed.has(edge.part!)) doors.add(edge.part!);
      }
    }
    if (doors.size !== 1) return chain;
    const [id] = doors;
    const device = graph.parts.get(id!)!;
    if (device.kind === 'inverter' || device.kind === 'changeover') return chain;
    passed.add(device.id);
    chain.push(device);
    starts = [...region.nodes];
  }
}

/** The nearest device of a sort after the origin, where none commands the whole home. */
function nearest(graph: Graph, wanted: (part: Part) => boolean): Part | undefined {
  const beyond = (edge: Edge) => {
    if (edge.kind === 'wire') return false;
    const part = graph.parts.get(edge.part!)!;
    return edge.kind !== 'device' || (part.kind === 'mcb' && polesOf(part) === 1) || part.kind === 'rcbo';
  };
  const walk = reach(graph, originLine(graph), closedEdges(graph, beyond));
  let best: Part | undefined;
  let steps = Infinity;
  const rank = new Map<number, number>();
  for (const node of walk.order) {
    const number = walk.via[node]!;
    const edge = number < 0 ? undefined : graph.edges[number]!;
    const here = edge ? rank.get(edge.a === node ? edge.b : edge.a)! + 1 : 0;
    rank.set(node, here);
    const part = graph.partOf[node]!;
    if (here > steps || !wanted(part)) continue;
    if (here < steps || byDesignation(part, best!) < 0) best = part;
    steps = here;
  }
  return best;
}

/**
 * The device somebody opens to work: the first isolator or two-pole mcb after the meter that all of the home hangs on,
 * else the first residual-current device, else the nearest isolator or two-pole mcb.
 */
export function findMainSwitch(graph: Graph): Part | undefined {
  const chain = trunk(graph);
  return (
    chain.find(isSwitching) ??
    chain.find((part) => part.kind === 'rcd' || part.kind === 'rcbo') ??
    nearest(graph, isSwitching) ??
    nearest(graph, (part) => part.kind === 'rcd')
  );
}
