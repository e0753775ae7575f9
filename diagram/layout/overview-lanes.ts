import type { Part } from '../document/schema';
import { symbolFor } from '../symbols';
import { BAR_AXIS } from '../symbols/bar';
import { turnedSize, turnedTerminal, type Turn } from '../symbols/turn';
import { MODULE } from '../symbols/types';
import { BODY, textWidth } from './lettering';
import { COLUMN, m } from './overview-metrics';
import { fedFromBelow, nearMark, type PlanState } from './overview-plan-state';
import { walk, type TreeNode } from './overview-tree';
import { designation, ratingLines } from './wording';

/** The lane of the backup source: inverters with their feeders, batteries and outputs, each on a level of its own. */

/** Inverters with their feeders, batteries and outputs, each on a level of its own at the right. */
export function placeLanes(s: PlanState): void {
  let free = 0;
  const bars: { node: TreeNode; drop: number }[] = [];
  s.tree.backups.forEach((root, i) => {
    const feeder = s.feeders.find(({ node }) => [...walk(node)].some((n) => n.part.id === root.part.id));
    const out = [...walk(root)].filter((node) => node !== root && node.column);
    const inLane = out.filter((node) => !(node.part.kind === 'line-bar' && s.hangs.has(node)));
    const before = feeder ? [...walk(feeder.node)].filter((n) => n.part.kind !== 'inverter') : [];
    const battery = [...walk(s.tree.batteries[i]!)].slice(1);
    const above = m(4) + stackHeight(battery);
    const level = Math.max(feeder?.y ?? s.barLevel - m(5), free + above);
    free = level + m(5);
    // from the left: feeder's devices, inverter, output's devices
    let x = (feeder?.x ?? COLUMN) + m(22);
    for (const node of before) {
      lie(s, node, x, level);
      x += laneStep(node.part);
    }
    const outWidth = inLane.reduce((sum, node) => sum + laneStep(node.part), 0);
    // the last device ends right of the rooms, so that its run goes straight down beside them
    const last = inLane.at(-1);
    const reachOut = last ? m(10) + outWidth - laneStep(last.part) + symbolFor(last.part, 'overview').height : m(8);
    const inverterX = Math.max(x + m(13), s.right + m(1) - reachOut);
    s.positions.set(root.part.id, { x: inverterX, y: level - m(3) });
    for (const node of [root, ...battery, ...inLane]) s.lane.add(node.part.id);
    stackUp(s, battery, inverterX + m(4), level - m(3));
    let at = inverterX + m(8) + m(2);
    for (const node of inLane) {
      lie(s, node, at, level);
      at += laneStep(node.part);
    }
    const drop = inverterX + reachOut + m(1);
    s.right = Math.max(s.right, drop);
    for (const node of out) if (!inLane.includes(node)) bars.push({ node, drop });
  });
  backupBars(
    s,
    bars.map(({ node }) => node),
  );
  s.barLevel = Math.max(s.barLevel, free);
}

/** A part in a horizontal line, its first terminal at the left. */
function lie(s: PlanState, node: TreeNode, x: number, level: number): void {
  const symbol = symbolFor(node.part, 'overview');
  if (node.part.kind === 'line-bar' || node.part.kind === 'joint') {
    const height = node.part.kind === 'joint' ? MODULE : BAR_AXIS;
    s.positions.set(node.part.id, { x, y: level - height });
    return;
  }
  const turn: Turn = fedFromBelow(node) ? 1 : 3;
  const left = Object.values(symbol.terminals)
    .map((place) => turnedTerminal(place, symbol, turn))
    .find((place) => place.side === 'left');
  s.positions.set(node.part.id, { x, y: level - (left?.y ?? m(2)), turn });
}

/** Fuse and battery above the inverter, each above the one before. */
function stackUp(s: PlanState, nodes: readonly TreeNode[], x: number, y: number): void {
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
    s.positions.set(node.part.id, { x: at - own.x, y: top - MODULE - size.height, ...(turn && { turn }) });
    tops.set(node, { x: at, top: top - MODULE - size.height });
  }
}

function backupBars(s: PlanState, nodes: readonly TreeNode[]): void {
  for (const node of nodes) {
    s.footBars.push(node);
    s.backupBoard.add(node.part.id);
  }
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
