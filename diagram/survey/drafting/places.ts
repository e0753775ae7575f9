import type { Place, SurveyRoom } from '../../document/schema';
import { HOUSE } from './ids';
import type { WayPlan } from './way-plan';
import type { Sketch } from './sketch';

const placeOf = ({ id, name, kind }: SurveyRoom): Place => ({
  id,
  name: name.trim(),
  kind: kind === 'sleeping' ? 'room' : kind,
  ...(kind === 'sleeping' && { sleeping: true }),
});

/** The rooms as places. @returns the place of the board: where it stands already, the survey's room for it, else one of its own */
export function drawPlaces(sketch: Sketch, rooms: readonly SurveyRoom[]): string {
  for (const room of rooms) sketch.place(placeOf(room));
  const drawn = sketch.find(HOUSE.mainSwitch)?.place;
  const own = drawn ?? rooms.find(({ kind }) => kind === 'intake')?.id;
  return own ?? sketch.place({ id: HOUSE.intake, name: 'Intake', kind: 'intake' });
}

/** A switchboard a room that has switches: its name is a designation that nothing else bears. Those that are drawn keep theirs. */
export function roomBoards(sketch: Sketch, rooms: readonly SurveyRoom[]): Map<string, string> {
  const boards = new Map<string, string>();
  for (const part of sketch.allParts())
    if (part.kind === 'switch' && part.place !== undefined && part.board !== undefined && !boards.has(part.place))
      boards.set(part.place, part.board);
  for (const { id } of rooms) if (!boards.has(id)) boards.set(id, sketch.nextRef('X', BOARDS_FROM));
  const last = Math.max(BOARDS_FROM, ...[...boards.values()].map((board) => Number(/^X(\d+)$/.exec(board)?.[1] ?? 0)));
  sketch.outletsFrom = Math.max(sketch.outletsFrom, 10 * Math.ceil(last / 10) + 1);
  return boards;
}

/** The rooms that ways bring switches to, in the order of the table. */
export function roomsWithSwitches(ways: readonly WayPlan[]): SurveyRoom[] {
  const rooms = ways
    .filter(({ kind }) => kind === 'lamps' || kind === 'backup')
    .flatMap(({ segments }) => segments.map(({ room }) => room));
  return [...new Map(rooms.map((room) => [room.id, room])).values()].sort((a, b) => a.order - b.order);
}

/** switchboards are X11 and on: X1 to X10 are left to bars */
const BOARDS_FROM = 11;

/** Switchboards in which conductors of both sources lie, the boards of the house included, each with its warning. */
export function drawNotices(sketch: Sketch, intake: string, boards: readonly string[], source: string): void {
  const text = `Two supplies: mains and ${source}. Switch off both, lock off, prove dead.`;
  for (const board of boards) sketch.notice({ place: intake, board, text });
  const sides = new Map<string, { place: string; board: string; sides: Set<boolean> }>();
  for (const part of sketch.allParts()) {
    if (part.kind !== 'joint' || !part.place || !part.board) continue;
    const key = `${part.place} ${part.board}`;
    const found = sides.get(key) ?? { place: part.place, board: part.board, sides: new Set() };
    found.sides.add(part.id.includes('.backup'));
    sides.set(key, found);
  }
  for (const { place, board, sides: both } of sides.values())
    if (both.size === 2) sketch.notice({ place, board, text });
}
