import type { Place, SurveyRoom } from '../../document/schema';
import { HOUSE } from './ids';
import type { WayPlan } from './plan';
import type { Sketch } from './sketch';

const placeOf = ({ id, name, kind }: SurveyRoom): Place => ({
  id,
  name: name.trim(),
  kind: kind === 'sleeping' ? 'room' : kind,
  ...(kind === 'sleeping' && { sleeping: true }),
});

/** The rooms as places. @returns the place of the board: the survey's room for it, else one of its own */
export function drawPlaces(sketch: Sketch, rooms: readonly SurveyRoom[]): string {
  for (const room of rooms) sketch.place(placeOf(room));
  const own = rooms.find(({ kind }) => kind === 'intake');
  return own?.id ?? sketch.place({ id: HOUSE.intake, name: 'Intake', kind: 'intake' });
}

/** A switchboard a room that has switches: its name is a designation that nothing else bears. */
export function roomBoards(sketch: Sketch, ways: readonly WayPlan[]): Map<string, string> {
  const rooms = new Set(ways.filter(({ kind }) => kind === 'lamps' || kind === 'backup').flatMap(({ segments }) => segments.map(({ room }) => room)));
  const inOrder = [...rooms].sort((a, b) => a.order - b.order);
  sketch.outletsFrom = 10 * Math.ceil((BOARDS_FROM + inOrder.length - 1) / 10) + 1;
  return new Map(inOrder.map(({ id }) => [id, sketch.nextRef('X', BOARDS_FROM)]));
}

/** switchboards are X11 and on: X1 to X10 are left to bars */
export const BOARDS_FROM = 11;

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
  for (const { place, board, sides: both } of sides.values()) if (both.size === 2) sketch.notice({ place, board, text });
}
