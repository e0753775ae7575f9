import type { Installation, Part, Position } from '../document/schema';
import { SHORT_BAR, symbolFor } from '../symbols';
import { BAR_AXIS } from '../symbols/bar';
import { MODULE } from '../symbols/types';
import { turnedSize, turnedTerminal, type Turn } from '../symbols/turn';
import { findWays, type Way } from '../terminals/ways';
import { BODY, textWidth } from './lettering';
import { otherEnd, overviewGraph, type OverviewGraph } from './overview-graph';
import { BAR, COLUMN, FOOT, LEFT, ROOM, WAY_PITCH, m } from './overview-metrics';
import { placeRoom } from './overview-rooms';
import { feedsInverter, overviewTree, walk, type OverviewTree, type TreeNode } from './overview-tree';
import { waysAndRooms, type Hanging, type WaysAndRooms } from './overview-ways';
import { designation, ratingLines } from './wording';

/** Places of the whole overview in the order of current, and what the scene needs to know about it. */
export interface OverviewPlan {
  positions: Map<string, Position>;
  graph: OverviewGraph;
  tree: OverviewTree;
  ways: readonly Way[];
  /** what hangs from the column, room by room */
  content: WaysAndRooms;
  /** id of the place of each part shown in a room; '' for a room without a place */
  roomOf: Map<string, string>;
  /** left edge and width of each room, by id of its place */
  rooms: ReadonlyMap<string, { x: number; width: number }>;
  /** parts between the column and the backup bar: inverters, batteries and their devices */
  lane: ReadonlySet<string>;
  /** parts that stand under the rooms or in the lane */
  backupBoard: Set<string>;
  tray: Part[];
  /** axis of the lowest line bar, upper and lower edge of the rooms, lower edge of it all */
  levels: { bar: number; rooms: number; foot: number; bottom: number };
}

/** Marks on the lower side of a device drawn upright. */
const LOWER = new Set(['2', '4']);
const nearMark = (node: TreeNode): string => (node.via!.to[0] === node.part.id ? node.via!.to[1] : node.via!.from[1]);
/** A device fed at its lower terminal stands on its head. */
const fedFromBelow = (node: TreeNode): boolean =>
  node.via !== null && node.part.kind !== 'meter' && node.part.kind !== 'changeover' && LOWER.has(nearMark(node));

class Planner {
  readonly positions = new Map<string, Position>();
  readonly backupBoard = new Set<string>();
  readonly roomSpans = new Map<string, { x: number; width: number }>();
  readonly lane = new Set<string>();
  /** lowest line reached so far, and the levels at which feeders of inverters leave */
  private readonly feeders: { node: TreeNode; x: number; y: number }[] = [];
  private readonly finals: { node: TreeNode; x: number; y: number }[] = [];
  private readonly hangs = new Set<TreeNode>();
  barLevel = 0;
  roomsTop = 0;
  foot = 0;
  right = 0;

  constructor(
    private readonly graph: OverviewGraph,
    private readonly tree: OverviewTree,
    private readonly content: WaysAndRooms,
  ) {
    for (const item of content.hanging) this.hangs.add(item.from);
  }

  /** Puts a part so that the terminal its feed comes to lies at (x, y). Returns its lower edge and the axis below it. */
  private hang(node: TreeNode, x: number, y: number, turn: Turn): { bottom: number; axis: number } {
    const symbol = symbolFor(node.part, 'overview');
    const size = turnedSize(symbol, turn);
    const places = Object.values(symbol.terminals).map((place) => turnedTerminal(place, symbol, turn));
    const above = places.find((place) => place.side === 'up') ?? { x: size.width / 2 };
    const below = places.find((place) => place.side === 'down') ?? above;
    this.positions.set(node.part.id, { x: x - above.x, y, ...(turn && { turn }) });
    return { bottom: y + size.height, axis: x - above.x + below.x };
  }

  /** The column from the supply down to the line bars; feeders of inverters and bars with ways are kept for later. */
  column(groupX: Map<TreeNode, number>): void {
    const { mains } = this.tree;
    if (!mains) return;
    let spds = 0;
    const leftmost = Math.min(COLUMN, ...groupX.values());
    const stack = [{ node: mains, x: COLUMN, y: MODULE }];
    for (let at = stack.pop(); at; at = stack.pop()) {
      const { node, x, y } = at;
      const { kind } = node.part;
      const isBar = kind === 'line-bar';
      if (isBar && this.hangs.has(node)) {
        this.finals.push({ node, x, y });
        // bars fed from this one lie below it
        for (const child of node.children.filter((c) => c.column))
          stack.push({ node: child, x: groupX.get(child) ?? x, y: y + m(4) });
        continue;
      }
      let level: number;
      let axis = x;
      let next: number;
      if (isBar) {
        // a bar that reaches over the bars of neutral and earth lies below them
        level = Math.max(y, leftmost < COLUMN ? this.sideBottom() : 0) + m(1);
        this.positions.set(node.part.id, { x: x - m(2), y: level - BAR_AXIS });
        next = level + m(2);
      } else {
        const hung = this.hang(node, x, y, fedFromBelow(node) ? 2 : 0);
        axis = hung.axis;
        level = hung.bottom + MODULE;
        const subs = node.children.filter((c) => c.column);
        next =
          hung.bottom +
          (subs.length > 1 ? m(2) : kind === 'supply' ? MODULE : kind === 'fuse' || kind === 'meter' ? m(2) : MODULE);
      }
      const column = node.children.filter((child) => child.column);
      const subs = column.filter((child) => !feedsInverter(child) && child.part.kind !== 'spd');
      // a bar that reaches further left than the arrester lies below it
      if (!isBar && leftmost < COLUMN && column.some((child) => child.part.kind === 'spd')) next = level + m(10);
      for (const child of column) {
        const barEnd = isBar ? Math.max(axis, ...subs.map((sub) => groupX.get(sub) ?? axis)) : axis;
        if (feedsInverter(child)) this.feeders.push({ node: child, x: barEnd, y: level });
        else if (child.part.kind === 'spd')
          this.hang(child, axis - m(10) - m(8) * spds++, level + (isBar ? m(2) : m(1)), 0);
      }
      for (const child of [...subs].reverse())
        stack.push({ node: child, x: subs.length > 1 ? (groupX.get(child) ?? axis) : axis, y: next });
    }
    if (spds > 0)
      this.barLevel = Math.max(
        this.barLevel,
        ...[...this.positions].filter(([id]) => this.graph.byId.get(id)?.kind === 'spd').map(([, p]) => p.y + m(10)),
      );
  }

  private sideTop(): number {
    const meter = [...this.positions].find(([id]) => this.graph.byId.get(id)?.kind === 'meter')?.[1];
    return meter ? meter.y + m(6) : m(6);
  }

  /** Bars of neutral and earth that stand beside the column. */
  private barsBeside(): Part[] {
    const behindBackup = this.neutralsOfBackup();
    const bars = [...this.graph.parts.values()].filter(
      (part) => (part.kind === 'neutral-bar' || part.kind === 'earth-bar') && !behindBackup.has(part.id),
    );
    return bars.sort((a, b) => Number(a.kind === 'earth-bar') - Number(b.kind === 'earth-bar'));
  }

  private hangsFrom(bar: Part): Part[] {
    return (this.graph.at.get(bar.id) ?? [])
      .map((run) => this.graph.byId.get(otherEnd(run, bar.id)[0])!)
      .filter((far) => far.kind === 'electrode' || far.kind === 'bond');
  }

  private sideBottom(): number {
    return this.barsBeside().reduce((y, bar) => y + (this.hangsFrom(bar).length > 0 ? m(9) : m(5)), this.sideTop());
  }

  /** Bars of neutral and earth beside the column; electrodes and bonds hang from the earth bar. */
  sideBars(): void {
    let y = this.sideTop();
    const x = LEFT + m(13);
    const behindBackup = this.neutralsOfBackup();
    const bars = this.barsBeside();
    for (const part of bars) {
      this.positions.set(part.id, { x, y: y - BAR_AXIS });
      const hanging = this.hangsFrom(part).filter((far) => !this.positions.has(far.id));
      hanging.forEach((far, i) => this.positions.set(far.id, { x: x + m(4) * i, y: y + m(2) }));
      y += hanging.length > 0 ? m(9) : m(5);
    }
    // room for a neutral bar and an earth bar with its electrode is kept from the first, so that they find it later
    this.barLevel = Math.max(this.barLevel, this.sideTop() + m(13), bars.length > 0 ? y - m(1) : 0);
    [...behindBackup].forEach(
      (id, i) => this.backupBoard.add(id) && this.positions.set(id, { x: LEFT + m(2) + m(48) * i, y: 0 }),
    );
  }

  /** Neutral bars that stand behind a device of an inverter's output. */
  private neutralsOfBackup(): Set<string> {
    const column = new Set<string>();
    for (const root of this.tree.backups) for (const node of walk(root)) if (node.column) column.add(node.part.id);
    return new Set([...this.graph.neutralFrom].filter(([, from]) => column.has(from)).map(([bar]) => bar));
  }

  /** Rooms side by side; the device of each way above the column it feeds. */
  rooms(names: Map<string, string>): Map<string, number> {
    const axes = new Map<string, number>();
    let x = LEFT;
    for (const { place, entries } of this.content.rooms) {
      const own = new Set(entries);
      const name = names.get(place) ?? '';
      const least = Math.ceil((textWidth(name.toUpperCase(), BODY, true) + m(2)) / MODULE) * MODULE;
      const room = placeRoom(entries, (node) => own.has(this.content.entryOf.get(node)!), Math.max(m(10), least));
      for (const [id, at] of room.positions)
        this.positions.set(id, { x: x + at.x, y: at.y, ...(at.turn && { turn: at.turn }) });
      for (const [way, axis] of room.ways) axes.set(way, x + axis);
      this.roomSpans.set(place, { x, width: room.width });
      x += room.width + ROOM.gap;
    }
    this.right = x - ROOM.gap;
    // ways that feed nothing yet stand at the end of the board
    for (const item of this.content.hanging) {
      if (axes.has(item.id)) continue;
      const used = [...axes]
        .filter(([id]) => this.content.hanging.some((h) => h.id === id && h.backup === item.backup))
        .map(([, at]) => at);
      axes.set(item.id, Math.max(LEFT + m(3), ...used.map((at) => at + WAY_PITCH)));
    }
    return axes;
  }

  /** Sets every y that depends on how far down the column came. */
  settle(axes: Map<string, number>, channel: { mains: number; backup: number }, headX: Map<string, number>): void {
    const inRooms = new Set([...this.content.entryOf.keys()].map((node) => node.part.id));
    const columnBottom = [...this.positions]
      .filter(([id]) => !inRooms.has(id) && !this.backupBoard.has(id))
      .map(([id, at]) => at.y + turnedSize(symbolFor(this.graph.byId.get(id)!, 'overview'), at.turn ?? 0).height);
    const barAsked = this.finals.map(({ y }) => y + m(1));
    this.barLevel = Math.max(this.barLevel, ...barAsked, ...columnBottom.map((y) => y + m(1)), m(4));
    // feeders and lanes reach down as far as the bar; a bar that feeds another lies higher
    for (const { node } of this.finals) {
      let rise = 0;
      for (const other of this.finals) if (other.node !== node && isAbove(node, other.node)) rise += m(3);
      const own = this.content.hanging
        .filter((item) => item.from === node)
        .map((item) => headX.get(item.id) ?? axes.get(item.id)!);
      this.positions.set(node.part.id, { x: Math.min(...own) - m(2), y: this.barLevel - rise - BAR_AXIS });
    }
    this.roomsTop = this.barLevel + BAR.rooms + channel.mains;
    for (const id of inRooms) {
      const at = this.positions.get(id);
      if (at) this.positions.set(id, { ...at, y: at.y + this.roomsTop });
    }
    this.foot = this.roomsTop + ROOM.height + channel.backup;
    for (const item of this.content.hanging) {
      if (!item.head) continue;
      const x = headX.get(item.id) ?? axes.get(item.id)!;
      if (item.backup) {
        this.backupBoard.add(item.head.part.id);
        this.hangUp(item.head, x, this.foot + FOOT.device);
      } else this.hang(item.head, x, this.barLevel + BAR.device, fedFromBelow(item.head) ? 2 : 0);
    }
  }

  /** Puts a device whose feed comes from below. */
  private hangUp(node: TreeNode, x: number, y: number): void {
    const symbol = symbolFor(node.part, 'overview');
    const turn: Turn = fedFromBelow(node) ? 0 : 2;
    const below = Object.values(symbol.terminals)
      .map((place) => turnedTerminal(place, symbol, turn))
      .find((place) => place.side === 'down');
    this.positions.set(node.part.id, { x: x - (below?.x ?? m(2)), y, ...(turn && { turn }) });
  }

  /** Inverters with their feeders, batteries and outputs, each on a level of its own at the right. */
  lanes(): void {
    let free = 0;
    const bars: { node: TreeNode; drop: number }[] = [];
    this.tree.backups.forEach((root, i) => {
      const feeder = this.feeders.find(({ node }) => [...walk(node)].some((n) => n.part.id === root.part.id));
      const out = [...walk(root)].filter((node) => node !== root && node.column);
      const inLane = out.filter((node) => !(node.part.kind === 'line-bar' && this.hangs.has(node)));
      const before = feeder ? [...walk(feeder.node)].filter((n) => n.part.kind !== 'inverter') : [];
      const battery = [...walk(this.tree.batteries[i]!)].slice(1);
      const above = m(4) + stackHeight(battery);
      const level = Math.max(feeder?.y ?? this.barLevel - m(5), free + above);
      free = level + m(5);
      // from the left: feeder's devices, inverter, output's devices
      let x = (feeder?.x ?? COLUMN) + m(22);
      for (const node of before) {
        this.lie(node, x, level);
        x += laneStep(node.part);
      }
      const outWidth = inLane.reduce((sum, node) => sum + laneStep(node.part), 0);
      // the last device ends right of the rooms, so that its run goes straight down beside them
      const last = inLane.at(-1);
      const reachOut = last ? m(10) + outWidth - laneStep(last.part) + symbolFor(last.part, 'overview').height : m(8);
      const inverterX = Math.max(x + m(13), this.right + m(1) - reachOut);
      this.positions.set(root.part.id, { x: inverterX, y: level - m(3) });
      for (const node of [root, ...battery, ...inLane]) this.lane.add(node.part.id);
      this.stackUp(battery, inverterX + m(4), level - m(3));
      let at = inverterX + m(8) + m(2);
      for (const node of inLane) {
        this.lie(node, at, level);
        at += laneStep(node.part);
      }
      const drop = inverterX + reachOut + m(1);
      this.right = Math.max(this.right, drop);
      for (const node of out) if (!inLane.includes(node)) bars.push({ node, drop });
    });
    this.backupBars(bars.map(({ node }) => node));
    this.barLevel = Math.max(this.barLevel, free);
  }

  /** A part in a horizontal line, its first terminal at the left. */
  private lie(node: TreeNode, x: number, level: number): void {
    const symbol = symbolFor(node.part, 'overview');
    if (node.part.kind === 'line-bar' || node.part.kind === 'joint') {
      const height = node.part.kind === 'joint' ? MODULE : BAR_AXIS;
      this.positions.set(node.part.id, { x, y: level - height });
      return;
    }
    const turn: Turn = fedFromBelow(node) ? 1 : 3;
    const left = Object.values(symbol.terminals)
      .map((place) => turnedTerminal(place, symbol, turn))
      .find((place) => place.side === 'left');
    this.positions.set(node.part.id, { x, y: level - (left?.y ?? m(2)), turn });
  }

  /** Fuse and battery above the inverter, each above the one before. */
  private stackUp(nodes: readonly TreeNode[], x: number, y: number): void {
    const tops = new Map<TreeNode, { x: number; top: number }>();
    let furthest = x;
    for (const node of nodes) {
      const parent = node.parent && tops.get(node.parent);
      const first = !node.parent || node.parent.children[0] === node;
      const top = parent?.top ?? y;
      const at = first ? (parent?.x ?? x) : (furthest += m(16));
      furthest = Math.max(furthest, at);
      const symbol = symbolFor(node.part, 'overview');
      // the terminal its lead comes to looks down
      const mark = nearMark(node);
      const turn: Turn = symbol.terminals[mark]?.side === 'up' ? 2 : 0;
      const own = turnedTerminal(symbol.terminals[mark] ?? { x: symbol.width / 2, y: 0, side: 'up' }, symbol, turn);
      const size = turnedSize(symbol, turn);
      this.positions.set(node.part.id, { x: at - own.x, y: top - MODULE - size.height, ...(turn && { turn }) });
      tops.set(node, { x: at, top: top - MODULE - size.height });
    }
  }

  private readonly footBars: TreeNode[] = [];
  private backupBars(nodes: readonly TreeNode[]): void {
    for (const node of nodes) {
      this.footBars.push(node);
      this.backupBoard.add(node.part.id);
    }
  }

  /** The bars of the backup along the foot, and their neutral bars below. */
  footRow(axes: Map<string, number>): void {
    this.footBars.forEach((node, i) => {
      const own = this.content.hanging.filter((item) => item.from === node).map((item) => axes.get(item.id)!);
      this.positions.set(node.part.id, {
        x: Math.min(LEFT + m(2), ...own),
        y: this.foot + FOOT.bar + m(3) * i - BAR_AXIS,
      });
    });
    const below = this.foot + (this.footBars.length > 1 ? m(3) * (this.footBars.length - 1) : 0);
    for (const id of this.backupBoard) {
      const kind = this.graph.byId.get(id)?.kind;
      const at = this.positions.get(id);
      if ((kind === 'neutral-bar' || kind === 'earth-bar') && at)
        this.positions.set(id, { ...at, y: below + FOOT.neutral - BAR_AXIS });
    }
  }

  /** What has no place yet, in rows below it all. */
  tray(parts: readonly Part[], top: number): number {
    let x = LEFT;
    let y = top;
    let row = 0;
    for (const part of parts) {
      const symbol = symbolFor(part, 'overview');
      const width =
        part.kind === 'line-bar' || part.kind === 'neutral-bar' || part.kind === 'earth-bar' ? SHORT_BAR : symbol.width;
      const words = [designation(part), ...ratingLines(part)];
      const step = Math.ceil((Math.max(width, ...words.map((word) => textWidth(word, BODY))) + m(3)) / MODULE) * MODULE;
      if (x > LEFT && x + step > Math.max(this.right, m(100))) {
        x = LEFT;
        y += row + m(6);
        row = 0;
      }
      this.positions.set(part.id, { x, y });
      row = Math.max(row, symbol.height);
      x += step;
    }
    return parts.length > 0 ? y + row + m(5) : top;
  }
}

/** True when `above` feeds `below` in the tree. */
function isAbove(above: TreeNode, below: TreeNode): boolean {
  for (let at = below.parent; at; at = at.parent) if (at === above) return true;
  return false;
}

const stackHeight = (nodes: readonly TreeNode[]): number =>
  nodes
    .filter((node) => !node.parent || node.parent.children[0] === node)
    .reduce((sum, node) => sum + symbolFor(node.part, 'overview').height + MODULE, 0);

/** What a device takes in a horizontal line: its symbol or its words, whichever is longer. */
function laneStep(part: Part): number {
  const words = [designation(part), ...ratingLines(part)];
  return (
    Math.ceil(
      Math.max(symbolFor(part, 'overview').height + m(2), ...words.map((word) => textWidth(word, BODY) + m(2))) /
        MODULE,
    ) * MODULE
  );
}

/** Devices of several bars stand in groups over the rooms, one after the other; of one bar, each over its own column. */
function groupHeads(
  hanging: readonly Hanging[],
  axes: Map<string, number>,
  right: number,
): { headX: Map<string, number>; groupX: Map<TreeNode, number>; channel: number } {
  const groups = new Map<TreeNode, Hanging[]>();
  for (const item of hanging) groups.set(item.from, [...(groups.get(item.from) ?? []), item]);
  const headX = new Map<string, number>();
  const groupX = new Map<TreeNode, number>();
  if (groups.size <= 1) return { headX, groupX, channel: 0 };
  const spans = [...groups].map(([from, items]) => {
    const xs = items.map((item) => axes.get(item.id)!);
    return { from, left: Math.min(...xs), right: Math.max(...xs) };
  });
  spans.sort((a, b) => a.left - b.left);
  if (spans.every((span, i) => i === 0 || span.left - spans[i - 1]!.right >= m(5))) {
    // each bar over its own rooms: every device stands straight above what it feeds
    // and its own device on the column's axis where that passes over it, else over its nearest way
    for (const { from, left, right: end } of spans) groupX.set(from, Math.min(Math.max(COLUMN, left), end));
    return { headX, groupX, channel: 0 };
  }
  const total = hanging.length * WAY_PITCH + (groups.size - 1) * WAY_PITCH;
  let x = LEFT + m(3) + Math.max(0, Math.floor((right - LEFT - m(6) - total) / 2 / MODULE) * MODULE);
  for (const [from, items] of groups) {
    items.sort((a, b) => axes.get(a.id)! - axes.get(b.id)!);
    const start = x;
    for (const item of items) {
      headX.set(item.id, x);
      x += WAY_PITCH;
    }
    groupX.set(from, start + Math.floor((x - WAY_PITCH - start) / 2 / MODULE) * MODULE);
    x += WAY_PITCH;
  }
  // enough rows for each cable to move sideways on a level of its own
  return { headX, groupX, channel: m(Math.min(hanging.length, 24) + 2) };
}

/** The x of every column node that leads to a group, so that its chain stands over its bar. */
function spreadGroupX(groupX: Map<TreeNode, number>): Map<TreeNode, number> {
  const all = new Map<TreeNode, number>();
  for (const [node, x] of groupX)
    for (let at: TreeNode | null = node; at; at = at.parent) if (!all.has(at)) all.set(at, x);
  return all;
}

/** Plans the overview of any document. Pure; same document, same plan. */
export function planOverview(doc: Installation): OverviewPlan {
  const graph = overviewGraph(doc);
  const places = new Map(doc.places.map((place) => [place.id, place]));
  const board = [...graph.parts.values()].find((part) => part.kind === 'supply' || part.kind === 'line-bar')?.place;
  const inRoom = (part: Part): boolean =>
    part.place !== undefined &&
    part.place !== board &&
    places.has(part.place) &&
    places.get(part.place)!.kind !== 'intake';
  const tree = overviewTree(graph, inRoom);
  const ways = findWays(doc);
  const content = waysAndRooms(doc, tree, ways);
  const planner = new Planner(graph, tree, content);
  const axes = planner.rooms(new Map(doc.places.map((place) => [place.id, place.name])));
  const mains = groupHeads(
    content.hanging.filter((item) => !item.backup),
    axes,
    planner.right,
  );
  const backup = groupHeads(
    content.hanging.filter((item) => item.backup),
    axes,
    planner.right,
  );
  planner.column(spreadGroupX(mains.groupX));
  planner.sideBars();
  planner.lanes();
  planner.settle(axes, { mains: mains.channel, backup: backup.channel }, new Map([...mains.headX, ...backup.headX]));
  planner.footRow(axes);
  const hasBackup = planner.backupBoard.size > 0;
  const bottom = planner.foot + (hasBackup ? FOOT.height : m(2));
  // what no tree and no room took
  const left = [...graph.parts.values()].filter((part) => !planner.positions.has(part.id));
  const end = planner.tray(left, bottom + m(3));
  const roomOf = new Map(
    [...content.entryOf].map(([node, entry]) => [
      node.part.id,
      content.rooms.find((room) => room.entries.includes(entry))!.place,
    ]),
  );
  return {
    positions: planner.positions,
    graph,
    tree,
    ways,
    content,
    roomOf,
    rooms: planner.roomSpans,
    lane: planner.lane,
    backupBoard: planner.backupBoard,
    tray: left,
    levels: {
      bar: planner.barLevel,
      rooms: planner.roomsTop,
      foot: planner.foot,
      bottom: left.length > 0 ? end : bottom,
    },
  };
}
