import type { Part } from '../document/schema';
import { m } from './overview-metrics';
import {
  FOOT,
  FOOT_CORE,
  FOOT_GAP,
  LEFT,
  ON_BOARD,
  TOP,
  isLongBar,
  isOpen,
  putPart,
  type PageState,
} from './connections-page-state';
import { feedsInverter, walk, type TreeNode } from './overview-tree';
import type { Hanging } from './overview-ways';

/** Below a device of the column: more where what leaves it for the bars and the arrester turns. */
const gapBelow = (part: Part): number => (part.kind === 'isolator' || part.kind === 'mcb' ? m(6) : m(3));
/** The distributor's own, over the board. */
const SERVICE: ReadonlySet<string> = new Set(['supply', 'fuse', 'meter']);
/** From one bar to the next below it. */
const BAR_PITCH = m(6);

/** The board: the column at the left, each bar over its ways, neutral and earth bars above the line bar. */
export function placeBoard(s: PageState): void {
  const roots = [...(s.plan.tree.mains ? [s.plan.tree.mains] : []), ...s.plan.tree.backups];
  const groups = new Map<TreeNode, Hanging[]>();
  for (const item of s.plan.content.hanging)
    if (item.head && s.own.has(item.head.part.id)) groups.set(item.from, [...(groups.get(item.from) ?? []), item]);
  const hasSide = s.page.parts.some((part) => part.kind === 'neutral-bar' || part.kind === 'earth-bar');
  if (groups.size === 0 && !hasSide) return;
  // devices that stand before one bar only belong over it
  const chains = new Map<TreeNode, TreeNode[]>();
  for (const from of groups.keys()) {
    const chain: TreeNode[] = [];
    for (let at = from.parent; at && at.parent && s.own.has(at.part.id); at = at.parent) {
      const branches = at.parent.children.filter(
        (child) => child.column && !feedsInverter(child) && child.part.kind !== 'spd',
      ).length;
      if (branches < 2 && chain.length === 0 && at.parent.part.kind !== 'inverter' && s.own.has(at.parent.part.id))
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
      if (!node.column || !isOpen(s, node) || inGroups.has(node) || node.part.kind === 'inverter') continue;
      if (root.part.kind === 'inverter') continue;
      if (feedsInverter(node) || node.part.kind === 'spd') side.push(node);
      else trunk.push(node);
    }
  let y: number = TOP.first - m(8);
  // the bars begin beside the first device that stands in the board: service fuse and meter stay over it
  let boardTop: number = TOP.first;
  for (const node of trunk.filter((n) => !isLongBar(n.part.kind))) {
    y = putPart(s, node.part, LEFT, y).bottom + gapBelow(node.part);
    if (SERVICE.has(node.part.kind)) boardTop = y;
  }
  const right = trunk.length > 0 ? LEFT + m(22) : LEFT;
  // rows, from above: bars of the column, devices over the bars, earth, neutral, line, ways
  const trunkBars = trunk.filter((n) => isLongBar(n.part.kind));
  const chainRows = Math.max(0, ...[...chains.values()].map((chain) => chain.length));
  const neutralOf = neutralBars(s, groups, chains);
  const above = [...s.page.parts].filter(
    (part) => part.kind === 'neutral-bar' && ![...neutralOf.values()].flat().includes(part),
  );
  let row = Math.max(TOP.first, boardTop);
  for (const part of above) {
    putPart(s, part, right, row);
    row += BAR_PITCH;
  }
  for (const node of trunkBars) {
    putPart(s, node.part, right, row);
    row += BAR_PITCH;
  }
  // feeders and arresters hang from the bars of the column at their left end
  let sideX = right + m(2);
  const chainTop = row + m(1);
  for (const node of side) sideX = putPart(s, node.part, sideX, chainTop).right + m(7);
  let x = side.length > 0 && chainRows === 0 ? right : side.length > 0 ? sideX : right;
  row = chainTop + (chainRows > 0 || side.length > 0 ? Math.max(1, chainRows) * m(13) : 0);
  const earthRow = row;
  for (const part of s.page.parts) if (part.kind === 'earth-bar') putPart(s, part, right, row);
  row += BAR_PITCH;
  const neutralRow = row;
  // a bar that serves ways of another group reaches over there: then each bar has a row of its own
  const apart = servesOthers(s, groups, neutralOf);
  const listed = [...neutralOf.values()];
  const neutralRows = Math.max(1, apart ? listed.flat().length : Math.max(...listed.map((list) => list.length), 0));
  const rowsBefore = (from: TreeNode): number =>
    apart ? [...neutralOf].slice(0, [...neutralOf.keys()].indexOf(from)).flatMap(([, list]) => list).length : 0;
  row += BAR_PITCH * neutralRows;
  const lineRow = row;
  const ways = lineRow + m(6);
  if (side.length > 0 && chainRows === 0) x = right;
  for (const [from, items] of groups) {
    const start = x;
    let cy = chainTop;
    for (const node of chains.get(from)!) cy = putPart(s, node.part, x, cy).bottom + m(4);
    (neutralOf.get(from) ?? []).forEach((part, i) =>
      putPart(s, part, start, neutralRow + BAR_PITCH * (rowsBefore(from) + i)),
    );
    if (isOpen(s, from)) putPart(s, from.part, start, lineRow);
    let slot = start + m(4);
    for (const item of [...items].sort((a, b) => a.order - b.order)) {
      const { right: end } = putPart(s, item.head!.part, slot, ways);
      slot = end + m(1) + FOOT_CORE + FOOT_GAP;
    }
    const longest = Math.max(
      0,
      ...[from.part, ...(neutralOf.get(from) ?? [])].map((part) => s.marks.get(part.id)?.length ?? 0),
    );
    const inRoom = Math.max(0, ...[from.part, ...(neutralOf.get(from) ?? [])].map((part) => ledAway(s, part)));
    x = Math.max(slot + inRoom * m(3), start + m(16), start + m(8) + longest * m(3)) + m(10);
  }
  const earths = Math.max(
    0,
    ...s.page.parts.filter((part) => part.kind === 'earth-bar').map((part) => s.marks.get(part.id)?.length ?? 0),
  );
  x = Math.max(x, right + m(12) + earths * m(3));
  for (const part of s.page.parts) {
    if (part.kind !== 'electrode' && part.kind !== 'bond') continue;
    putPart(s, part, x, earthRow + m(8));
    x += m(9);
  }
  s.bottom += FOOT.brace + m(8);
  s.x =
    x +
    m(8) +
    m(3) * Math.max(0, ...s.page.parts.filter((part) => part.kind === 'earth-bar').map((part) => ledAway(s, part)));
}

/** Cores of a bar that go to a load or joint of the same place: their terminals stand beyond those of the ways. */
function ledAway(s: PageState, bar: Part): number {
  return s.page.inner.filter(
    (wire) =>
      [wire.from[0], wire.to[0]].includes(bar.id) &&
      [wire.from[0], wire.to[0]].some((id) => id !== bar.id && !ON_BOARD.has(s.plan.graph.byId.get(id)!.kind)),
  ).length;
}

/** Neutral bars by the group whose device feeds them. */
function neutralBars(
  s: PageState,
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
    const own = s.page.parts.filter(
      (part) => part.kind === 'neutral-bar' && devices.has(s.plan.graph.neutralFrom.get(part.id) ?? ''),
    );
    found.set(
      from,
      own.filter((part) => ![...found.values()].flat().includes(part)),
    );
  }
  return found;
}

/** True when a neutral bar has a core in the cable of another group's way. */
function servesOthers(
  s: PageState,
  groups: ReadonlyMap<TreeNode, readonly Hanging[]>,
  neutralOf: ReadonlyMap<TreeNode, readonly Part[]>,
): boolean {
  const groupOf = new Map<string, TreeNode>();
  for (const [from, items] of groups) for (const item of items) groupOf.set(item.head!.part.id, from);
  for (const [from, bars] of neutralOf) for (const bar of bars) groupOf.set(bar.id, from);
  return s.page.cables.some(
    (cable) => new Set(cable.cores.flatMap((core) => groupOf.get(core.here[0]) ?? [])).size > 1,
  );
}

/** Inverter, battery and the devices between: the inverter in the middle, what it feeds below, the battery at its right. */
export function placeBackupSource(s: PageState): void {
  s.plan.tree.backups.forEach((root, i) => {
    const out = [...walk(root)].filter((node) => node.column && isOpen(s, node));
    const battery = [...walk(s.plan.tree.batteries[i]!)].slice(1).filter((node) => isOpen(s, node));
    const before = s.plan.tree.mains
      ? [...walk(s.plan.tree.mains)].filter(
          (node) => node.column && isOpen(s, node) && feedsInverter(node) && node.part.id !== root.part.id,
        )
      : [];
    if (out.length + battery.length + before.length === 0) return;
    let y: number = TOP.first;
    let right = s.x;
    for (const node of [...before, ...out]) {
      const at = putPart(s, node.part, s.x, y);
      y = at.bottom + m(5);
      right = Math.max(right, at.right);
    }
    // the fuse's lower terminal on the level of the inverter's positive one
    const level = (s.positions.get(root.part.id)?.y ?? TOP.first) - m(2);
    let bx = right + m(6);
    for (const node of battery) bx = putPart(s, node.part, bx, level).right + m(6);
    s.x = Math.max(bx, right) + m(6);
    s.bottom += FOOT.brace + m(4);
  });
}
