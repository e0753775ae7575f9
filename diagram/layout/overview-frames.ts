import type { Installation, Place, Position } from '../document/schema';
import { MODULE } from '../symbols/types';
import type { Body } from './ends';
import { BODY, textWidth } from './lettering';
import { FOOT, LEFT, ROOM, m } from './overview-metrics';
import type { OverviewPlan } from './overview-plan';
import type { Box } from './route-grid';
import type { Scene, SceneFrame } from './scene';

/** Frames, lanes and bands: they follow the parts that stand in them, wherever a person has moved those. */

/** Frames stand half a module off the grid, so that no run lies on one. */
const OFF = MODULE / 2;

/** How far the parts of a zone stand from where the plan would put them: the commonest shift. */
function shiftOf(
  plan: OverviewPlan,
  positions: ReadonlyMap<string, Position>,
  ids: Iterable<string>,
): { x: number; y: number; whole: boolean } {
  const tally = new Map<string, { x: number; y: number; count: number }>();
  let all = 0;
  for (const id of [...ids].sort()) {
    const [planned, actual] = [plan.positions.get(id), positions.get(id)];
    if (!planned || !actual) continue;
    all++;
    const [x, y] = [actual.x - planned.x, actual.y - planned.y];
    const found = tally.get(`${x} ${y}`) ?? { x, y, count: 0 };
    found.count++;
    tally.set(`${x} ${y}`, found);
  }
  const best = [...tally.values()].sort((a, b) => b.count - a.count || a.y - b.y || a.x - b.x)[0];
  return best ? { x: best.x, y: best.y, whole: best.count === all } : { x: 0, y: 0, whole: true };
}

function bounds(boxes: readonly Box[]): { left: number; right: number; top: number; bottom: number } {
  return {
    left: Math.min(...boxes.map((b) => b.x)),
    right: Math.max(...boxes.map((b) => b.x + b.width)),
    top: Math.min(...boxes.map((b) => b.y)),
    bottom: Math.max(...boxes.map((b) => b.y + b.height)),
  };
}

/** Kinds that stand in a switchboard's box. */
const BOARDED = new Set([
  'joint',
  'switch',
  'switch-2way',
  'switch-cross',
  'switch-2pole',
  'mcb',
  'rcbo',
  'rcd',
  'fuse',
  'isolator',
]);

function roomFrame(
  plan: OverviewPlan,
  positions: ReadonlyMap<string, Position>,
  bodies: ReadonlyMap<string, Body>,
  place: Place,
  ids: readonly string[],
  roomsY: number,
): SceneFrame[] {
  const shift = shiftOf(plan, positions, ids);
  const span = plan.rooms.get(place.id);
  const own = bounds(ids.map((id) => bodies.get(id)!));
  const planned = span && shift.whole ? { left: span.x + shift.x, right: span.x + shift.x + span.width } : null;
  const top = Math.min(plan.levels.rooms + roomsY, own.top - m(3));
  const bottom = Math.max(plan.levels.rooms + roomsY + ROOM.height, own.bottom + m(7));
  const name = place.name.toUpperCase();
  const left = planned?.left ?? Math.floor((own.left - ROOM.side) / MODULE) * MODULE;
  const right =
    planned?.right ??
    Math.max(Math.ceil((own.right + ROOM.side) / MODULE) * MODULE, left + textWidth(name, BODY, true) + m(2));
  const frame: SceneFrame = {
    id: `room:${place.id}`,
    kind: 'room',
    place: place.id,
    x: left + OFF,
    y: top + OFF,
    width: right - left - 2 * OFF,
    height: bottom - top - OFF,
    texts: [{ text: name, x: left + MODULE + OFF, y: bottom - MODULE, size: BODY, bold: true, spaced: true }],
  };
  const boarded = ids.filter((id) => BOARDED.has(plan.graph.byId.get(id)!.kind));
  if (boarded.length === 0) return [frame];
  const held = bounds(boarded.map((id) => bodies.get(id)!));
  const boxTop = Math.min(plan.levels.rooms + roomsY + ROOM.box + OFF, held.top - OFF);
  const boxBottom = Math.max(
    plan.levels.rooms + roomsY + ROOM.boxBottom + OFF,
    held.bottom > plan.levels.rooms + roomsY + ROOM.joints ? 0 : held.bottom + OFF,
  );
  const boards = [
    ...new Set(boarded.map((id) => plan.graph.byId.get(id)!.board).filter((board) => board !== undefined)),
  ].sort();
  const board: SceneFrame = {
    id: `board:${place.id}`,
    kind: 'switchboard',
    place: place.id,
    x: frame.x + MODULE,
    y: boxTop,
    width: frame.width - 2 * MODULE,
    height: boxBottom - boxTop,
    texts:
      boards.length === 0
        ? []
        : [
            {
              text: boards.join(', '),
              x: frame.x + frame.width - MODULE,
              y: boxTop - 120,
              size: BODY,
              tone: 'grey',
              anchor: 'end',
            },
          ],
  };
  return [frame, board];
}

/** Rooms with their switchboards, in the order of the document's places. */
export function roomFrames(
  doc: Installation,
  plan: OverviewPlan,
  positions: ReadonlyMap<string, Position>,
  bodies: ReadonlyMap<string, Body>,
): SceneFrame[] {
  const inRoom = new Map<string, string[]>();
  for (const [id, place] of plan.roomOf) inRoom.set(place, [...(inRoom.get(place) ?? []), id]);
  const { y } = shiftOf(plan, positions, plan.roomOf.keys());
  return doc.places.flatMap((place) => {
    const ids = inRoom.get(place.id);
    return ids ? roomFrame(plan, positions, bodies, place, ids, y) : [];
  });
}

export interface Levels {
  bar: number;
  rooms: number;
  foot: number;
  bottom: number;
}

/** The plan's levels, moved with the parts that stand on them. */
export function actualLevels(plan: OverviewPlan, positions: ReadonlyMap<string, Position>): Levels {
  const bars = [...plan.graph.parts.values()]
    .filter((part) => part.kind === 'line-bar' && !plan.backupBoard.has(part.id) && !plan.lane.has(part.id))
    .map((part) => part.id);
  const rooms = shiftOf(plan, positions, plan.roomOf.keys()).y;
  const foot = plan.backupBoard.size > 0 ? shiftOf(plan, positions, plan.backupBoard).y : rooms;
  return {
    bar: plan.levels.bar + (bars.length > 0 ? shiftOf(plan, positions, bars).y : rooms),
    rooms: plan.levels.rooms + rooms,
    foot: plan.levels.foot + foot,
    bottom: plan.levels.bottom + foot,
  };
}

/** Names of the bands and their upper edges, in the order of current. */
export function bands(
  plan: OverviewPlan,
  bodies: ReadonlyMap<string, Body>,
  levels: Levels,
  bottom: number,
): Scene['bands'] {
  const meter = [...plan.graph.parts.values()].find((part) => part.kind === 'meter');
  const at = meter && bodies.get(meter.id);
  const edges: [name: string, y: number][] = [
    ['SUPPLY', 0],
    ...(at
      ? ([
          ['METER', at.y - MODULE - OFF],
          ['MAIN PROTECTION', at.y + at.height + MODULE + OFF],
        ] as [string, number][])
      : []),
    ['BOARD', levels.bar - m(3) - OFF],
    ['ROOMS', levels.rooms - MODULE - OFF],
    ...(plan.backupBoard.size > 0 ? ([['BACKUP BOARD', levels.foot + MODULE + OFF]] as [string, number][]) : []),
    ...(plan.tray.length > 0
      ? ([['NOT PLACED', (plan.backupBoard.size > 0 ? levels.foot + FOOT.height : levels.foot + m(2)) + OFF]] as [
          string,
          number,
        ][])
      : []),
  ];
  const sorted = edges.filter(([, y], i) => i === 0 || y > edges[i - 1]![1]);
  return sorted.map(([name, y], i) => ({ name, y, height: (sorted[i + 1]?.[1] ?? bottom) - y }));
}

/** The ground of the backup: its source at the right, its feed down the right edge, its board along the foot. */
export function lanes(
  plan: OverviewPlan,
  bodies: ReadonlyMap<string, Body>,
  levels: Levels,
  right: number,
): SceneFrame[] {
  const source = [...plan.lane].flatMap((id) => bodies.get(id) ?? []);
  const frames: SceneFrame[] = [];
  const lane = (id: string, box: Box, texts: SceneFrame['texts'] = []): void => {
    frames.push({ id: `lane:${id}`, kind: 'lane', ...box, texts });
  };
  if (source.length === 0) return frames;
  const own = bounds(source);
  const left = own.left - m(6) - OFF;
  const low = Math.max(own.bottom + m(5), levels.bar - m(4)) + OFF;
  lane('source', { x: left, y: OFF, width: right - left, height: low - OFF }, [
    { text: 'BACKUP SOURCE', x: left + MODULE, y: m(3), size: BODY, tone: 'grey', spaced: true },
  ]);
  if (plan.backupBoard.size === 0) return frames;
  const footTop = levels.foot + MODULE + OFF;
  const edge = right - m(4);
  lane('feed', { x: edge, y: low, width: right - edge, height: Math.max(0, footTop - low) });
  lane('board', {
    x: LEFT - m(1),
    y: footTop,
    width: right - LEFT + m(1),
    height: levels.foot + FOOT.height - OFF - footTop,
  });
  return frames;
}
