import type { Kind, Part } from '../document/schema';
import { symbolFor } from '../symbols';
import { MODULE } from '../symbols/types';
import { BODY, SMALL, textWidth } from './lettering';
import { ROOM, WAY_PITCH } from './overview-metrics';
import { walk, type TreeNode } from './overview-tree';
import { designation, ratingLines } from './wording';

/** Places what stands in one room: a column an outlet or lamp, its switch above it, in the order of the ways. */

type Row = 'rail' | 'switches' | 'regulators' | 'joints' | 'loads' | 'plugs';
const ROWS: readonly Row[] = ['rail', 'switches', 'regulators', 'joints', 'loads', 'plugs'];
const TOP: Record<Exclude<Row, 'rail'>, number> = {
  switches: ROOM.switches,
  regulators: ROOM.regulators,
  joints: ROOM.joints,
  loads: ROOM.loads,
  plugs: ROOM.plugs,
};
const ROW_OF: Partial<Record<Kind, Row>> = {
  switch: 'switches',
  'switch-2way': 'switches',
  'switch-cross': 'switches',
  'switch-2pole': 'switches',
  regulator: 'regulators',
  plug: 'plugs',
};
/** Boxed devices in a room end where the switches end. */
const DEVICE_ROW = new Set<Kind>(['mcb', 'rcbo', 'fuse', 'rcd', 'isolator', 'changeover', 'spd', 'meter', 'supply']);

/** One part of a room, before its column has an x. */
interface Item {
  part: Part;
  row: Row;
  turn: 0 | 2;
  /** the part's axis from its left edge */
  axis: number;
  y: number;
}

export interface Column {
  items: Item[];
  /** what the column takes left and right of its axis */
  left: number;
  right: number;
  /** id of the way's device whose cable comes in here, and from which side */
  way?: string;
  fromBelow?: boolean;
}

/** A way's part in a room: the topmost node there and, where the cable comes straight from the board, its device. */
export interface Entry {
  node: TreeNode;
  backup: boolean;
  way?: string;
}

export interface PlacedRoom {
  width: number;
  positions: Map<string, { x: number; y: number; turn: 0 | 2 }>;
  /** x of the axis at which each way comes in */
  ways: Map<string, number>;
}

const rowOf = (node: TreeNode, inside: (node: TreeNode) => boolean): Row => {
  const { kind } = node.part;
  if (kind === 'joint') return node.parent && inside(node.parent) && behindContact(node, inside) ? 'joints' : 'rail';
  if (DEVICE_ROW.has(kind)) return 'switches';
  return ROW_OF[kind] ?? 'loads';
};

/** True when a control contact of the room stands before the node: its joints lie by the lamps, not on the rail. */
function behindContact(node: TreeNode, inside: (node: TreeNode) => boolean): boolean {
  for (let at = node.parent; at && inside(at); at = at.parent) if (at.part.kind !== 'joint') return true;
  return false;
}

function itemOf(node: TreeNode, row: Row, backup: boolean): Item {
  const { part } = node;
  const symbol = symbolFor(part, 'overview');
  // the far switch of a two-way pair hangs the other way up: strappers come from its left, the lamp's wire leaves below
  const turn =
    part.kind === 'switch-2way' && node.via?.role === 'strapper'
      ? 2
      : part.kind === 'plug' && node.via?.wires.length
        ? 2
        : 0;
  const middle =
    part.kind.startsWith('switch') && part.kind !== 'switch-cross'
      ? 250
      : Math.round(symbol.width / 2 / MODULE) * MODULE;
  const axis = turn === 2 ? symbol.width - middle : middle;
  let y = row === 'rail' ? (backup ? ROOM.backupRail : ROOM.mainsRail) - MODULE : TOP[row];
  if (row === 'switches' && DEVICE_ROW.has(part.kind)) y = ROOM.boxBottom - symbol.height;
  return { part, row, turn, axis, y };
}

function widen(column: Column, item: Item): void {
  const symbol = symbolFor(item.part, 'overview');
  const words = [designation(item.part), ...ratingLines(item.part)];
  const half = item.row === 'loads' ? Math.max(...words.map((word) => textWidth(word, BODY))) / 2 + 40 : 0;
  // a lever leans to the right, over the designation of its switch
  const isSwitch = item.part.kind.startsWith('switch');
  column.left = Math.max(column.left, isSwitch ? 250 : item.axis, half);
  column.right = Math.max(
    column.right,
    isSwitch ? Math.max(400, 45 + textWidth(designation(item.part), SMALL)) : symbol.width - item.axis,
    half,
  );
  column.items.push(item);
}

/** The columns of one entry, left to right. The depth of a chain does not matter: no recursion. */
function columnsOf(entry: Entry, inside: (node: TreeNode) => boolean): Column[] {
  const columns: Column[] = [];
  const columnOf = new Map<TreeNode, Column>();
  const rows = new Map<TreeNode, Row>();
  const add = (): Column => {
    const column: Column = { items: [], left: 250, right: 250 };
    columns.push(column);
    return column;
  };
  const isFeed = entry.backup && rowOf(entry.node, inside) === 'rail';
  for (const node of walk(entry.node)) {
    if (!inside(node)) continue;
    const row = rowOf(node, inside);
    rows.set(node, row);
    if (node === entry.node && isFeed) continue;
    const above = node.parent && columnOf.get(node.parent);
    const firstBelow = node.parent?.children.find((child) => inside(child)) === node;
    const share = above && firstBelow && ROWS.indexOf(row) > ROWS.indexOf(rows.get(node.parent!)!);
    const column = share ? above : add();
    columnOf.set(node, column);
    widen(column, itemOf(node, row, entry.backup));
  }
  if (entry.backup) {
    // backup comes from below, right of what it feeds
    const feed = add();
    if (isFeed) widen(feed, itemOf(entry.node, 'rail', true));
    if (entry.way) Object.assign(feed, { way: entry.way, fromBelow: true });
  } else if (entry.way && columns[0]) columns[0].way = entry.way;
  return columns;
}

const up = (value: number): number => Math.ceil(value / MODULE) * MODULE;

/** Places a room from its upper left corner; `least` is the width its name asks for. */
export function placeRoom(entries: readonly Entry[], inside: (node: TreeNode) => boolean, least: number): PlacedRoom {
  const columns = entries.flatMap((entry) => columnsOf(entry, inside));
  const room: PlacedRoom = { width: least, positions: new Map(), ways: new Map() };
  let axis = 0;
  let before: Column | null = null;
  const lastWay = { mains: -WAY_PITCH, backup: -WAY_PITCH };
  for (const column of columns) {
    axis = before ? up(axis + before.right + column.left + 75) : up(Math.max(ROOM.side, column.left + 250));
    if (column.way) {
      const side = column.fromBelow ? 'backup' : 'mains';
      axis = Math.max(axis, lastWay[side] + WAY_PITCH);
      lastWay[side] = axis;
      room.ways.set(column.way, axis);
    }
    for (const item of column.items)
      room.positions.set(item.part.id, { x: axis - item.axis, y: item.y, turn: item.turn });
    before = column;
  }
  room.width = Math.max(least, up(axis + Math.max(ROOM.side, (before?.right ?? 0) + 250)));
  return room;
}
