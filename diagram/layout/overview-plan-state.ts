import type { Position } from '../document/schema';
import { symbolFor } from '../symbols';
import { turnedSize, turnedTerminal, type Turn } from '../symbols/turn';
import type { OverviewGraph } from './overview-graph';
import type { OverviewTree, TreeNode } from './overview-tree';
import type { WaysAndRooms } from './overview-ways';

/** What the steps of planning an overview hand to each other: positions found so far, and how far down each band came. */
export interface PlanState {
  readonly graph: OverviewGraph;
  readonly tree: OverviewTree;
  readonly content: WaysAndRooms;
  readonly positions: Map<string, Position>;
  readonly backupBoard: Set<string>;
  readonly roomSpans: Map<string, { x: number; width: number }>;
  readonly lane: Set<string>;
  /** where feeders of inverters leave the column, and bars with ways: both are placed once all else is known */
  readonly feeders: { node: TreeNode; x: number; y: number }[];
  readonly finals: { node: TreeNode; x: number; y: number }[];
  /** column nodes that ways hang from */
  readonly hangs: ReadonlySet<TreeNode>;
  /** bars of the backup, along the foot */
  readonly footBars: TreeNode[];
  barLevel: number;
  roomsTop: number;
  foot: number;
  right: number;
}

export const startPlan = (graph: OverviewGraph, tree: OverviewTree, content: WaysAndRooms): PlanState => ({
  graph,
  tree,
  content,
  positions: new Map(),
  backupBoard: new Set(),
  roomSpans: new Map(),
  lane: new Set(),
  feeders: [],
  finals: [],
  hangs: new Set(content.hanging.map((item) => item.from)),
  footBars: [],
  barLevel: 0,
  roomsTop: 0,
  foot: 0,
  right: 0,
});

/** Marks on the lower side of a device drawn upright. */
const LOWER = new Set(['2', '4']);
export const nearMark = (node: TreeNode): string =>
  node.via!.to[0] === node.part.id ? node.via!.to[1] : node.via!.from[1];
/** A device fed at its lower terminal stands on its head. */
export const fedFromBelow = (node: TreeNode): boolean =>
  node.via !== null && node.part.kind !== 'meter' && node.part.kind !== 'changeover' && LOWER.has(nearMark(node));

/** Puts a part so that the terminal its feed comes to lies at (x, y). Returns its lower edge and the axis below it. */
export function hang(s: PlanState, node: TreeNode, x: number, y: number, turn: Turn): { bottom: number; axis: number } {
  const symbol = symbolFor(node.part, 'overview');
  const size = turnedSize(symbol, turn);
  const places = Object.values(symbol.terminals).map((place) => turnedTerminal(place, symbol, turn));
  const above = places.find((place) => place.side === 'up') ?? { x: size.width / 2 };
  const below = places.find((place) => place.side === 'down') ?? above;
  s.positions.set(node.part.id, { x: x - above.x, y, ...(turn && { turn }) });
  return { bottom: y + size.height, axis: x - above.x + below.x };
}
