import { byDesignation } from '../document/names';
import type { Kind, Part } from '../document/schema';
import type { OverviewGraph, OverviewRun } from './overview-graph';
import { otherEnd } from './overview-graph';

/**
 * The overview in the order of current: from the supply through the column to the line bars, from each bar through its
 * ways into the rooms; and from each inverter the same again. A tree, so that every part has one place to hang from;
 * runs that close a ring are drawn but carry nobody.
 */
export interface TreeNode {
  part: Part;
  parent: TreeNode | null;
  via: OverviewRun | null;
  children: TreeNode[];
  /** stands in the column or the lane, before the ways */
  column: boolean;
}

export interface OverviewTree {
  /** null when nothing of the intake is drawn yet */
  mains: TreeNode | null;
  /** what each inverter feeds: the root is the inverter, by id */
  backups: TreeNode[];
  /** what stands between each inverter and its battery: the root is the inverter, by id */
  batteries: TreeNode[];
  /** drawn parts that no tree holds, in trees of their own */
  loose: TreeNode[];
}

const OVERCURRENT: ReadonlySet<Kind> = new Set<Kind>(['fuse', 'mcb', 'rcbo']);
const DEVICES: ReadonlySet<Kind> = new Set<Kind>([
  'fuse',
  'mcb',
  'rcbo',
  'rcd',
  'isolator',
  'changeover',
  'joint',
  'switch-2pole',
]);
const ALWAYS_COLUMN: ReadonlySet<Kind> = new Set<Kind>([
  'supply',
  'meter',
  'line-bar',
  'spd',
  'inverter',
  'changeover',
]);
/** Parts from which a drawing without a supply is read, most upstream first. */
const UPSTREAM: readonly Kind[] = [
  'meter',
  'isolator',
  'rcd',
  'line-bar',
  'changeover',
  'mcb',
  'rcbo',
  'fuse',
  'joint',
  'switch',
  'switch-2pole',
  'switch-2way',
  'regulator',
  'socket',
  'plug',
];

export const isOvercurrent = (kind: Kind): boolean => OVERCURRENT.has(kind);

interface Growth {
  graph: OverviewGraph;
  taken: Set<string>;
}

/** Grows a tree breadth first from a root along runs that `starts` allows at the root itself. */
function grow({ graph, taken }: Growth, root: Part, starts: (mark: string) => boolean = () => true): TreeNode {
  const top: TreeNode = { part: root, parent: null, via: null, children: [], column: false };
  taken.add(root.id);
  const queue = [top];
  for (let head = 0; head < queue.length; head++) {
    const node = queue[head]!;
    // an inverter is where one tree ends and the next begins
    if (node !== top && (node.part.kind === 'inverter' || node.part.kind === 'battery')) continue;
    const next: TreeNode[] = [];
    for (const run of graph.at.get(node.part.id) ?? []) {
      const near = run.from[0] === node.part.id ? run.from : run.to;
      if (node === top && !starts(near[1])) continue;
      const far = graph.byId.get(otherEnd(run, node.part.id)[0])!;
      if (!graph.parts.has(far.id) || taken.has(far.id)) continue;
      taken.add(far.id);
      next.push({ part: far, parent: node, via: run, children: [], column: false });
    }
    next.sort((a, b) => byDesignation(a.part, b.part));
    node.children.push(...next);
    queue.push(...next);
  }
  return top;
}

/** True when only devices in line stand between a node and an inverter: it is there for the inverter's sake. */
export function feedsInverter(node: TreeNode): boolean {
  let at = node;
  while (at.part.kind !== 'inverter') {
    if (!DEVICES.has(at.part.kind) || at.children.length !== 1) return false;
    at = at.children[0]!;
  }
  return true;
}

/** Decides for each node, leaves first, whether it stands in the column (or lane) or belongs to a way. */
function markColumn(root: TreeNode, inRoom: (part: Part) => boolean): void {
  for (const node of [...walk(root)].reverse()) {
    const { kind } = node.part;
    const below = node.children.some((child) => child.column);
    const atBoard = !inRoom(node.part);
    if (kind === 'inverter') node.column = node.parent === null || feedsInverter(node);
    else if (ALWAYS_COLUMN.has(kind)) node.column = true;
    else if ((kind === 'isolator' || kind === 'rcd') && atBoard) node.column = true;
    else if (DEVICES.has(kind)) {
      const forBars = node.children.some(
        (child) => child.column && child.part.kind !== 'inverter' && !feedsInverter(child),
      );
      node.column = forBars || (below && feedsInverter(node));
      // what stands right behind the supply is the service fuse, whatever follows
      if (node.parent?.part.kind === 'supply') node.column = true;
      // and behind an inverter the first device stands beside it while nothing hangs from it yet
      if (node.parent?.part.kind === 'inverter' && node.children.length === 0) node.column = true;
      // two overcurrent devices in series at the board: the first is in the column, the second heads the way
      if (isOvercurrent(kind) && atBoard)
        node.column ||= node.children.some((child) => isOvercurrent(child.part.kind) && !inRoom(child.part));
    }
  }
}

/** Reads the graph into trees. `inRoom` says which parts stand in a room rather than at the intake. */
export function overviewTree(graph: OverviewGraph, inRoom: (part: Part) => boolean): OverviewTree {
  const growth: Growth = { graph, taken: new Set() };
  const all = [...graph.parts.values()];
  const inverters = all.filter((part) => part.kind === 'inverter');
  const supply = all.find((part) => part.kind === 'supply');
  const upstream = (part: Part) => UPSTREAM.indexOf(part.kind);
  const first = all
    .filter((part) => upstream(part) >= 0 && upstream(part) <= 4 && !inRoom(part))
    .sort((a, b) => upstream(a) - upstream(b) || byDesignation(a, b))[0];
  const root = supply ?? first;

  const mains = root ? grow(growth, root) : null;
  const backups = inverters.map((part) => grow(growth, part, (mark) => mark.startsWith('out')));
  const batteries = inverters.map((part) => grow(growth, part, (mark) => mark.startsWith('bat')));
  const rest = all
    .filter(
      (part) =>
        !growth.taken.has(part.id) &&
        part.kind !== 'neutral-bar' &&
        part.kind !== 'earth-bar' &&
        part.kind !== 'electrode' &&
        part.kind !== 'bond',
    )
    .sort((a, b) => {
      const [x, y] = [upstream(a), upstream(b)].map((n) => (n < 0 ? UPSTREAM.length : n)) as [number, number];
      return x - y || byDesignation(a, b);
    });
  const loose: TreeNode[] = [];
  for (const part of rest) if (!growth.taken.has(part.id)) loose.push(grow(growth, part));
  for (const tree of [...(mains ? [mains] : []), ...backups]) markColumn(tree, inRoom);
  return { mains, backups, batteries, loose };
}

/** The nodes of a tree, each before its children and the children in order. */
export function* walk(node: TreeNode): Generator<TreeNode> {
  const stack = [node];
  for (let next = stack.pop(); next; next = stack.pop()) {
    yield next;
    for (let i = next.children.length - 1; i >= 0; i--) stack.push(next.children[i]!);
  }
}
