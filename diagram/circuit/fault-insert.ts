import { isBar } from '../document/kinds';
import { nameOf } from '../document/names';
import type { Graph } from '../terminals/graph';
import type { ExtraBranch, Standing } from './assemble';
import { FaultError, type Fault } from './fault-types';
import { CONTACT_OHM } from './resistance';
import { size, type Steady } from './steady';

/** Ohm of a bolted fault; the same as of any contact. */
const BOLTED_OHM = CONTACT_OHM;

/** Where a fault sits in the graph: the conductor it is at, and what it joins that to. */
export interface Inserted {
  fault: Fault;
  standing: Standing;
  /** node of the line or neutral that the fault is at; undefined for a neutral that opens */
  conductor: number | undefined;
  /** index of its branch among the extras; -1 for a neutral that opens */
  extra: number;
  /** edge of the drawing that is the fault itself, where it was not put in */
  edge?: number;
}

function terminal(graph: Graph, fault: Fault, marks: readonly string[]): number | undefined {
  const part = graph.parts.get(fault.at)!;
  if (isBar(part.kind)) return graph.node(part.id, '1');
  for (const mark of marks) {
    const node = graph.node(fault.at, mark);
    if (node !== undefined) return node;
  }
  return undefined;
}

const LINE = ['L', 'out.L', 'in.L'];
const NEUTRAL = ['N', 'out.N', 'in.N'];
const CASE = ['E', 'out.E', 'in.E'];

function need(graph: Graph, fault: Fault, what: 'line' | 'neutral' | 'case'): number {
  const marks = { line: LINE, neutral: NEUTRAL, case: CASE }[what];
  const node = isBar(graph.parts.get(fault.at)!.kind) ? undefined : terminal(graph, fault, marks);
  if (node !== undefined) return node;
  throw new FaultError(
    `${nameOf(graph.document, graph.parts.get(fault.at)!)} has no ${what} terminal: a fault ${fault.kind} cannot be at it`,
  );
}

/** Of a load's two ends the one that stands at the higher voltage is its line, however it is wired. */
function liveEnd(graph: Graph, fault: Fault, before: Steady): number {
  const line = need(graph, fault, 'line');
  const other = terminal(graph, fault, NEUTRAL);
  return other !== undefined && size(before.volts(other)) > size(before.volts(line)) + 1 ? other : line;
}

function openNeutral(graph: Graph, fault: Fault, standing: Standing): Standing {
  const part = graph.parts.get(fault.at)!;
  if (fault.wire === undefined && part.kind === 'supply')
    return { ...standing, lostNeutrals: new Set([...(standing.lostNeutrals ?? []), part.id]) };
  const closed = standing.closed.slice();
  if (fault.wire !== undefined) {
    const edge = graph.edgeOfWire.get(fault.wire);
    if (edge === undefined) throw new FaultError(`there is no wire "${fault.wire}" that joins two terminals`);
    closed[edge] = 0;
  } else {
    const node = need(graph, fault, 'neutral');
    for (let k = graph.start[node]!; k < graph.start[node + 1]!; k++) {
      const number = graph.around[k]!;
      if (graph.edges[number]!.wire) closed[number] = 0;
    }
  }
  return { ...standing, closed };
}

/**
 * Puts a fault into a standing.
 * @param before the home as it is before this fault
 * @throws FaultError where the part has no such terminal, or the wire does not exist
 */
export function insertFault(graph: Graph, fault: Fault, standing: Standing, before: Steady): Inserted {
  if (!graph.parts.has(fault.at)) throw new FaultError(`there is no part "${fault.at}"`);
  if (fault.kind === 'neutral-open')
    return { fault, standing: openNeutral(graph, fault, standing), conductor: undefined, extra: -1 };
  const join = (a: number, b: number): Inserted => {
    const extras: ExtraBranch[] = [...(standing.extras ?? []), { a, b, ohm: BOLTED_OHM }];
    return { fault, standing: { ...standing, extras }, conductor: a, extra: extras.length - 1 };
  };
  switch (fault.kind) {
    case 'line-to-case':
      return join(liveEnd(graph, fault, before), need(graph, fault, 'case'));
    case 'line-to-neutral': {
      const line = liveEnd(graph, fault, before);
      const neutral = need(graph, fault, 'neutral');
      return join(line, line === neutral ? need(graph, fault, 'line') : neutral);
    }
    case 'neutral-to-earth':
      return join(need(graph, fault, 'neutral'), need(graph, fault, 'case'));
  }
}
