import { hasBattery } from '../circuit/inverters';
import { polesOf } from '../document/kinds';
import { byDesignation, compareDesignations } from '../document/names';
import type { Kind, Part } from '../document/schema';
import type { Graph } from '../terminals/graph';
import { closedEdges, pathTo, reach, reaches } from '../terminals/reach';
import { isPoint } from '../terminals/roles-of-parts';
import type { Setting } from './settings';
import { devicesToBattery } from './stance';
import { openSetting } from './still-live';

/** What must be opened so that no line of any source reaches a part. */
export interface Isolation {
  part: string;
  /** the least set of devices, by designation; null where nothing in this home makes the part dead */
  open: { part: string; setting: Setting }[] | null;
  /** sources that it would be fed from, which the set parts it from */
  sources: string[];
  /** the neutral of some source stays joined to it: a device of the set has one pole, or stands in the line alone */
  neutralJoined: boolean;
  /** points elsewhere that go dark as well */
  alsoDark: string[];
  /** its terminals are a battery's, or hang on one with nothing between */
  never: boolean;
}

/** What is fit to isolate with: a control switch is not, nor an inverter switched off. */
const ISOLATES: ReadonlySet<Kind> = new Set(['isolator', 'mcb', 'rcbo', 'rcd', 'fuse', 'plug', 'changeover']);
/** Sets larger than this are not looked for: three sources at one place would be a find. */
const MOST = 4;
/** sets of one size that are compared */
const COMPARED = 24;

/** How a node may be fed: from where, and over which contacts. */
interface Feeding {
  source: string;
  starts: number[];
  closed: Uint8Array;
}

/** Combinations of the changeovers: in each position one side only is joined. */
function sides(changeovers: readonly Part[]): Map<string, 'A' | 'B'>[] {
  return changeovers
    .slice(0, 3)
    .reduce<Map<string, 'A' | 'B'>[]>(
      (all, { id }) => all.flatMap((before) => (['A', 'B'] as const).map((side) => new Map(before).set(id, side))),
      [new Map()],
    );
}

/** Every way in which a line may reach anything, with some devices open, whatever else somebody does. */
function feedings(graph: Graph, opened: ReadonlySet<string>): Feeding[] {
  const parts = [...graph.parts.values()];
  const changeovers = parts.filter(({ kind }) => kind === 'changeover');
  const found: Feeding[] = [];
  for (const side of sides(changeovers)) {
    const open = (edge: Graph['edges'][number]) =>
      edge.kind === 'bond' ||
      (edge.part !== undefined && opened.has(edge.part) && edge.kind !== 'bypass' && edge.kind !== 'through') ||
      (edge.kind === 'changeover' && (side.get(edge.part!) ?? edge.position) !== edge.position);
    const closed = closedEdges(graph, open);
    for (const part of parts) {
      if (part.kind === 'supply') found.push({ source: part.id, starts: [graph.node(part.id, 'L')!], closed });
      if (part.kind !== 'inverter' || !hasBattery(graph, part, closed)) continue;
      // On battery the inverter parts its own input.
      const own = closed.slice();
      for (const number of graph.contactsOf.get(part.id)!) if (graph.edges[number]!.kind === 'bypass') own[number] = 0;
      found.push({ source: part.id, starts: [graph.node(part.id, 'out.L')!], closed: own });
    }
    const dc = closed.slice();
    graph.edges.forEach(({ kind }, number) => {
      if (kind !== 'wire' && kind !== 'device') dc[number] = 0;
    });
    for (const part of parts)
      if (part.kind === 'battery')
        found.push({ source: part.id, starts: ['+', '-'].map((mark) => graph.node(part.id, mark)!), closed: dc });
  }
  return found;
}

/**
 * Nodes of a part that must be dead: not its earth; of an inverter not the battery's leads, of which one pole parted is
 * enough, and which `feedings` looks at.
 */
function targetsOf(graph: Graph, part: Part): number[] {
  const nodes: number[] = [];
  graph.partOf.forEach((other, node) => {
    const mark = graph.markOf[node]!;
    if (other === part && mark !== 'E' && !mark.endsWith('.E') && !mark.startsWith('bat.')) nodes.push(node);
  });
  return nodes;
}

/** The first path by which one of the nodes is fed: its source and its devices; null when all are dead. */
function feedOf(graph: Graph, targets: readonly number[], opened: ReadonlySet<string>) {
  for (const { source, starts, closed } of feedings(graph, opened)) {
    const walk = reach(graph, starts, closed);
    const node = targets.find((each) => reaches(walk, each));
    if (node === undefined) continue;
    const devices = pathTo(graph, walk, node).flatMap((number) => {
      const { kind, part } = graph.edges[number]!;
      const fit = kind === 'device' || kind === 'changeover' || kind === 'plug';
      return fit && ISOLATES.has(graph.parts.get(part!)!.kind) ? [part!] : [];
    });
    // A battery's source is parted at the battery as well as along its line.
    const part = graph.parts.get(source)!;
    const leads = part.kind === 'inverter' ? devicesToBattery(graph, part).map(({ id }) => id) : [];
    return { source, devices: [...new Set([...devices, ...leads])] };
  }
  return null;
}

/** All least sets of devices whose opening leaves the nodes dead, up to a number of them; empty where there is none. */
function leastSets(graph: Graph, targets: readonly number[]): string[][] {
  const tried = new Set<string>();
  for (let most = 0; most <= MOST; most++) {
    const found: string[][] = [];
    const search = (opened: string[]): void => {
      const key = [...opened].sort().join(' ');
      if (tried.has(`${most} ${key}`) || found.length >= COMPARED) return;
      tried.add(`${most} ${key}`);
      const feed = feedOf(graph, targets, new Set(opened));
      if (!feed) found.push(opened);
      else if (opened.length < most) for (const device of feed.devices) search([...opened, device]);
    };
    search([]);
    if (found.length > 0) return found;
  }
  return [];
}

/** What some devices open leave without any line: points, by id, and how many terminals in all. */
function deadBehind(graph: Graph, opened: ReadonlySet<string>): { points: Set<string>; terminals: number } {
  const live = new Uint8Array(graph.size);
  for (const { starts, closed } of feedings(graph, opened))
    for (const node of reach(graph, starts, closed).order) live[node] = 1;
  const points = [...graph.parts.values()].filter(
    (part) => isPoint(part) && ['L', 'N'].every((mark) => live[graph.node(part.id, mark)!] === 0),
  );
  return {
    points: new Set(points.map(({ id }) => id)),
    terminals: live.reduce((dead, each) => dead + (each === 0 ? 1 : 0), 0),
  };
}

/**
 * The least set of devices to open, lock off and prove dead before somebody works at a part: it holds whatever the
 * switches, the changeovers and the supply do meanwhile. Of several sets as small, the one that leaves most of the home
 * its supply, then the one that parts more neutrals.
 */
export function isolationOf(graph: Graph, part: Part): Isolation {
  const targets = targetsOf(graph, part);
  const sources = new Set<string>();
  for (const { source, starts, closed } of feedings(graph, new Set())) {
    const walk = reach(graph, starts, closed);
    if (targets.some((node) => reaches(walk, node))) sources.add(source);
  }
  const fedFrom = [...sources].sort(compareDesignations);
  const sets = leastSets(graph, targets);
  const never = part.kind === 'battery';
  if (sets.length === 0)
    return { part: part.id, open: null, sources: fedFrom, neutralJoined: false, alsoDark: [], never };

  const before = deadBehind(graph, new Set()).points;
  const ranked = sets
    .map((ids) => {
      const devices = ids.map((id) => graph.parts.get(id)!).sort(byDesignation);
      const dead = deadBehind(graph, new Set(ids));
      const alsoDark = [...dead.points].filter((id) => !before.has(id) && id !== part.id).sort(compareDesignations);
      const poles = devices.reduce((sum, device) => sum + polesOf(device), 0);
      return { devices, alsoDark, dead: dead.terminals, poles };
    })
    .sort(
      (a, b) =>
        a.dead - b.dead ||
        b.poles - a.poles ||
        compareDesignations(a.devices.map(({ id }) => id).join(' '), b.devices.map(({ id }) => id).join(' ')),
    );
  const best = ranked[0]!;
  const opened = new Set(best.devices.map(({ id }) => id));
  const neutrals = [...graph.parts.values()].flatMap(({ kind, id }) =>
    kind === 'supply' ? [graph.node(id, 'N')!] : kind === 'inverter' ? [graph.node(id, 'out.N')!] : [],
  );
  const joined = reach(
    graph,
    neutrals.filter((node) => !targets.includes(node)),
    closedEdges(graph, ({ kind, part: id }) => kind === 'bond' || (id !== undefined && opened.has(id))),
  );
  return {
    part: part.id,
    open: best.devices.map((device) => ({ part: device.id, setting: openSetting(device)! })),
    sources: fedFrom,
    neutralJoined: best.devices.length > 0 && targets.some((node) => reaches(joined, node)),
    alsoDark: best.alsoDark,
    never,
  };
}
