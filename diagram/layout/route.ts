import { byCode } from '../document/schema';
import { MODULE, type Side } from '../symbols/types';
import { buildGrid, type Grid, type Line, type Obstacle, type RouteEnd, type RouteRequest, type Soft } from './route-grid';
import { COST, edgeFrom, emptyOccupancy, nodeAt, same, type Occupancy } from './route-occupancy';
import { Search, toPoints, type Way } from './route-search';
import { traceWay } from './route-trace';
import type { Point } from './scene';

/**
 * The router: every run on its own way round the parts, the same for the same input. Short and straight runs go first,
 * then each that bends may look again for a better way among the others.
 */

interface Routed {
  request: RouteRequest;
  net: number;
  nodes: number[] | null;
  cost: number;
  /** how often it was moved away for another */
  moved: number;
}

const SPAN = (request: RouteRequest): number =>
  Math.abs(request.from.x - request.to.x) + Math.abs(request.from.y - request.to.y);
/** True for ends on one line that look along it. */
const isStraight = ({ from, to }: RouteRequest): boolean => {
  const upright = from.sides[0] === 'up' || from.sides[0] === 'down';
  return upright ? from.x === to.x : from.y === to.y;
};

/** The order in which runs are routed: those that can be straight, then by length, then by id. */
const inOrder = (a: RouteRequest, b: RouteRequest): number =>
  Number(a.late ?? false) - Number(b.late ?? false) ||
  Number(isStraight(b)) - Number(isStraight(a)) ||
  SPAN(a) - SPAN(b) ||
  byCode(a.id, b.id);

/** No way between two ends costs less. */
const leastCost = ({ from, to }: RouteRequest): number => {
  const [dx, dy] = [Math.abs(from.x - to.x), Math.abs(from.y - to.y)];
  return dx + dy + (dx > 0 && dy > 0 ? COST.bend : 0);
};

/** A run that costs so much more than the shortest way may look again. */
const WORTH = COST.crossing + COST.bend;
/** How often one run may be moved away for others. */
const MOVES = 12;
/** Nodes that may be looked over for moving runs away on one page: on a very full page the last ones stay elbows. */
const EFFORT = 12_000_000;

/** A terminal's own sides first, then the others. */
const anySide = (end: RouteEnd): Side[] => [...new Set<Side>([...end.sides, 'right', 'left', 'down', 'up'])];

class Router {
  private readonly occupancy: Occupancy;
  private readonly search: Search;
  private readonly byNet = new Map<number, Routed[]>();

  constructor(
    private readonly grid: Grid,
    private readonly terminals: ReadonlyMap<number, number>,
    netOf: readonly number[],
    familyOf: readonly number[],
    /** how many runs each strand has */
    private readonly strands: readonly number[],
    spread: boolean,
  ) {
    this.occupancy = emptyOccupancy(grid, netOf, familyOf);
    this.search = new Search(grid, this.occupancy, terminals, spread);
    for (const [node, net] of terminals) this.occupancy.corner[node] = net;
  }

  /** Lays a run on the way it had before; false where that is not free. */
  keep(routed: Routed): boolean {
    const { request, net } = routed;
    const nodes =
      request.given && traceWay(this.grid, this.occupancy, [request.from, request.to], request.given, net);
    if (!nodes) return false;
    this.lay(routed, { nodes, cost: 0 });
    return true;
  }

  route(routed: Routed): void {
    const found = this.look(routed);
    if (found) this.lay(routed, found);
  }

  /** Makes room for runs that found none, one after the other. */
  insistOn(blocked: readonly Routed[]): void {
    const effort = this.search.effort + EFFORT;
    for (const routed of blocked) if (!routed.nodes) this.insist(routed, effort);
  }

  /** Lays a run over others where it has no free way, and leads those round it. */
  private insist(routed: Routed, effort: number): void {
    const waiting = [routed];
    while (waiting.length > 0) {
      const next = waiting.shift()!;
      const free = this.look(next);
      if (free) {
        this.lay(next, free);
        continue;
      }
      const found = next.moved < MOVES && this.search.effort < effort ? this.look(next, true) : null;
      next.moved++;
      if (!found) continue;
      for (const other of this.under(found.nodes, next.net)) {
        this.lift(other);
        this.occupancy.pushed[other.net + 1]!++;
        waiting.push(other);
      }
      this.lay(next, found);
    }
  }

  /** The best way by the terminals' own sides; where those are taken, by any side. */
  private look({ request, net }: Routed, insists = false): Way | null {
    const { from, to, backup = false, lines = [] } = request;
    const ask = { net, backup, insists, alone: this.strands[net] === 1 };
    const by = (wanted: readonly Line[]): Way | null =>
      this.search.find(from, to, { ...ask, lines: wanted }) ??
      this.search.find({ ...from, sides: anySide(from) }, { ...to, sides: anySide(to) }, { ...ask, lines: wanted });
    if (lines.length === 0) return by([]);
    const whole = by(lines);
    if (whole) return whole;
    // every line that is still possible is kept
    let kept: { lines: Line[]; way: Way | null } = { lines: [], way: by([]) };
    for (const line of lines) {
      const way = by([...kept.lines, line]);
      if (way) kept = { lines: [...kept.lines, line], way };
    }
    return kept.way;
  }

  /** Takes a run off the grid, looks again, and keeps the better of the two ways. */
  improve(routed: Routed): boolean {
    const { nodes, cost } = routed;
    if (!nodes) return false;
    this.lift(routed);
    const found = this.look(routed);
    const better = found !== null && found.nodes.join() !== nodes.join();
    this.lay(routed, better ? found : { nodes, cost });
    return better;
  }

  private lay(routed: Routed, way: Way): void {
    Object.assign(routed, way);
    this.byNet.set(routed.net, [...(this.byNet.get(routed.net) ?? []), routed]);
    this.mark(routed);
  }

  private mark(routed: Routed): void {
    this.eachStep(routed.nodes ?? [], (node, edge, level, bend) => {
      if (edge >= 0) (level ? this.occupancy.right : this.occupancy.down)[edge] = routed.net;
      if (bend) this.occupancy.corner[node] = routed.net;
      else (level ? this.occupancy.level : this.occupancy.upright)[node] = routed.net;
    });
  }

  /** Clears what a run alone stood on; what others of its family share is set again. */
  private lift(routed: Routed): void {
    const { occupancy } = this;
    this.eachStep(routed.nodes ?? [], (node, edge, level) => {
      if (edge >= 0) (level ? occupancy.right : occupancy.down)[edge] = 0;
      if (occupancy.corner[node] === routed.net) occupancy.corner[node] = this.terminals.get(node) ?? 0;
      if (occupancy.level[node] === routed.net) occupancy.level[node] = 0;
      if (occupancy.upright[node] === routed.net) occupancy.upright[node] = 0;
    });
    const rest = this.byNet.get(routed.net)!.filter((other) => other !== routed);
    this.byNet.set(routed.net, rest);
    for (const other of rest) this.mark(other);
    Object.assign(routed, { nodes: null, cost: Infinity });
  }

  /** Runs that a way goes over: along them, or through or with a bend of the one or the other. */
  private under(nodes: readonly number[], net: number): Routed[] {
    const { occupancy } = this;
    const met = new Set<number>();
    const note = (on: number) => {
      if (!same(occupancy, on, net)) met.add(on);
    };
    this.eachStep(nodes, (node, edge, level, bend) => {
      if (edge >= 0) note((level ? occupancy.right : occupancy.down)[edge]!);
      if (!this.terminals.has(node)) note(occupancy.corner[node]!);
      if (bend) for (const list of [occupancy.level, occupancy.upright]) note(list[node]!);
    });
    return [...met].sort((a, b) => a - b).flatMap((other) => this.byNet.get(other) ?? []);
  }

  /** Each node of a way with the edge that leaves it; ends and corners are told as bends. */
  private eachStep(
    nodes: readonly number[],
    tell: (node: number, edge: number, level: boolean, bend: boolean) => void,
  ): void {
    let before = -1;
    for (let i = 0; i < nodes.length; i++) {
      const node = nodes[i]!;
      const next = nodes[i + 1];
      if (next === undefined) {
        tell(node, -1, false, true);
        return;
      }
      const direction = next === node + 1 ? 1 : next === node - 1 ? 3 : next > node ? 2 : 0;
      tell(node, edgeFrom(this.grid, node, direction), direction % 2 === 1, i === 0 || direction !== before);
      before = direction;
    }
  }
}

const STEP: Record<Side, Point> = {
  up: { x: 0, y: -1 },
  down: { x: 0, y: 1 },
  left: { x: -1, y: 0 },
  right: { x: 1, y: 0 },
};

/** The plain way, taken only where no free one exists: out of both terminals and square across. */
export function elbow(from: RouteEnd, to: RouteEnd): Point[] {
  const [a, b] = [from.sides[0] ?? 'up', to.sides[0] ?? 'up'];
  const p = { x: from.x + STEP[a].x * MODULE, y: from.y + STEP[a].y * MODULE };
  const q = { x: to.x + STEP[b].x * MODULE, y: to.y + STEP[b].y * MODULE };
  const corner = a === 'up' || a === 'down' ? { x: q.x, y: p.y } : { x: p.x, y: q.y };
  const points: Point[] = [];
  for (const { x, y } of [from, p, corner, q, to]) {
    const [before, last] = [points.at(-2), points.at(-1)];
    if (last && last.x === x && last.y === y) continue;
    if (before && last && ((before.x === last.x && last.x === x) || (before.y === last.y && last.y === y)))
      points.pop();
    points.push({ x, y });
  }
  return points.length > 1
    ? points
    : [
        { x: from.x, y: from.y },
        { x: to.x, y: to.y },
      ];
}

export interface Routes {
  points: Map<string, Point[]>;
  /** ids of runs for which no free way was found: drawn as elbows */
  forced: string[];
}

/**
 * Routes all runs round all parts. Pure; the order of the arguments' lists does not matter.
 * @param options.spread keep a free line between runs where there is room
 * @param options.pins terminals that nothing is wired to: no run passes over them
 */
export function routeAll(
  requests: readonly RouteRequest[],
  obstacles: readonly Obstacle[],
  softs: readonly Soft[] = [],
  options: { spread?: boolean; pins?: readonly Point[] } = {},
): Routes {
  const sorted = [...requests].sort(inOrder);
  const result: Routes = { points: new Map(), forced: [] };
  const grid = buildGrid(obstacles, requests, softs);
  const strands = numbered(requests.map((request) => request.strand));
  const nets = numbered(requests.map((request) => request.net));
  const families = numbered(requests.map((request) => request.family));
  const netOf: number[] = [0];
  const familyOf: number[] = [0];
  const strandSizes: number[] = [];
  for (const { strand, net, family } of requests) {
    netOf[strands.get(strand)!] = nets.get(net)!;
    familyOf[strands.get(strand)!] = families.get(family)!;
    strandSizes[strands.get(strand)!] = (strandSizes[strands.get(strand)!] ?? 0) + 1;
  }
  const all = sorted.map((request): Routed => ({
    request,
    net: strands.get(request.strand)!,
    nodes: null,
    cost: Infinity,
    moved: 0,
  }));
  if (grid) {
    const router = new Router(
      grid,
      terminalNodes(grid, all, netOf, options.pins ?? []),
      netOf,
      familyOf,
      strandSizes,
      options.spread ?? false,
    );
    const pinned = all.filter(({ request }) => request.lines?.length && !request.given);
    for (const routed of pinned) router.route(routed);
    for (const routed of all) if (!routed.nodes) router.keep(routed);
    for (const routed of all) if (!routed.nodes) router.route(routed);
    router.insistOn(all.filter(({ nodes }) => !nodes));
    for (const routed of all) if (routed.nodes && routed.cost - leastCost(routed.request) > WORTH) router.improve(routed);
  }
  for (const { request, nodes } of all) {
    const points = nodes ? toPoints(grid!, nodes) : [];
    // a wire from a terminal to itself has no way to go: it stays a point
    if (nodes) result.points.set(request.id, points.length > 1 ? points : [points[0]!, points[0]!]);
    else {
      result.points.set(request.id, elbow(request.from, request.to));
      result.forced.push(request.id);
    }
  }
  result.forced.sort(byCode);
  return result;
}

/** Numbers from 1, by name. */
function numbered(names: readonly string[]): Map<string, number> {
  return new Map([...new Set(names)].sort(byCode).map((name, i) => [name, i + 1]));
}

/** Terminals are corners from the start: no run of another net passes over one. A terminal of several nets belongs to none. */
function terminalNodes(
  grid: Grid,
  all: readonly Routed[],
  netOf: readonly number[],
  pins: readonly Point[],
): Map<number, number> {
  const nodes = new Map<number, number>();
  for (const pin of pins) {
    const node = nodeAt(grid, pin);
    // a pin that no line of the grid meets is in nobody's way
    if (grid.xs[node % grid.columns] === pin.x && grid.ys[Math.floor(node / grid.columns)] === pin.y)
      nodes.set(node, -1);
  }
  const wired = new Map<number, number>();
  for (const { request, net } of all)
    for (const end of [request.from, request.to]) {
      const node = nodeAt(grid, end);
      const before = wired.get(node);
      wired.set(
        node,
        before === undefined || before === net ? net : before > 0 && netOf[before] === netOf[net] ? before : -1,
      );
    }
  for (const [node, net] of wired) nodes.set(node, net);
  return nodes;
}
