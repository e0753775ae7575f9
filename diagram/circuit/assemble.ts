import type { PartOf } from '../document/schema';
import type { Graph } from '../terminals/graph';
import { isPoint } from '../terminals/roles-of-parts';
import type { Condition } from './conditions';
import { chargeWatts, shortCircuitA, takenBy } from './loads';
import { edgeOhm } from './resistance';
import { REFERENCE, type Network } from './network';
import { supplyModel } from './supply-model';

/** A conductor that a fault adds: between two terminals, or to true earth. */
export interface ExtraBranch {
  a: number;
  b: number;
  ohm: number;
}

/** How a home stands, as far as its currents care. */
export interface Standing {
  condition: Condition;
  /** by edge; 0 for what is open: contacts, and wires that a fault broke */
  closed: Uint8Array;
  extras?: readonly ExtraBranch[];
  /** supplies whose neutral (on TN-C-S the joint conductor) is broken before the origin */
  lostNeutrals?: ReadonlySet<string>;
  /** ids of loads that do not draw */
  off?: ReadonlySet<string>;
  /** ohm inside an inverter, by id: more than a stiff source has while its current is held to its limit */
  inside?: ReadonlyMap<string, number>;
  /** degC of every conductor; the limit of its insulation where not given */
  temperatureC?: number;
}

/** Where each thing went in the network. */
export interface Assembly {
  network: Network;
  /** branch of each edge, -1 while it is open */
  branchOfEdge: Int32Array;
  /** branch of each point, and of each charger by its inverter's id */
  branchOfLoad: ReadonlyMap<string, number>;
  /** inverters that drive, with what they can drive at most (null: not known) */
  inverters: {
    part: PartOf<'inverter'>;
    branch: number;
    line: number;
    neutral: number;
    insideOhm: number;
    mostA: number | null;
  }[];
  /** supplies that drive: the branch of their line */
  supplies: { id: string; branch: number }[];
  /** branches of `extras`, in their order */
  firstExtra: number;
}

/**
 * S: insulation of each terminal to true earth, a gigohm. It decides only what nothing else does: where an island
 * floats.
 */
const INSULATION = 1e-9;
/** ohm inside an inverter as long as it holds its voltage */
export const STIFF_OHM = 1e-3;

class Branches {
  readonly from: number[] = [];
  readonly to: number[] = [];
  readonly re: number[] = [];
  readonly im: number[] = [];

  add(a: number, b: number, ohm: number, reactance = 0): number {
    const square = ohm * ohm + reactance * reactance;
    this.from.push(a);
    this.to.push(b);
    this.re.push(ohm / square);
    this.im.push(-reactance / square);
    return this.from.length - 1;
  }
}

/** A load as a constant impedance: Z = U^2 pf / P at its angle, lagging. */
function addLoad(branches: Branches, a: number, b: number, watts: number, pf: number, voltage: number): number {
  const z = (voltage * voltage * pf) / watts;
  return branches.add(a, b, z * pf, z * Math.sqrt(Math.max(0, 1 - pf * pf)));
}

/**
 * The network of a home in one standing: conductors at their temperature, loads as constant impedances, the supply
 * behind
 * its external loop with the star point at true earth (the source electrode counts as 0), inverters on battery as
 * sources
 * between their own two terminals. The reference is true earth.
 */
export function assemble(graph: Graph, standing: Standing): Assembly {
  const { condition, closed } = standing;
  const { supply } = graph.document;
  const { voltage } = supply;
  const branches = new Branches();
  const injectRe = new Float64Array(graph.size);
  const injectIm = new Float64Array(graph.size);
  const branchOfEdge = new Int32Array(graph.edges.length).fill(-1);
  graph.edges.forEach((edge, number) => {
    if (!closed[number] || edge.a === edge.b) return;
    branchOfEdge[number] = branches.add(edge.a, edge.b, edgeOhm(graph, edge, standing.temperatureC));
  });

  const model = supplyModel(supply);
  const supplies: Assembly['supplies'] = [];
  const branchOfLoad = new Map<string, number>();
  const inverters: Assembly['inverters'] = [];
  const add = (part: string, watts: number, pf: number, marks: readonly [string, string]) => {
    if (watts <= 0 || standing.off?.has(part)) return;
    const [a, b] = marks.map((mark) => graph.node(part, mark)!);
    branchOfLoad.set(part, addLoad(branches, a!, b!, watts, pf, voltage));
  };
  for (const part of graph.parts.values()) {
    if (part.kind === 'supply') {
      const at = (mark: string) => graph.node(part.id, mark)!;
      if (condition.base !== 'outage') {
        supplies.push({ id: part.id, branch: branches.add(at('L'), REFERENCE, model.line) });
        injectRe[at('L')]! += voltage / model.line;
      }
      const lost = standing.lostNeutrals?.has(part.id) ?? false;
      if (model.joined) {
        branches.add(at('N'), at('E'), 1e-6);
        if (!lost) branches.add(at('E'), REFERENCE, model.earth!);
      } else {
        if (!lost) branches.add(at('N'), REFERENCE, model.neutral);
        if (model.earth !== null) branches.add(at('E'), REFERENCE, model.earth);
      }
    } else if (part.kind === 'electrode' && supply.ra !== undefined) {
      branches.add(graph.node(part.id, 'E')!, REFERENCE, supply.ra);
    } else if (isPoint(part)) {
      const taken = takenBy(part);
      if (taken) add(part.id, taken.watts, taken.pf, ['L', 'N']);
    } else if (part.kind === 'inverter' && condition.onBattery.has(part.id)) {
      const line = graph.node(part.id, 'out.L')!;
      const neutral = graph.node(part.id, 'out.N')!;
      const insideOhm = standing.inside?.get(part.id) ?? STIFF_OHM;
      inverters.push({
        part,
        branch: branches.add(line, neutral, insideOhm),
        line,
        neutral,
        insideOhm,
        mostA: shortCircuitA(part, voltage),
      });
      injectRe[line]! += voltage / insideOhm;
      injectRe[neutral]! -= voltage / insideOhm;
    } else if (part.kind === 'inverter' && part.state !== 'off') {
      add(part.id, chargeWatts(graph, part) ?? 0, 1, ['in.L', 'in.N']);
    }
  }
  const firstExtra = branches.from.length;
  for (const { a, b, ohm } of standing.extras ?? []) branches.add(a, b, ohm);
  for (let node = 0; node < graph.size; node++) branches.add(node, REFERENCE, 1 / INSULATION);
  return {
    network: {
      size: graph.size,
      from: Int32Array.from(branches.from),
      to: Int32Array.from(branches.to),
      re: Float64Array.from(branches.re),
      im: Float64Array.from(branches.im),
      injectRe,
      injectIm,
    },
    branchOfEdge,
    branchOfLoad,
    inverters,
    supplies,
    firstExtra,
  };
}
