import { MODULE } from '../symbols/types';
import { COLUMN, LEFT, WAY_PITCH, m } from './overview-metrics';
import type { TreeNode } from './overview-tree';
import type { Hanging } from './overview-ways';

/** Several line bars: where the devices of each stand, and the chain that feeds it. */

/** Devices of several bars stand in groups over the rooms, one after the other; of one bar, each over its own column. */
export function groupHeads(
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
export function spreadGroupX(groupX: Map<TreeNode, number>): Map<TreeNode, number> {
  const all = new Map<TreeNode, number>();
  for (const [node, x] of groupX)
    for (let at: TreeNode | null = node; at; at = at.parent) if (!all.has(at)) all.set(at, x);
  return all;
}
