import type { Graph } from '../terminals/graph';
import { assemble, STIFF_OHM, type Assembly, type Standing } from './assemble';
import type { Evaluated } from './evaluate';
import { type Solution } from './network';
import { solveNetwork } from './solve';

/** A complex quantity, rms. */
export interface Phasor {
  re: number;
  im: number;
}

export const size = ({ re, im }: Phasor): number => Math.hypot(re, im);

/** A solved standing: what flows where, A and V rms. */
export interface Steady {
  standing: Standing;
  assembly: Assembly;
  solution: Solution;
  /** V of a node against true earth */
  volts(node: number): Phasor;
  /** V between two nodes */
  between(a: number, b: number): number;
  /** A in an edge from its `a` to its `b`; zero while it is open */
  current(edge: number): Phasor;
  /** A in a wire, by id */
  wireAmps(id: string): number;
  /** V across a point's L and N */
  loadVolts(part: string): number;
  /** A by which the currents of a device's poles fail to cancel, both counted from 1 to 2 and from 3 to 4 */
  residualAmps(part: string): number;
  /** A in the poles of a device, in the order of its contacts */
  poleAmps(part: string): number[];
}

/**
 * A source held to its greatest current: the inner resistance that makes it so is found in few rounds, as the network
 * is linear.
 */
export const ROUNDS = 12;

/**
 * Solves one standing. An inverter keeps its voltage up to the current it can drive, then lets the voltage fall; one
 * whose
 * greatest current is not known is taken as stiff.
 */
export function solveStanding(graph: Graph, standing: Standing): Steady {
  let inside = standing.inside;
  for (let round = 0; ; round++) {
    const assembly = assemble(graph, { ...standing, ...(inside && { inside }) });
    const solution = solveNetwork(assembly.network);
    const { voltage } = graph.document.supply;
    const over = round < ROUNDS ? overdriven(voltage, assembly.inverters, solution) : new Map<string, number>();
    if (over.size === 0) return read(graph, standing, assembly, solution);
    inside = new Map([...(inside ?? []), ...over]);
  }
}

/** Inverters beyond their greatest current, with the inner resistance that would hold them to it. */
export function overdriven(
  voltage: number,
  inverters: Assembly['inverters'],
  { re, im }: Pick<Solution, 're' | 'im'>,
): Map<string, number> {
  const found = new Map<string, number>();
  for (const { part, line, neutral, insideOhm, mostA } of inverters) {
    if (mostA === null) continue;
    const u = { re: re[line]! - re[neutral]!, im: im[line]! - im[neutral]! };
    const i = { re: (voltage - u.re) / insideOhm, im: -u.im / insideOhm };
    const amps = size(i);
    // What the source looks into: Z = U / I. Then |Z + R| = voltage / mostA gives R.
    if (amps <= mostA * (1 + 1e-6)) continue;
    const z = { re: (u.re * i.re + u.im * i.im) / amps ** 2, im: (u.im * i.re - u.re * i.im) / amps ** 2 };
    const whole = voltage / mostA;
    const ohm = Math.sqrt(Math.max(0, whole * whole - z.im * z.im)) - z.re;
    found.set(part.id, Math.max(STIFF_OHM, ohm));
  }
  return found;
}

function read(graph: Graph, standing: Standing, assembly: Assembly, solution: Solution): Steady {
  const volts = (node: number): Phasor => ({ re: solution.re[node]!, im: solution.im[node]! });
  const between = (a: number, b: number) =>
    Math.hypot(solution.re[a]! - solution.re[b]!, solution.im[a]! - solution.im[b]!);
  const current = (edge: number): Phasor => {
    const branch = assembly.branchOfEdge[edge]!;
    return branch < 0 ? { re: 0, im: 0 } : { re: solution.currentRe[branch]!, im: solution.currentIm[branch]! };
  };
  const contacts = (part: string) => graph.contactsOf.get(part) ?? [];
  return {
    standing,
    assembly,
    solution,
    volts,
    between,
    current,
    wireAmps(id) {
      const edge = graph.edgeOfWire.get(id);
      return edge === undefined ? 0 : size(current(edge));
    },
    loadVolts: (part) => between(graph.node(part, 'L')!, graph.node(part, 'N')!),
    residualAmps(part) {
      const poles = contacts(part).map(current);
      return size({ re: poles.reduce((sum, i) => sum + i.re, 0), im: poles.reduce((sum, i) => sum + i.im, 0) });
    },
    poleAmps: (part) => contacts(part).map((edge) => size(current(edge))),
  };
}

/**
 * Standings in which every point that can be fed is on: two-way and cross switches stand where the evaluation found
 * each
 * point fed. Points that ask one switch to stand both ways come in a standing of their own.
 * @returns each standing with the ids of the points it is to be read for
 */
export function standingsOf(graph: Graph, evaluated: Evaluated): { standing: Standing; points: string[] }[] {
  const { condition, crossed, points } = evaluated;
  const rounds: { chosen: Map<string, string>; points: string[] }[] = [];
  for (const [id, state] of points) {
    const needed = new Map<string, string>();
    for (const number of [...state.lineEdges, ...state.neutralEdges]) {
      const { kind, part, position } = graph.edges[number]!;
      if (kind === 'select') needed.set(part!, position!);
    }
    const fits = (chosen: Map<string, string>) =>
      [...needed].every(([part, position]) => (chosen.get(part) ?? position) === position);
    let round = rounds.find(({ chosen }) => fits(chosen));
    if (!round) rounds.push((round = { chosen: new Map(), points: [] }));
    for (const [part, position] of needed) round.chosen.set(part, position);
    round.points.push(id);
  }
  if (rounds.length === 0) rounds.push({ chosen: new Map(), points: [] });
  return rounds.map((round) => {
    const closed = condition.closed.slice();
    for (const { edge } of crossed) closed[edge] = 0;
    graph.edges.forEach(({ kind, part, position }, number) => {
      if (kind === 'select') closed[number] = round.chosen.get(part!) === position ? 1 : 0;
      else if (kind === 'bond') closed[number] = condition.onBattery.has(part!) ? 1 : 0;
    });
    return { standing: { condition, closed }, points: round.points };
  });
}
