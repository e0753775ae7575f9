import { isBar } from '../document/kinds';
import { byCode } from '../document/schema';
import type { Side } from '../symbols/types';
import { endKey, type Body, type RunEnd } from './ends';
import type { OverviewGraph, OverviewRun } from './overview-graph';
import { routeAll } from './route';
import type { Obstacle, RouteEnd, RouteRequest, Soft } from './route-grid';
import { findDots, findHops, type NetPath } from './route-marks';
import type { Point } from './scene';

/** Routes of the overview's runs, and where they hop and join. */

/** The net of each run: terminals that wires join, and all terminals of a bar or joint. The name of a net is its first run. */
export function netsOf(graph: OverviewGraph): Map<string, string> {
  const parent = new Map<string, string>();
  const find = (key: string): string => {
    let root = key;
    while (parent.has(root) && parent.get(root) !== root) root = parent.get(root)!;
    for (let at = key; at !== root; ) {
      const next = parent.get(at)!;
      parent.set(at, root);
      at = next;
    }
    return root;
  };
  const node = (part: string, mark: string): string => (isBar(graph.byId.get(part)!.kind) ? part : `${part} ${mark}`);
  for (const run of graph.runs) {
    const [a, b] = [find(node(...run.from)), find(node(...run.to))];
    parent.set(a, a);
    if (a !== b) parent.set(b, a);
  }
  const names = new Map<string, string>();
  const nets = new Map<string, string>();
  for (const run of [...graph.runs].sort((a, b) => byCode(a.id, b.id))) {
    const root = find(node(...run.from));
    if (!names.has(root)) names.set(root, run.id);
    nets.set(run.id, names.get(root)!);
  }
  return nets;
}

const ANY: readonly Side[] = ['up', 'down', 'right', 'left'];

export interface OverviewRoutes {
  points: Map<string, Point[]>;
  hops: Map<string, Point[]>;
  /** with the first wire of the net each belongs to */
  dots: (Point & { run: string })[];
  forced: string[];
}

/** True for a cable from one place to another: it is drawn alone, for nothing branches from it on its way. */
export function leavesPlace(graph: OverviewGraph, run: OverviewRun): boolean {
  return run.cable !== undefined && graph.byId.get(run.from[0])?.place !== graph.byId.get(run.to[0])?.place;
}

export function overviewRoutes(graph: OverviewGraph, bodies: ReadonlyMap<string, Body>, ends: ReadonlyMap<string, RunEnd>, softs: readonly Soft[] = []): OverviewRoutes {
  const nets = netsOf(graph);
  const end = (key: string): RouteEnd => {
    const at = ends.get(key)!;
    return { part: at.part, x: at.x, y: at.y, ...(at.any ? { sides: ANY, even: true } : { sides: [at.side] }) };
  };
  const requests = graph.runs.map((run): RouteRequest => ({ id: run.id, net: nets.get(run.id)!, strand: leavesPlace(graph, run) ? `cable ${run.id}` : nets.get(run.id)!, from: end(endKey(run, run.from[0])), to: end(endKey(run, run.to[0])) }));
  const obstacles = [...bodies].map(([id, body]): Obstacle => ({ id, x: body.x, y: body.y, width: body.width, height: body.height }));
  const { points, forced } = routeAll(requests, obstacles, softs);
  const paths = graph.runs.map((run): NetPath => ({ id: run.id, net: nets.get(run.id)!, points: points.get(run.id)! }));
  const inside = [...bodies].filter(([id]) => isBar(graph.byId.get(id)!.kind)).map(([, body]) => body);
  const onBar = ({ x, y }: Point) => inside.some((b) => x >= b.x && x <= b.x + b.width && y >= b.y && y <= b.y + b.height);
  const wireOf = new Map(graph.runs.map((run) => [run.id, run.wires[0] ?? '']));
  return {
    points,
    hops: findHops(paths),
    dots: findDots(paths, onBar).map(({ x, y, net }) => ({ x, y, run: wireOf.get(net) ?? '' })),
    forced,
  };
}
