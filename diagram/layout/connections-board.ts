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
  sizeOn,
  type PageState,
} from './connections-page-state';
import { feedsInverter, walk, type TreeNode } from './overview-tree';
import type { Hanging } from './overview-ways';

/** The distributor's own, over the board. */
const SERVICE: ReadonlySet<string> = new Set(['supply', 'fuse', 'meter']);
/** From the left edge of the service to the first device of the board: the meter's name and both tails stand between. */
const BESIDE_SERVICE = m(22);
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
  const devices = trunk.filter((node) => !isLongBar(node.part.kind));
  const service = devices.filter((node) => SERVICE.has(node.part.kind));
  let y: number = TOP.first - m(8);
  for (const node of service) y = putPart(s, node.part, LEFT, y).bottom + m(3);
  // the board stands beside the distributor's own, not under it: its tails rise to the first device
  const column = service.length > 0 && service.length < devices.length ? LEFT + BESIDE_SERVICE : LEFT;
  y = column === LEFT ? y : TOP.first;
  const right = trunk.length > 0 ? column + m(24) : LEFT;
  // rows, from above: bars of the column, devices over the bars, earth, neutral, line, ways
  const trunkBars = trunk.filter((n) => isLongBar(n.part.kind));
  const chainRows = Math.max(0, ...[...chains.values()].map((chain) => chain.length));
  const neutralOf = neutralBars(s, groups, chains);
  const above = [...s.page.parts].filter(
    (part) => part.kind === 'neutral-bar' && ![...neutralOf.values()].flat().includes(part),
  );
  // bars that a device further down is fed from stand between it and the one that feeds them
  let row: number = TOP.first;
  for (const [i, node] of devices.slice(service.length).entries()) {
    const { bottom } = putPart(s, node.part, column, y);
    const between = trunkBars[0]?.parent === node && service.length + i < devices.length - 1;
    if (between) row = bottom + m(3);
    y = bottom + (between ? BAR_PITCH * (above.length + trunkBars.length) + m(4) : m(6));
  }
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
  // where the ways hang straight from the column, what feeds the backup stands beyond them
  const beyond = chainRows === 0 ? side.filter(feedsInverter) : [];
  // an arrester stands lower than what it hangs on
  const under = ({ part, parent }: TreeNode): number => {
    const above = part.kind === 'spd' && parent ? s.positions.get(parent.part.id) : undefined;
    return above ? Math.max(chainTop, above.y + sizeOn(s, parent!.part).height + m(3)) : chainTop;
  };
  let sideBottom = chainTop;
  for (const node of side) {
    if (beyond.includes(node)) continue;
    const { right: end, bottom } = putPart(s, node.part, sideX, under(node));
    sideX = end + m(7);
    sideBottom = Math.max(sideBottom, bottom + m(3));
  }
  let x = side.length > 0 && chainRows === 0 ? right : side.length > 0 ? sideX : right;
  row = Math.max(sideBottom, chainTop + (chainRows > 0 || side.length > 0 ? Math.max(1, chainRows) * m(13) : 0));
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
      slot = end + m(1) + FOOT_CORE + FOOT_GAP + (footCables(s, item.head!.part) - 1) * (2 * FOOT_CORE + FOOT_GAP + m(2));
    }
    const longest = Math.max(
      0,
      ...[from.part, ...(neutralOf.get(from) ?? [])].map((part) => s.marks.get(part.id)?.length ?? 0),
    );
    const inRoom = Math.max(0, ...[from.part, ...(neutralOf.get(from) ?? [])].map((part) => ledAway(s, part)));
    x = Math.max(slot + inRoom * m(3), start + m(16), start + m(8) + longest * m(3)) + m(10);
  }
  for (const node of beyond) x = putPart(s, node.part, x - m(6), chainTop).right + m(12);
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

/** Cables that leave the board under a device: two where its way is a ring. */
const footCables = (s: PageState, { id }: Part): number =>
  Math.max(1, s.page.cables.filter(({ atFoot, cores }) => atFoot && cores.some(({ here }) => here[0] === id)).length);

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
