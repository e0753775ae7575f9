import type { Installation, Part, Position } from '../document/schema';
import { findWays, type Way } from '../terminals/ways';
import { placeColumn, placeSideBars } from './overview-column';
import { overviewGraph, type OverviewGraph } from './overview-graph';
import { groupHeads, spreadGroupX } from './overview-groups';
import { placeLanes } from './overview-lanes';
import { FOOT, m } from './overview-metrics';
import { startPlan } from './overview-plan-state';
import { placeFoot, placeRooms, placeTray, settleLevels } from './overview-rows';
import { overviewTree, type OverviewTree } from './overview-tree';
import { perDocument } from './per-document';
import { waysAndRooms, type WaysAndRooms } from './overview-ways';

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

/** Plans the overview of any document. Pure; same document, same plan. */
export const planOverview = perDocument((doc: Installation): OverviewPlan => {
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
  const planner = startPlan(graph, tree, content);
  const axes = placeRooms(planner, new Map(doc.places.map((place) => [place.id, place.name])));
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
  placeColumn(planner, spreadGroupX(mains.groupX));
  placeSideBars(planner);
  placeLanes(planner);
  settleLevels(
    planner,
    axes,
    { mains: mains.channel, backup: backup.channel },
    new Map([...mains.headX, ...backup.headX]),
  );
  placeFoot(planner, axes);
  const hasBackup = planner.backupBoard.size > 0;
  const bottom = planner.foot + (hasBackup ? FOOT.height : m(2));
  // what no tree and no room took
  const left = [...graph.parts.values()].filter((part) => !planner.positions.has(part.id));
  const end = placeTray(planner, left, bottom + m(3));
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
});
