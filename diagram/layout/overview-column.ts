import type { Part } from '../document/schema';
import { BAR_AXIS } from '../symbols/bar';
import { MODULE } from '../symbols/types';
import { otherEnd } from './overview-graph';
import { COLUMN, LEFT, m } from './overview-metrics';
import { fedFromBelow, hang, type PlanState } from './overview-plan-state';
import { feedsInverter, walk, type TreeNode } from './overview-tree';

/** The column from the supply to the line bars, and the bars of neutral and earth beside it. */

/** The column from the supply down to the line bars; feeders of inverters and bars with ways are kept for later. */
export function placeColumn(s: PlanState, groupX: Map<TreeNode, number>): void {
  const { mains } = s.tree;
  if (!mains) return;
  let spds = 0;
  const leftmost = Math.min(COLUMN, ...groupX.values());
  const stack = [{ node: mains, x: COLUMN, y: MODULE }];
  for (let at = stack.pop(); at; at = stack.pop()) {
    const { node, x, y } = at;
    const { kind } = node.part;
    const isBar = kind === 'line-bar';
    if (isBar && s.hangs.has(node)) {
      s.finals.push({ node, x, y });
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
      level = Math.max(y, leftmost < COLUMN ? sideBottom(s) : 0) + m(1);
      s.positions.set(node.part.id, { x: x - m(2), y: level - BAR_AXIS });
      next = level + m(2);
    } else {
      const hung = hang(s, node, x, y, fedFromBelow(node) ? 2 : 0);
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
      if (feedsInverter(child)) s.feeders.push({ node: child, x: barEnd, y: level });
      else if (child.part.kind === 'spd')
        hang(s, child, axis - m(10) - m(8) * spds++, level + (isBar ? m(2) : m(1)), 0);
    }
    for (const child of [...subs].reverse())
      stack.push({ node: child, x: subs.length > 1 ? (groupX.get(child) ?? axis) : axis, y: next });
  }
  if (spds > 0)
    s.barLevel = Math.max(
      s.barLevel,
      ...[...s.positions].filter(([id]) => s.graph.byId.get(id)?.kind === 'spd').map(([, p]) => p.y + m(10)),
    );
}

function sideTop(s: PlanState): number {
  const meter = [...s.positions].find(([id]) => s.graph.byId.get(id)?.kind === 'meter')?.[1];
  return meter ? meter.y + m(6) : m(6);
}

/** Bars of neutral and earth that stand beside the column. */
function barsBeside(s: PlanState): Part[] {
  const behindBackup = neutralsOfBackup(s);
  const bars = [...s.graph.parts.values()].filter(
    (part) => (part.kind === 'neutral-bar' || part.kind === 'earth-bar') && !behindBackup.has(part.id),
  );
  return bars.sort((a, b) => Number(a.kind === 'earth-bar') - Number(b.kind === 'earth-bar'));
}

function hangsFrom(s: PlanState, bar: Part): Part[] {
  return (s.graph.at.get(bar.id) ?? [])
    .map((run) => s.graph.byId.get(otherEnd(run, bar.id)[0])!)
    .filter((far) => far.kind === 'electrode' || far.kind === 'bond');
}

function sideBottom(s: PlanState): number {
  return barsBeside(s).reduce((y, bar) => y + (hangsFrom(s, bar).length > 0 ? m(9) : m(5)), sideTop(s));
}

/** Bars of neutral and earth beside the column; electrodes and bonds hang from the earth bar. */
export function placeSideBars(s: PlanState): void {
  let y = sideTop(s);
  const x = LEFT + m(13);
  const behindBackup = neutralsOfBackup(s);
  const bars = barsBeside(s);
  for (const part of bars) {
    s.positions.set(part.id, { x, y: y - BAR_AXIS });
    const hanging = hangsFrom(s, part).filter((far) => !s.positions.has(far.id));
    hanging.forEach((far, i) => s.positions.set(far.id, { x: x + m(4) * i, y: y + m(2) }));
    y += hanging.length > 0 ? m(9) : m(5);
  }
  // room for a neutral bar and an earth bar with its electrode is kept from the first, so that they find it later
  s.barLevel = Math.max(s.barLevel, sideTop(s) + m(13), bars.length > 0 ? y - m(1) : 0);
  [...behindBackup].forEach(
    (id, i) => s.backupBoard.add(id) && s.positions.set(id, { x: LEFT + m(2) + m(48) * i, y: 0 }),
  );
}

/** Neutral bars that stand behind a device of an inverter's output. */
function neutralsOfBackup(s: PlanState): Set<string> {
  const column = new Set<string>();
  for (const root of s.tree.backups) for (const node of walk(root)) if (node.column) column.add(node.part.id);
  return new Set([...s.graph.neutralFrom].filter(([, from]) => column.has(from)).map(([bar]) => bar));
}
