import { isBar } from '../document/kinds';
import type { Kind, Part } from '../document/schema';
import { symbolFor } from '../symbols';
import { MODULE } from '../symbols/types';
import { CABLE_GAP, CORE_PITCH, wordsWidth } from './connections-cables';
import { COLUMN_GAP, ROW_GAP, TOP, isOpen, putPart, type PageState } from './connections-page-state';
import { coreOf } from './overview-graph';
import { m } from './overview-metrics';
import type { Entry } from './overview-rooms';
import { walk, type TreeNode } from './overview-tree';

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

/** The ways of a room side by side: those with switches or joints first, so that the switchboard is one; all loads in one row. */
export function placePageRooms(s: PageState): void {
  const entries = s.plan.content.rooms
    .flatMap((room) => room.entries)
    .map((entry) => ({
      entry,
      nodes: [...walk(entry.node)].filter((node) => isOpen(s, node) && s.plan.content.entryOf.get(node) === entry),
    }))
    .filter(({ nodes }) => nodes.length > 0);
  const joints = jointsByEntry(
    s,
    entries.map(({ nodes }) => nodes),
  );
  const blocks = entries.map(({ entry, nodes }, i) => block(s, entry, nodes, joints[i]!));
  const rank = (block: RoomBlock): number => (block.controls ? 0 : 2) + (block.way ? 0 : 1);
  blocks.sort((a, b) => rank(a) - rank(b));
  const loadsTop = Math.max(TOP.first + m(6), ...blocks.map((block) => block.loadsTop));
  for (const block of blocks) putBlock(s, block, loadsTop);
}

/** A way's part of a room: a column a load, what works it above; then the joints of its neutral and earth. */
function block(s: PageState, entry: Entry, nodes: readonly TreeNode[], joints: readonly Part[]): RoomBlock {
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

function putBlock(s: PageState, { columns, rows, joints, top }: RoomBlock, loadsTop: number): void {
  let x = s.x;
  for (const column of columns) {
    let width = 0;
    for (const node of column) {
      const row = rows.get(node)!;
      // a lamp hangs straight below the terminal that works it
      const axis = row === LOADS && column.length > 1 ? x + axisOf(s, column[0]!.part) - axisOf(s, node.part) : x;
      width = Math.max(width, putPart(s, node.part, Math.max(x, axis), row === LOADS ? loadsTop : top(row)).right - x);
    }
    x += width + (column.some((node) => node.part.kind === 'socket') ? m(5) : COLUMN_GAP);
  }
  for (const part of joints) x = putPart(s, part, x, TOP.first).right + m(4);
  // the cables that go on to other rooms leave here
  const own = new Set([...columns.flat().map((node) => node.part.id), ...joints.map((part) => part.id)]);
  for (const cable of s.page.cables)
    if (cable.outgoing && !cable.atFoot && cable.cores.some((core) => own.has(core.here[0])))
      x += Math.max(CORE_PITCH * cable.cores.length + m(2), Math.ceil(wordsWidth(cable) / MODULE) * MODULE) + CABLE_GAP;
  s.x = x + m(8);
}

function axisOf(s: PageState, part: Part): number {
  return Object.values(symbolFor(part, 'connections').terminals)[0]?.x ?? 0;
}

/** Joints of neutral and earth by entry: those that its own cable brings first, then those its parts meet. */
function jointsByEntry(s: PageState, entries: readonly (readonly TreeNode[])[]): Part[][] {
  const taken = new Set<string>();
  const found = entries.map((): Part[] => []);
  const cablesOf = (id: string): string[] =>
    s.page.cables.filter((cable) => cable.cores.some((core) => core.here[0] === id)).map((cable) => cable.id);
  const joints = s.page.parts.filter(
    (part) =>
      part.kind === 'joint' &&
      !s.positions.has(part.id) &&
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
          !s.page.inner.some(
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
      [...s.page.inner, ...s.page.cables.flatMap((c) => c.cores.map((core) => core.wire))].some(
        (wire) => (wire.from[0] === part.id || wire.to[0] === part.id) && coreOf(wire.role) === 'E',
      ),
    );
  return found.map((list) => list.sort((a, b) => isEarth(a) - isEarth(b)));
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
