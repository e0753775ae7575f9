import { KIND_NAME } from '../../document/kinds';
import type { Installation, Place, SurveyRoom } from '../../document/schema';
import { USUAL_RUN, kindFromName } from '../../survey/columns';
import { drawnByPlace, drawnIn } from '../../survey/drawn';
import { differenceOf, type Difference } from '../../survey/missing';
import type { At } from './types';
import type { Strokes } from './drawing';

/** A room that a cable may go to: drawn, surveyed, or only typed so far. */
export interface Room {
  /** null while it is only typed */
  id: string | null;
  name: string;
  kind: SurveyRoom['kind'];
  metres: number;
  /** what the survey has and the sheet has not; null where it is not surveyed */
  lacks: Difference | null;
  row: SurveyRoom | null;
}

/** Words of the slip that are no room's name. */
const WORDS = new Set(
  [
    ...Object.values(KIND_NAME),
    'a an the to of new room whole way cable run lamps outlets fans heater appliance and with two-way pair board spare light lights landing socket sockets backup backed-up this source its own ways breaker alone closed off for one rcd bars more other bond pipe loop wire',
  ]
    .flatMap((text) => text.split(' '))
    .map((word) => word.toLowerCase()),
);

const isIntake = (doc: Installation, place: Place): boolean =>
  place.kind === 'intake' ||
  doc.parts.some((part) => part.place === place.id && (part.kind === 'inverter' || part.kind === 'meter'));

const capital = (text: string): string => text.charAt(0).toUpperCase() + text.slice(1);

/** The name of a new room in what was typed: "kitchen outlets" names a kitchen. */
export function typedRoom(typed: string): string | null {
  const words = typed
    .split(/[\s,]+/)
    .filter((word) => word !== '' && ![...WORDS].some((known) => known.startsWith(word)));
  return words.length > 0 ? capital(words.join(' ')).slice(0, 80) : null;
}

/** Rooms in the order of the survey, then others that are drawn, then the one that is typed. */
export function roomsOf(at: At): Room[] {
  const { doc } = at;
  const drawn = drawnByPlace(doc);
  const rooms: Room[] = (doc.survey ?? [])
    .filter((row) => row.name.trim() !== '' && row.kind !== 'intake')
    .map((row) => ({
      id: row.id,
      name: row.name.trim(),
      kind: row.kind,
      metres: row.run ?? USUAL_RUN,
      lacks: differenceOf(row, drawnIn(drawn, row.id)),
      row,
    }));
  const known = new Set(rooms.map((room) => room.id));
  for (const place of doc.places)
    if (!known.has(place.id) && !isIntake(doc, place) && !place.id.endsWith('.dry'))
      rooms.push({
        id: place.id,
        name: place.name,
        kind: place.sleeping ? 'sleeping' : place.kind,
        metres: USUAL_RUN,
        lacks: null,
        row: null,
      });
  const name = typedRoom(at.typed);
  if (name && !rooms.some((room) => room.name.toLowerCase().includes(name.toLowerCase())))
    rooms.push({ id: null, name, kind: kindFromName(name), metres: USUAL_RUN, lacks: null, row: null });
  return rooms;
}

/** The room as a place of the sketch. */
export function enter({ sketch, at }: Strokes, room: Room): string {
  const id = room.id ?? at.newId();
  const kind = room.kind === 'sleeping' ? 'room' : room.kind;
  return sketch.place({ id, name: room.name, kind, ...(room.kind === 'sleeping' && { sleeping: true }) });
}

/** The name of the room's switchboard: the one it has, else a new designation. */
export function boardOf({ sketch }: Strokes, place: string): string {
  for (const part of sketch.allParts())
    if (
      part.place === place &&
      part.board &&
      (part.kind === 'switch' || part.kind === 'joint' || part.kind === 'switch-2way')
    )
      return part.board;
  return sketch.nextRef('X', 11);
}

/** "the study": a room inside a sentence. */
export const theRoom = (room: Room): string =>
  room.id === null ? `a new room, ${room.name}` : `the ${room.name.charAt(0).toLowerCase()}${room.name.slice(1)}`;
