import { polesOf } from '../document/kinds';
import type { Part } from '../document/schema';
import type { Graph } from '../terminals/graph';
import { pathTo, reach, reaches, type Reach } from '../terminals/reach';
import { isPoint } from '../terminals/roles-of-parts';
import { findParallelJoints, meetsDevice, type ParallelJoint } from './parallel-joints';

/** More wires than this in one loop, or more loops in one home, are not weighed one by one. */
const MOST_WIRES = 40;
const MOST_LOOPS = 6;

const opensBoth = (part: Part): boolean =>
  part.kind === 'rcd' ||
  part.kind === 'rcbo' ||
  part.kind === 'inverter' ||
  ((part.kind === 'mcb' || part.kind === 'isolator') && polesOf(part) === 2);

/** What line and neutral of a point should have in common: two-pole devices on the way, and the cable that leaves the board. */
function signature(graph: Graph, walk: Reach, node: number): { devices: Set<string>; cable: string | undefined } {
  const devices = new Set<string>();
  let cable: string | undefined;
  for (const number of pathTo(graph, walk, node)) {
    const { wire, part } = graph.edges[number]!;
    if (part !== undefined && opensBoth(graph.parts.get(part)!)) {
      devices.add(part);
      cable = undefined;
    } else cable ??= wire?.cable;
  }
  return { devices, cable };
}

/** How many points have line and neutral that do not come together, weighed by how far apart they come. */
function disorder(graph: Graph, line: Reach, neutral: Reach): number {
  let sum = 0;
  for (const part of graph.parts.values()) {
    if (!isPoint(part)) continue;
    const ends = [graph.node(part.id, 'L')!, graph.node(part.id, 'N')!] as const;
    const [l, n] = reaches(line, ends[0]) ? ends : [ends[1], ends[0]];
    if (!reaches(line, l) || !reaches(neutral, n)) continue;
    const [out, back] = [signature(graph, line, l), signature(graph, neutral, n)];
    sum += [...out.devices].filter((id) => !back.devices.has(id)).length;
    sum += [...back.devices].filter((id) => !out.devices.has(id)).length;
    if (out.cable !== back.cable) sum += 1;
  }
  return sum;
}

/** Where line and neutral begin. */
export interface Starts {
  line: readonly number[];
  neutral: readonly number[];
}

/**
 * Of a loop takes the wire without which line and neutral of the points best come together: that is the one which should not be
 * there. Where several serve alike, the one that was found stays.
 * @param apart what is closed, the joint itself left out
 */
function oddWire(graph: Graph, apart: Uint8Array, joint: ParallelJoint, starts: Starts, side: keyof Starts): ParallelJoint {
  if (!graph.edges[joint.edge]!.wire || joint.loop.length > MOST_WIRES) return joint;
  const other = reach(graph, starts[side === 'line' ? 'neutral' : 'line'], apart);
  const weigh = (edge: number) => {
    const closed = apart.slice();
    closed[joint.edge] = 1;
    closed[edge] = 0;
    const walk = reach(graph, starts[side], closed);
    return side === 'line' ? disorder(graph, walk, other) : disorder(graph, other, walk);
  };
  let best = { edge: joint.edge, weight: weigh(joint.edge) };
  for (const edge of joint.loop) {
    if (!graph.edges[edge]!.wire || best.weight === 0) continue;
    const weight = weigh(edge);
    if (weight < best.weight) best = { edge, weight };
  }
  return best.edge === joint.edge ? joint : { edge: best.edge, loop: turned(joint, best.edge) };
}

/** The same loop, told from another of its edges. */
function turned({ edge, loop }: ParallelJoint, from: number): number[] {
  const at = loop.indexOf(from);
  return [...loop.slice(at + 1), edge, ...loop.slice(0, at)];
}

/**
 * Wires at which two feeds meet, one after the other: each is taken out before the next is looked for, as it may close several
 * loops at once. A ring of one way is no meeting.
 * @param positions what is closed in each position of the two-way and cross switches
 */
export function findMeetings(graph: Graph, positions: readonly Uint8Array[], starts: Starts): ParallelJoint[] {
  const found: ParallelJoint[] = [];
  for (const closed of positions) {
    const apart = closed.slice();
    for (const { edge } of found) apart[edge] = 0;
    for (;;) {
      const joint = findParallelJoints(graph, apart, starts.line).find((each) => meetsDevice(graph, each));
      if (!joint) break;
      apart[joint.edge] = 0;
      const odd = found.length < MOST_LOOPS ? oddWire(graph, apart, joint, starts, 'line') : joint;
      apart[joint.edge] = 1;
      apart[odd.edge] = 0;
      found.push(odd);
    }
  }
  return found;
}

/** Wires that double a neutral, rings of one way included. @param closed without the meetings of lines */
export function findDoubledNeutrals(graph: Graph, closed: Uint8Array, starts: Starts): ParallelJoint[] {
  const loops = findParallelJoints(graph, closed, starts.neutral);
  if (loops.length === 0 || loops.length > MOST_LOOPS) return loops;
  const apart = closed.slice();
  for (const { edge } of loops) apart[edge] = 0;
  return loops.map((joint) => {
    const odd = oddWire(graph, apart, joint, starts, 'neutral');
    apart[joint.edge] = 1;
    apart[odd.edge] = 0;
    return odd;
  });
}
