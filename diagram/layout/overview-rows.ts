import type { Part } from '../document/schema';
import { SHORT_BAR, symbolFor } from '../symbols';
import { BAR_AXIS } from '../symbols/bar';
import { turnedSize, turnedTerminal, type Turn } from '../symbols/turn';
import { MODULE } from '../symbols/types';
import { BODY, textWidth } from './lettering';
import { BAR, FOOT, LEFT, ROOM, WAY_PITCH, m } from './overview-metrics';
import { fedFromBelow, hang, type PlanState } from './overview-plan-state';
import { placeRoom } from './overview-rooms';
import type { TreeNode } from './overview-tree';
import { designation, ratingLines } from './wording';

/** Rooms under the bars, the devices of their ways, the backup board at the foot, and what has no place yet. */

/** Rooms side by side; the device of each way above the column it feeds. */
export function placeRooms(s: PlanState, names: Map<string, string>): Map<string, number> {
  const axes = new Map<string, number>();
  let x = LEFT;
  for (const { place, entries } of s.content.rooms) {
    const own = new Set(entries);
    const name = names.get(place) ?? '';
    const least = Math.ceil((textWidth(name.toUpperCase(), BODY, true) + m(2)) / MODULE) * MODULE;
    const room = placeRoom(entries, (node) => own.has(s.content.entryOf.get(node)!), Math.max(m(10), least));
    for (const [id, at] of room.positions)
      s.positions.set(id, { x: x + at.x, y: at.y, ...(at.turn && { turn: at.turn }) });
    for (const [way, axis] of room.ways) axes.set(way, x + axis);
    s.roomSpans.set(place, { x, width: room.width });
    x += room.width + ROOM.gap;
  }
  s.right = x - ROOM.gap;
  // ways that feed nothing yet stand at the end of the board
  for (const item of s.content.hanging) {
    if (axes.has(item.id)) continue;
    const used = [...axes]
      .filter(([id]) => s.content.hanging.some((h) => h.id === id && h.backup === item.backup))
      .map(([, at]) => at);
    axes.set(item.id, Math.max(LEFT + m(3), ...used.map((at) => at + WAY_PITCH)));
  }
  return axes;
}

/** Sets every y that depends on how far down the column came. */
export function settleLevels(
  s: PlanState,
  axes: Map<string, number>,
  channel: { mains: number; backup: number },
  headX: Map<string, number>,
): void {
  const inRooms = new Set([...s.content.entryOf.keys()].map((node) => node.part.id));
  const columnBottom = [...s.positions]
    .filter(([id]) => !inRooms.has(id) && !s.backupBoard.has(id))
    .map(([id, at]) => at.y + turnedSize(symbolFor(s.graph.byId.get(id)!, 'overview'), at.turn ?? 0).height);
  const barAsked = s.finals.map(({ y }) => y + m(1));
  s.barLevel = Math.max(s.barLevel, ...barAsked, ...columnBottom.map((y) => y + m(1)), m(4));
  // feeders and lanes reach down as far as the bar; a bar that feeds another lies higher
  for (const { node } of s.finals) {
    let rise = 0;
    for (const other of s.finals) if (other.node !== node && isAbove(node, other.node)) rise += m(3);
    const own = s.content.hanging
      .filter((item) => item.from === node)
      .map((item) => headX.get(item.id) ?? axes.get(item.id)!);
    s.positions.set(node.part.id, { x: Math.min(...own) - m(2), y: s.barLevel - rise - BAR_AXIS });
  }
  s.roomsTop = s.barLevel + BAR.rooms + channel.mains;
  for (const id of inRooms) {
    const at = s.positions.get(id);
    if (at) s.positions.set(id, { ...at, y: at.y + s.roomsTop });
  }
  s.foot = s.roomsTop + ROOM.height + channel.backup;
  for (const item of s.content.hanging) {
    if (!item.head) continue;
    const x = headX.get(item.id) ?? axes.get(item.id)!;
    if (item.backup) {
      s.backupBoard.add(item.head.part.id);
      hangUp(s, item.head, x, s.foot + FOOT.device);
    } else hang(s, item.head, x, s.barLevel + BAR.device, fedFromBelow(item.head) ? 2 : 0);
  }
}

/** Puts a device whose feed comes from below. */
function hangUp(s: PlanState, node: TreeNode, x: number, y: number): void {
  const symbol = symbolFor(node.part, 'overview');
  const turn: Turn = fedFromBelow(node) ? 0 : 2;
  const below = Object.values(symbol.terminals)
    .map((place) => turnedTerminal(place, symbol, turn))
    .find((place) => place.side === 'down');
  s.positions.set(node.part.id, { x: x - (below?.x ?? m(2)), y, ...(turn && { turn }) });
}

/** The bars of the backup along the foot, and their neutral bars below. */
export function placeFoot(s: PlanState, axes: Map<string, number>): void {
  s.footBars.forEach((node, i) => {
    const own = s.content.hanging.filter((item) => item.from === node).map((item) => axes.get(item.id)!);
    s.positions.set(node.part.id, {
      x: Math.min(LEFT + m(2), ...own),
      y: s.foot + FOOT.bar + m(3) * i - BAR_AXIS,
    });
  });
  const below = s.foot + (s.footBars.length > 1 ? m(3) * (s.footBars.length - 1) : 0);
  for (const id of s.backupBoard) {
    const kind = s.graph.byId.get(id)?.kind;
    const at = s.positions.get(id);
    if ((kind === 'neutral-bar' || kind === 'earth-bar') && at)
      s.positions.set(id, { ...at, y: below + FOOT.neutral - BAR_AXIS });
  }
}

/** What has no place yet, in rows below it all. */
export function placeTray(s: PlanState, parts: readonly Part[], top: number): number {
  let x = LEFT;
  let y = top;
  let row = 0;
  for (const part of parts) {
    const symbol = symbolFor(part, 'overview');
    const width =
      part.kind === 'line-bar' || part.kind === 'neutral-bar' || part.kind === 'earth-bar' ? SHORT_BAR : symbol.width;
    const words = [designation(part), ...ratingLines(part)];
    const step = Math.ceil((Math.max(width, ...words.map((word) => textWidth(word, BODY))) + m(3)) / MODULE) * MODULE;
    if (x > LEFT && x + step > Math.max(s.right, m(100))) {
      x = LEFT;
      y += row + m(6);
      row = 0;
    }
    s.positions.set(part.id, { x, y });
    row = Math.max(row, symbol.height);
    x += step;
  }
  return parts.length > 0 ? y + row + m(5) : top;
}

/** True when `above` feeds `below` in the tree. */
function isAbove(above: TreeNode, below: TreeNode): boolean {
  for (let at = below.parent; at; at = at.parent) if (at === above) return true;
  return false;
}
