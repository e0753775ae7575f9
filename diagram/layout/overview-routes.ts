import { isBar } from '../document/kinds';
import { byCode, type End } from '../document/schema';
import type { Side } from '../symbols/types';
import type { WaysBefore } from './bends';
import { endKey, type Body, type RunEnd } from './ends';
import type { OverviewGraph, OverviewRun } from './overview-graph';
import { routeAll } from './route';
import type { Line, Obstacle, RouteEnd, RouteRequest, Soft } from './route-grid';
import { findDots, findHops, type NetPath } from './route-marks';
import type { Point } from './scene';

/** Routes of the overview's runs, and where they hop and join. */

/** Names groups of runs that share ends; the name of a group is its first run. */
function grouped(runs: readonly OverviewRun[], keysOf: (run: OverviewRun) => readonly string[]): Map<string, string> {
  const parent = new Map<string, string>();
  const find = (key: string): string => {
    let root = key;
    for (let up = parent.get(root); up !== undefined && up !== root; up = parent.get(root)) root = up;
    for (let at = key; at !== root;) {
      const next = parent.get(at)!;
      parent.set(at, root);
      at = next;
    }
    return root;
  };
  for (const run of runs) {
    const [first, ...rest] = keysOf(run);
    for (const key of rest) {
      const [a, b] = [find(first!), find(key)];
      if (a !== b) parent.set(b, a);
    }
  }
  const names = new Map<string, string>();
  const groups = new Map<string, string>();
  for (const run of [...runs].sort((a, b) => byCode(a.id, b.id))) {
    const root = find(keysOf(run)[0]!);
    if (!names.has(root)) names.set(root, run.id);
    groups.set(run.id, names.get(root)!);
  }
  return groups;
}

/** The net of each run: terminals that wires join, and all terminals of a bar or joint. */
export function netsOf(graph: OverviewGraph): Map<string, string> {
  const node = ([part, mark]: End): string => (isBar(graph.byId.get(part)!.kind) ? part : `${part} ${mark}`);
  return grouped(graph.runs, (run) => [node(run.from), node(run.to)]);
}

/** Conductors that end at one terminal part from each other at most so many modules before it. */
const SHARED_REACH = 3;
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

export function overviewRoutes(
  graph: OverviewGraph,
  bodies: ReadonlyMap<string, Body>,
  ends: ReadonlyMap<string, RunEnd>,
  softs: readonly Soft[],
  backup: (run: OverviewRun) => boolean,
  linesFor: (run: OverviewRun) => Line[] | undefined,
  before: WaysBefore,
): OverviewRoutes {
  const nets = netsOf(graph);
  const strandOf = (run: OverviewRun): string => (leavesPlace(graph, run) ? `cable ${run.id}` : nets.get(run.id)!);
  // cables that end at one terminal of a device run on as one line there; at a joint each comes for itself
  const families = grouped(graph.runs, (run) => [
    `strand ${strandOf(run)}`,
    ...[run.from, run.to].filter(([part]) => !isBar(graph.byId.get(part)!.kind)).map((e) => e.join(' ')),
  ]);
  const end = (key: string): RouteEnd => {
    const at = ends.get(key)!;
    return {
      part: at.part,
      x: at.x,
      y: at.y,
      ...(at.any ? { sides: ANY, even: true } : { sides: [at.side], reach: SHARED_REACH }),
    };
  };
  const requests = graph.runs.map((run): RouteRequest => {
    const lines = linesFor(run);
    const given = before.of(run.id, lines);
    return {
    id: run.id,
    net: nets.get(run.id)!,
    strand: strandOf(run),
    family: families.get(run.id)!,
    from: end(endKey(run, run.from[0])),
    to: end(endKey(run, run.to[0])),
    backup: backup(run),
    ...(lines && { lines }),
    ...(given && { given }),
    };
  });
  const obstacles = [...bodies].map(([id, body]): Obstacle => ({
    id,
    x: body.x,
    y: body.y,
    width: body.width,
    height: body.height,
  }));
  const { points, forced } = routeAll(requests, obstacles, softs);
  const paths = graph.runs.map((run): NetPath => ({ id: run.id, net: nets.get(run.id)!, points: points.get(run.id)! }));
  const inside = [...bodies].filter(([id]) => isBar(graph.byId.get(id)!.kind)).map(([, body]) => body);
  const onBar = ({ x, y }: Point) =>
    inside.some((b) => x >= b.x && x <= b.x + b.width && y >= b.y && y <= b.y + b.height);
  const wireOf = new Map(graph.runs.map((run) => [run.id, run.wires[0] ?? '']));
  return {
    points,
    hops: findHops(paths),
    dots: findDots(paths, onBar).map(({ x, y, net }) => ({ x, y, run: wireOf.get(net) ?? '' })),
    forced,
  };
}
