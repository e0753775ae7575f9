import type { Part } from '../document/schema';
import type { Graph } from '../terminals/graph';
import { isLoad } from '../terminals/roles-of-parts';
import { assemble, type Assembly, type Standing } from './assemble';
import type { BranchOf } from './branches';
import { cellVolts, cutOf, takeApart, withCells, type Cell, type Volts } from './condense';
import type { Network, Solution } from './network';
import { solveNetwork } from './solve';
import { overdriven, ROUNDS } from './steady';

/** The trunk of a home in one standing: what the branches hang on. */
interface Trunk {
  network: Network;
  /** its nodes by terminal, as they are numbered in `network` */
  numbers: ReadonlyMap<string, number>;
  inverters: Assembly['inverters'];
  voltage: number;
}

/** Lamps, fans and appliances, and sockets that a load is assumed at: what volts are told of. */
export const isListed = (part: Part): boolean => isLoad(part) || (part.kind === 'socket' && part.load !== undefined);

/** One of these by the numbers of its L and its N, in its cell or in the trunk. */
interface Ends {
  id: string;
  line: number;
  neutral: number;
}

interface Branch {
  /** id of its first part: branches come in that order */
  first: string;
  cell: Cell;
  points: readonly Ends[];
}

/** A home in one standing, each branch condensed by itself. */
export interface BranchNet {
  trunk: Trunk;
  /** points of the trunk itself */
  points: readonly Ends[];
  branches: readonly Branch[];
}

const terminal = (graph: Graph, node: number): string => `${graph.partOf[node]!.id} ${graph.markOf[node]!}`;

/** Where the terminals of a home lie, in every condition alike. */
export interface Places {
  /** by node the number of its branch, in order of first nodes, and -1 in the trunk */
  cellOf: Int32Array;
  /** id of the first part of each branch */
  firsts: readonly string[];
  /** by node its number in the trunk, and -1 in a branch */
  inTrunk: Int32Array;
  /** how many nodes the trunk has here */
  trunkSize: number;
}

/**
 * Numbers the branches of a home and what they hang on.
 * @param graph of the whole home, or of some branches and what of the trunk they hang on
 * @param known the home, where `graph` has only some of its trunk
 */
export function placesOf(graph: Graph, branchOf: BranchOf, known?: BranchNet): Places {
  const numbers = new Map<string, number>();
  const firsts: string[] = [];
  const cellOf = new Int32Array(graph.size).fill(-1);
  graph.partOf.forEach(({ id }, node) => {
    const key = branchOf.get(id);
    if (key === undefined) return;
    const number = numbers.get(key);
    cellOf[node] = number ?? firsts.length;
    if (number !== undefined) return;
    numbers.set(key, firsts.length);
    firsts.push(id);
  });
  let trunkSize = 0;
  const inTrunk = Int32Array.from(cellOf, (cell, node) => {
    if (cell >= 0) return -1;
    return known ? known.trunk.numbers.get(terminal(graph, node))! : trunkSize++;
  });
  return { cellOf, firsts, inTrunk, trunkSize };
}

function trunkOf(graph: Graph, assembly: Assembly, within: readonly number[], { inTrunk, trunkSize }: Places): Trunk {
  const numbers = new Map<string, number>();
  inTrunk.forEach((at, node) => at >= 0 && numbers.set(terminal(graph, node), at));
  const branchAt = new Map(within.map((branch, at) => [branch, at]));
  return {
    network: cutOf(assembly.network, within, trunkSize, inTrunk),
    numbers,
    inverters: assembly.inverters.map((each) => ({
      ...each,
      branch: branchAt.get(each.branch)!,
      line: inTrunk[each.line]!,
      neutral: inTrunk[each.neutral]!,
    })),
    voltage: graph.document.supply.voltage,
  };
}

/**
 * Condenses the branches of a home.
 * @param graph of the whole home, or of some branches and what of the trunk they hang on
 * @param like the home in another standing: a branch that stands alike in it is taken over
 * @param trunk where it is known already and `graph` has only some of it
 */
export function condenseBranches(
  graph: Graph,
  standing: Standing,
  places: Places,
  { like, trunk }: { like?: BranchNet | undefined; trunk?: Trunk } = {},
): BranchNet {
  const { cellOf, firsts, inTrunk } = places;
  const assembly = assemble(graph, standing);
  const { within, cells, numbers } = takeApart(
    assembly.network,
    cellOf,
    firsts.length,
    inTrunk,
    like?.branches.map(({ cell }) => cell),
  );
  const points = firsts.map((): Ends[] => []);
  const ofTrunk: Ends[] = [];
  for (const part of graph.parts.values()) {
    if (!isListed(part)) continue;
    const [line, neutral] = [graph.node(part.id, 'L')!, graph.node(part.id, 'N')!];
    (points[cellOf[line]!] ?? ofTrunk).push({ id: part.id, line: numbers[line]!, neutral: numbers[neutral]! });
  }
  return {
    trunk: trunk ?? trunkOf(graph, assembly, within, places),
    points: ofTrunk,
    branches: cells.map((cell, i) => ({ first: firsts[i]!, cell, points: points[i]! })),
  };
}

/** A home after some of its branches changed: theirs of `now`, all others as they were. */
export function mergeNets(known: BranchNet, now: BranchNet, gone: ReadonlySet<string>): BranchNet {
  const branches = known.branches.filter(({ first }) => !gone.has(first));
  for (const branch of now.branches) {
    const at = branches.findIndex(({ first }) => first > branch.first);
    branches.splice(at < 0 ? branches.length : at, 0, branch);
  }
  return { ...known, branches };
}

/** The trunk with its branches in place, each inverter held to its greatest current. */
function solveTrunk({ network, inverters, voltage }: Trunk, cells: readonly Cell[]): Solution {
  const whole = withCells(network, cells);
  let driving = inverters;
  for (let round = 0; ; round++) {
    const solution = solveNetwork(whole);
    const over = round < ROUNDS ? overdriven(voltage, driving, solution) : new Map<string, number>();
    if (over.size === 0) return solution;
    driving = driving.map((each) => ({ ...each, insideOhm: over.get(each.part.id) ?? each.insideOhm }));
    for (const { branch, line, neutral, insideOhm } of driving) {
      whole.re[branch] = 1 / insideOhm;
      whole.injectRe[line] = voltage / insideOhm;
      whole.injectRe[neutral] = -voltage / insideOhm;
    }
  }
}

/**
 * V across the points that are asked for, each told by its id; a branch without any is not looked into.
 * @param wanted what is asked for
 */
export function tellVolts(
  { trunk, points, branches }: BranchNet,
  wanted: (point: string) => boolean,
  tell: (point: string, volts: number) => void,
): void {
  const cut = solveTrunk(
    trunk,
    branches.map(({ cell }) => cell),
  );
  const isWanted = ({ id }: Ends) => wanted(id);
  const read = (list: readonly Ends[], { re, im }: Volts) => {
    for (const { id, line, neutral } of list) {
      const [x, y] = [re[line]! - re[neutral]!, im[line]! - im[neutral]!];
      tell(id, Math.sqrt(x * x + y * y));
    }
  };
  read(points.filter(isWanted), cut);
  const most = branches.reduce((size, { cell }) => Math.max(size, cell.own.size), 0);
  const inside = { re: new Float64Array(most), im: new Float64Array(most) };
  for (const { cell, points: own } of branches) {
    const asked = own.filter(isWanted);
    if (asked.length === 0) continue;
    cellVolts(cell, cut, inside);
    read(asked, inside);
  }
}
