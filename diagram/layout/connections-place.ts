import { isBar } from '../document/kinds';
import type { Installation, Kind, Part, Position } from '../document/schema';
import { symbolFor } from '../symbols';
import { barLength, type BarKind } from '../symbols/bar';
import { MODULE } from '../symbols/types';
import { coreOf } from './overview-graph';
import type { OverviewPlan } from './overview-plan';
import { m } from './overview-metrics';
import { feedsInverter, walk, type TreeNode } from './overview-tree';
import type { Entry } from './overview-rooms';
import type { Hanging } from './overview-ways';
import type { Page } from './connections-page';
import { CABLE_GAP, CORE_PITCH, wordsWidth } from './connections-cables';

/** Places the parts of one page of the connections face: boards by their bars, rooms by their ways, the loads at the foot. */

/** 1/100 mm: the brace of an arriving cable, where its cores begin, and the first row of parts below. */
export const TOP = { text: m(3), brace: m(7), cores: m(8), first: m(18) } as const;
/** Between the terminals of a way's device and its neutral and earth cores. */
export const FOOT_CORE = m(2);
/** From one way's earth core to the next way's device: its designation stands there. */
const FOOT_GAP = m(4);
/** From a device's lower edge to where its way's cable leaves, and the brace below. */
export const FOOT = { cores: m(10), brace: m(12) } as const;
const LEFT = m(11);
const ROW_GAP = m(6);
const COLUMN_GAP = m(8);

/** Used marks of each bar and joint of a document, in number order: it is drawn with these and one free. */
export function usedMarks(doc: Installation): Map<string, string[]> {
  const marks = new Map<string, Set<string>>();
  for (const wire of doc.wires)
    for (const [id, mark] of [wire.from, wire.to]) {
      const set = marks.get(id) ?? new Set();
      if (/^[1-9]\d{0,3}$/.test(mark)) set.add(mark);
      marks.set(id, set);
    }
  return new Map([...marks].map(([id, set]) => [id, [...set].sort((a, b) => Number(a) - Number(b))]));
}

/** Kinds that stand on a board, over or under its bars. */
export const ON_BOARD: ReadonlySet<Kind> = new Set<Kind>([
  'supply',
  'meter',
  'isolator',
  'mcb',
  'rcd',
  'rcbo',
  'fuse',
  'spd',
  'changeover',
  'inverter',
  'electrode',
  'bond',
]);

export const isLongBar = (kind: Kind): boolean => isBar(kind) && kind !== 'joint';

/** The size of a part on this face; a bar's length follows from its conductors and is given by the scene. */
export function sizeOf(part: Part, marks: ReadonlyMap<string, readonly string[]>): { width: number; height: number } {
  const symbol = symbolFor(part, 'connections', marks.get(part.id)?.length);
  return isBar(part.kind)
    ? { width: barLength(part.kind as BarKind, Math.max(2, marks.get(part.id)?.length ?? 2)), height: symbol.height }
    : { width: symbol.width, height: symbol.height };
}

/** One way's part of a room, before it has a place. */
interface RoomBlock {
  columns: TreeNode[][];
  rows: ReadonlyMap<TreeNode, number>;
  joints: readonly Part[];
  top: (row: number) => number;
  /** has switches or joints: stands in the switchboard */
  controls: boolean;
  /** upper edge of its loads as its own rows ask for; 0 where nothing does */
  loadsTop: number;
  /** its cable comes straight from a board */
  way: boolean;
}

class PagePlanner {
  readonly positions = new Map<string, Position>();
  private readonly marks: ReadonlyMap<string, readonly string[]>;
  private readonly own: ReadonlySet<string>;
  private x = LEFT;
  private bottom: number = TOP.first;

  constructor(
    private readonly doc: Installation,
    private readonly plan: OverviewPlan,
    private readonly page: Page,
  ) {
    this.marks = usedMarks(doc);
    this.own = new Set(page.parts.map((part) => part.id));
  }

  run(): Map<string, Position> {
    this.board();
    this.lane();
    this.rooms();
    this.rest();
    return this.positions;
  }

  private size(part: Part): { width: number; height: number } {
    return sizeOf(part, this.marks);
  }

  private put(part: Part, x: number, y: number): { right: number; bottom: number } {
    this.positions.set(part.id, { x, y });
    const { width, height } = this.size(part);
    this.bottom = Math.max(this.bottom, y + height);
    return { right: x + width, bottom: y + height };
  }

  private here(node: TreeNode): boolean {
    return this.own.has(node.part.id) && !this.positions.has(node.part.id);
  }

  /** The board: the column at the left, each bar over its ways, neutral and earth bars above the line bar. */
  private board(): void {
    const roots = [...(this.plan.tree.mains ? [this.plan.tree.mains] : []), ...this.plan.tree.backups];
    const groups = new Map<TreeNode, Hanging[]>();
    for (const item of this.plan.content.hanging)
      if (item.head && this.own.has(item.head.part.id)) groups.set(item.from, [...(groups.get(item.from) ?? []), item]);
    const hasSide = this.page.parts.some((part) => part.kind === 'neutral-bar' || part.kind === 'earth-bar');
    if (groups.size === 0 && !hasSide) return;
    // devices that stand before one bar only belong over it
    const chains = new Map<TreeNode, TreeNode[]>();
    for (const from of groups.keys()) {
      const chain: TreeNode[] = [];
      for (let at = from.parent; at && at.parent && this.own.has(at.part.id); at = at.parent) {
        const branches = at.parent.children.filter(
          (child) => child.column && !feedsInverter(child) && child.part.kind !== 'spd',
        ).length;
        if (branches < 2 && chain.length === 0 && at.parent.part.kind !== 'inverter' && this.own.has(at.parent.part.id))
          break;
        if (isLongBar(at.part.kind)) break;
        chain.unshift(at);
        if (branches >= 2) break;
      }
      chains.set(from, chain);
    }
    const inGroups = new Set([...groups.keys(), ...[...chains.values()].flat()]);
    const trunk: TreeNode[] = [];
    const side: TreeNode[] = [];
    for (const root of roots)
      for (const node of walk(root)) {
        if (!node.column || !this.here(node) || inGroups.has(node) || node.part.kind === 'inverter') continue;
        if (root.part.kind === 'inverter') continue;
        if (feedsInverter(node) || node.part.kind === 'spd') side.push(node);
        else trunk.push(node);
      }
    let y: number = TOP.first - m(8);
    for (const node of trunk.filter((n) => !isLongBar(n.part.kind)))
      y = this.put(node.part, LEFT, y).bottom + (node.part.kind === 'supply' ? m(3) : m(4));
    const trunkBottom = y;
    const right = trunk.length > 0 ? LEFT + m(22) : LEFT;
    // rows, from above: bars of the column, devices over the bars, earth, neutral, line, ways
    const trunkBars = trunk.filter((n) => isLongBar(n.part.kind));
    const chainRows = Math.max(0, ...[...chains.values()].map((chain) => chain.length));
    const neutralOf = this.neutralBars(groups, chains);
    const above = [...this.page.parts].filter(
      (part) => part.kind === 'neutral-bar' && ![...neutralOf.values()].flat().includes(part),
    );
    const sideRow = side.length > 0 ? m(16) : 0;
    let row = Math.max(TOP.first, trunkBottom - m(6) - (above.length + trunkBars.length) * m(6) - sideRow);
    for (const part of above) {
      this.put(part, right, row);
      row += m(6);
    }
    for (const node of trunkBars) {
      this.put(node.part, right, row);
      row += m(6);
    }
    // feeders and arresters hang from the bars of the column at their left end
    let sideX = right + m(2);
    const chainTop = row + m(1);
    for (const node of side) sideX = this.put(node.part, sideX, chainTop).right + m(7);
    let x = side.length > 0 && chainRows === 0 ? right : side.length > 0 ? sideX : right;
    row = chainTop + (chainRows > 0 || side.length > 0 ? Math.max(1, chainRows) * m(14) : 0);
    const earthRow = row;
    for (const part of this.page.parts) if (part.kind === 'earth-bar') this.put(part, right, row);
    row += m(6);
    const neutralRow = row;
    // a bar that serves ways of another group reaches over there: then each bar has a row of its own
    const apart = this.servesOthers(groups, neutralOf);
    const listed = [...neutralOf.values()];
    const neutralRows = Math.max(1, apart ? listed.flat().length : Math.max(...listed.map((list) => list.length), 0));
    const rowsBefore = (from: TreeNode): number =>
      apart ? [...neutralOf].slice(0, [...neutralOf.keys()].indexOf(from)).flatMap(([, list]) => list).length : 0;
    row += m(6) * neutralRows;
    const lineRow = row;
    const ways = lineRow + m(7);
    if (side.length > 0 && chainRows === 0) x = right;
    for (const [from, items] of groups) {
      const start = x;
      let cy = chainTop;
      for (const node of chains.get(from)!) cy = this.put(node.part, x, cy).bottom + m(4);
      (neutralOf.get(from) ?? []).forEach((part, i) =>
        this.put(part, start, neutralRow + m(6) * (rowsBefore(from) + i)),
      );
      if (this.here(from)) this.put(from.part, start, lineRow);
      let slot = start + m(4);
      for (const item of [...items].sort((a, b) => a.order - b.order)) {
        const { right: end } = this.put(item.head!.part, slot, ways);
        slot = end + m(1) + FOOT_CORE + FOOT_GAP;
      }
      const longest = Math.max(
        0,
        ...[from.part, ...(neutralOf.get(from) ?? [])].map((part) => this.marks.get(part.id)?.length ?? 0),
      );
      const inRoom = Math.max(0, ...[from.part, ...(neutralOf.get(from) ?? [])].map((part) => this.ledAway(part)));
      x = Math.max(slot + inRoom * m(3), start + m(16), start + m(8) + longest * m(3)) + m(10);
    }
    const earths = Math.max(
      0,
      ...this.page.parts
        .filter((part) => part.kind === 'earth-bar')
        .map((part) => this.marks.get(part.id)?.length ?? 0),
    );
    x = Math.max(x, right + m(12) + earths * m(3));
    for (const part of this.page.parts) {
      if (part.kind !== 'electrode' && part.kind !== 'bond') continue;
      this.put(part, x, earthRow + m(8));
      x += m(9);
    }
    this.bottom += FOOT.brace + m(8);
    this.x =
      x +
      m(8) +
      m(3) *
        Math.max(0, ...this.page.parts.filter((part) => part.kind === 'earth-bar').map((part) => this.ledAway(part)));
  }

  /** Cores of a bar that go to a load or joint of the same place: their terminals stand beyond those of the ways. */
  private ledAway(bar: Part): number {
    return this.page.inner.filter(
      (wire) =>
        [wire.from[0], wire.to[0]].includes(bar.id) &&
        [wire.from[0], wire.to[0]].some((id) => id !== bar.id && !ON_BOARD.has(this.plan.graph.byId.get(id)!.kind)),
    ).length;
  }

  /** Neutral bars by the group whose device feeds them. */
  private neutralBars(
    groups: ReadonlyMap<TreeNode, unknown>,
    chains: ReadonlyMap<TreeNode, readonly TreeNode[]>,
  ): Map<TreeNode, Part[]> {
    const found = new Map<TreeNode, Part[]>();
    for (const from of groups.keys()) {
      const devices = new Set<string>();
      for (let at: TreeNode | null = from; at; at = at.parent) {
        devices.add(at.part.id);
        if (at !== from && (chains.get(from)!.length === 0 || at === chains.get(from)![0]) && !isLongBar(at.part.kind))
          break;
      }
      const own = this.page.parts.filter(
        (part) => part.kind === 'neutral-bar' && devices.has(this.plan.graph.neutralFrom.get(part.id) ?? ''),
      );
      found.set(
        from,
        own.filter((part) => ![...found.values()].flat().includes(part)),
      );
    }
    return found;
  }

  /** True when a neutral bar has a core in the cable of another group's way. */
  private servesOthers(
    groups: ReadonlyMap<TreeNode, readonly Hanging[]>,
    neutralOf: ReadonlyMap<TreeNode, readonly Part[]>,
  ): boolean {
    const groupOf = new Map<string, TreeNode>();
    for (const [from, items] of groups) for (const item of items) groupOf.set(item.head!.part.id, from);
    for (const [from, bars] of neutralOf) for (const bar of bars) groupOf.set(bar.id, from);
    return this.page.cables.some(
      (cable) => new Set(cable.cores.flatMap((core) => groupOf.get(core.here[0]) ?? [])).size > 1,
    );
  }

  /** Inverter, battery and the devices between: the inverter in the middle, what it feeds below, the battery at its right. */
  private lane(): void {
    this.plan.tree.backups.forEach((root, i) => {
      const out = [...walk(root)].filter((node) => node.column && this.here(node));
      const battery = [...walk(this.plan.tree.batteries[i]!)].slice(1).filter((node) => this.here(node));
      const before = this.plan.tree.mains
        ? [...walk(this.plan.tree.mains)].filter(
            (node) => node.column && this.here(node) && feedsInverter(node) && node.part.id !== root.part.id,
          )
        : [];
      if (out.length + battery.length + before.length === 0) return;
      let y: number = TOP.first;
      let right = this.x;
      for (const node of [...before, ...out]) {
        const at = this.put(node.part, this.x, y);
        y = at.bottom + m(5);
        right = Math.max(right, at.right);
      }
      // the fuse's lower terminal on the level of the inverter's positive one
      const level = (this.positions.get(root.part.id)?.y ?? TOP.first) - m(2);
      let bx = right + m(6);
      for (const node of battery) bx = this.put(node.part, bx, level).right + m(6);
      this.x = Math.max(bx, right) + m(6);
      this.bottom += FOOT.brace + m(4);
    });
  }

  /** The ways of a room side by side: those with switches or joints first, so that the switchboard is one; all loads in one row. */
  private rooms(): void {
    const entries = this.plan.content.rooms
      .flatMap((room) => room.entries)
      .map((entry) => ({
        entry,
        nodes: [...walk(entry.node)].filter((node) => this.here(node) && this.plan.content.entryOf.get(node) === entry),
      }))
      .filter(({ nodes }) => nodes.length > 0);
    const joints = this.jointsByEntry(entries.map(({ nodes }) => nodes));
    const blocks = entries.map(({ entry, nodes }, i) => this.block(entry, nodes, joints[i]!));
    const rank = (block: RoomBlock): number => (block.controls ? 0 : 2) + (block.way ? 0 : 1);
    blocks.sort((a, b) => rank(a) - rank(b));
    const loadsTop = Math.max(TOP.first + m(6), ...blocks.map((block) => block.loadsTop));
    for (const block of blocks) this.putBlock(block, loadsTop);
  }

  /** A way's part of a room: a column a load, what works it above; then the joints of its neutral and earth. */
  private block(entry: Entry, nodes: readonly TreeNode[], joints: readonly Part[]): RoomBlock {
    const columns: TreeNode[][] = [];
    const columnOf = new Map<TreeNode, TreeNode[]>();
    const rows = new Map<TreeNode, number>();
    for (const node of nodes) {
      const parent = node.parent && rows.has(node.parent) ? node.parent : null;
      const looped = parent !== null && leavesWhereFed(parent, node);
      const first = parent !== null && parent.children.find((child) => rows.has(child) || child === node) === node;
      const row = rowOf(node, parent === null || looped ? -1 : rows.get(parent)!);
      const share = parent !== null && first && !looped && row > rows.get(parent)!;
      const column = share ? columnOf.get(parent)! : [];
      if (!share) columns.push(column);
      column.push(node);
      columnOf.set(node, column);
      rows.set(node, row);
    }
    const control = [...rows.values()].filter((row) => row < LOADS);
    const hasRail = joints.length > 0 || control.includes(0);
    const most = Math.max(0, ...control);
    const top = (row: number): number =>
      TOP.first + (row > 0 && hasRail ? m(8) : 0) + Math.max(0, row - 1) * (m(10) + ROW_GAP);
    const controls = control.length > 0 || joints.length > 0;
    const loadsTop = controls
      ? top(Math.max(1, most + 1)) + m(4) + Math.min(12, joints.length * 2 + nodes.length) * MODULE
      : 0;
    return { columns, rows, joints, top, controls, loadsTop, way: entry.way !== undefined };
  }

  private putBlock({ columns, rows, joints, top }: RoomBlock, loadsTop: number): void {
    let x = this.x;
    for (const column of columns) {
      let width = 0;
      for (const node of column) {
        const row = rows.get(node)!;
        // a lamp hangs straight below the terminal that works it
        const axis = row === LOADS && column.length > 1 ? x + this.axisOf(column[0]!.part) - this.axisOf(node.part) : x;
        width = Math.max(width, this.put(node.part, Math.max(x, axis), row === LOADS ? loadsTop : top(row)).right - x);
      }
      x += width + (column.some((node) => node.part.kind === 'socket') ? m(5) : COLUMN_GAP);
    }
    for (const part of joints) x = this.put(part, x, TOP.first).right + m(4);
    // the cables that go on to other rooms leave here
    const own = new Set([...columns.flat().map((node) => node.part.id), ...joints.map((part) => part.id)]);
    for (const cable of this.page.cables)
      if (cable.outgoing && !cable.atFoot && cable.cores.some((core) => own.has(core.here[0])))
        x +=
          Math.max(CORE_PITCH * cable.cores.length + m(2), Math.ceil(wordsWidth(cable) / MODULE) * MODULE) + CABLE_GAP;
    this.x = x + m(8);
  }

  private axisOf(part: Part): number {
    return Object.values(symbolFor(part, 'connections').terminals)[0]?.x ?? 0;
  }

  /** Joints of neutral and earth by entry: those that its own cable brings first, then those its parts meet. */
  private jointsByEntry(entries: readonly (readonly TreeNode[])[]): Part[][] {
    const taken = new Set<string>();
    const found = entries.map((): Part[] => []);
    const cablesOf = (id: string): string[] =>
      this.page.cables.filter((cable) => cable.cores.some((core) => core.here[0] === id)).map((cable) => cable.id);
    const joints = this.page.parts.filter(
      (part) =>
        part.kind === 'joint' &&
        !this.positions.has(part.id) &&
        !entries.some((nodes) => nodes.some((node) => node.part.id === part.id)),
    );
    entries.forEach((nodes, i) => {
      const own = new Set(nodes.flatMap((node) => cablesOf(node.part.id)));
      for (const joint of joints)
        if (!taken.has(joint.id) && cablesOf(joint.id).some((cable) => own.has(cable))) {
          taken.add(joint.id);
          found[i]!.push(joint);
        }
    });
    entries.forEach((nodes, i) => {
      const reached = new Set([...nodes.map((node) => node.part.id), ...found[i]!.map((part) => part.id)]);
      for (let grew = true; grew;) {
        grew = false;
        for (const joint of joints) {
          if (
            taken.has(joint.id) ||
            !this.page.inner.some(
              (wire) =>
                (wire.from[0] === joint.id && reached.has(wire.to[0])) ||
                (wire.to[0] === joint.id && reached.has(wire.from[0])),
            )
          )
            continue;
          taken.add(joint.id);
          reached.add(joint.id);
          found[i]!.push(joint);
          grew = true;
        }
      }
    });
    const isEarth = (part: Part): number =>
      Number(
        [...this.page.inner, ...this.page.cables.flatMap((c) => c.cores.map((core) => core.wire))].some(
          (wire) => (wire.from[0] === part.id || wire.to[0] === part.id) && coreOf(wire.role) === 'E',
        ),
      );
    return found.map((list) => list.sort((a, b) => isEarth(a) - isEarth(b)));
  }

  /** What nothing leads to, in rows below all else. */
  private rest(): void {
    let x = LEFT;
    let y = this.positions.size > 0 ? this.bottom + m(8) : TOP.first;
    let row = 0;
    for (const part of this.page.parts) {
      if (this.positions.has(part.id)) continue;
      const { width, height } = this.size(part);
      if (x > LEFT && x + width > m(170)) {
        x = LEFT;
        y += row + m(8);
        row = 0;
      }
      this.put(part, x, y);
      row = Math.max(row, height);
      x += width + m(8);
    }
  }
}

/** Loads stand in the last row. */
const LOADS = 1000;
const ROW: Partial<Record<Kind, number>> = { joint: 0, regulator: 2 };
const LOAD_KINDS: ReadonlySet<Kind> = new Set<Kind>(['lamp', 'fan', 'appliance', 'socket', 'plug']);

const rowOf = (node: TreeNode, above: number): number =>
  LOAD_KINDS.has(node.part.kind) ? LOADS : above >= LOADS ? 1 : Math.max(ROW[node.part.kind] ?? 1, above + 1);

/** True when a child hangs on the very terminal that feeds its parent: a loop from one to the next. */
function leavesWhereFed(parent: TreeNode, child: TreeNode): boolean {
  const at = (node: TreeNode): string => (node.via!.from[0] === parent.part.id ? node.via!.from[1] : node.via!.to[1]);
  return parent.via !== null && !isBar(parent.part.kind) && at(parent) === at(child);
}

/** Positions of all parts of a page that the layout would choose. */
export const planPage = (doc: Installation, plan: OverviewPlan, page: Page): Map<string, Position> =>
  new PagePlanner(doc, plan, page).run();
