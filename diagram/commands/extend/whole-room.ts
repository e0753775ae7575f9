import { applyPatch, diff } from '../../document/patch';
import type { SurveyRoom } from '../../document/schema';
import { USUAL_WATTS, emptyRoom } from '../../survey/columns';
import { draftPatch } from '../../survey/draft';
import { nextOrder } from '../../survey/parse';
import { withPlaces } from '../place-new';
import { roomsOf, type Room } from './rooms';
import type { At, Choice, Count, Recipe } from './types';

/** A room with all that it holds, drawn as the survey would draw it and written into the survey as well. */

const hasBackup = (at: At): boolean => at.doc.parts.some((part) => part.kind === 'inverter');

function countsFor(at: At, room: Room): Count[] {
  const row = room.row;
  const backup = hasBackup(at);
  return [
    { id: 'lamps', label: 'lamp', count: row?.lamps ?? 2, most: 12 },
    { id: 'fans', label: 'fan, regulator', count: row?.fans ?? 1, most: 4 },
    { id: 'outlets', label: 'outlet', count: row?.outlets ?? 3, most: 12 },
    ...(backup || row?.keepLamps || row?.keepFans
      ? [
          { id: 'keepLamps', label: 'lamp, backup', count: row?.keepLamps ?? 1, most: 12 },
          { id: 'keepFans', label: 'fan, backup', count: row?.keepFans ?? 1, most: 4 },
        ]
      : []),
  ];
}

function rowFor(at: At, room: Room, choice: Choice): SurveyRoom {
  const base = room.row ?? {
    ...emptyRoom(room.id ?? at.newId(), nextOrder(at.doc.survey ?? [])),
    name: room.name,
    kind: room.kind,
    lampWatts: USUAL_WATTS.lamp,
  };
  const lamps = choice.lamps ?? base.lamps;
  const fans = choice.fans ?? base.fans;
  return {
    ...base,
    lamps,
    fans,
    outlets: choice.outlets ?? base.outlets,
    keepLamps: Math.min(lamps, choice.keepLamps ?? base.keepLamps),
    keepFans: Math.min(fans, choice.keepFans ?? base.keepFans),
  };
}

export const wholeRooms: Recipe = function* (at) {
  const atBoard = at.part.kind === 'line-bar' || (at.part.kind === 'mcb' && at.mark === '2');
  if (!atBoard || at.conductor !== 'L') return;
  let rank = 30;
  for (const room of roomsOf(at)) {
    const undrawn =
      room.lacks === null || room.lacks.lamps + room.lacks.fans + room.lacks.outlets + room.lacks.heavy.length > 0;
    const drawnAlready = room.id !== null && room.lacks === null;
    if (!undrawn || drawnAlready) continue;
    const counts = countsFor(at, room);
    const usual = Object.fromEntries(counts.map((count) => [count.id, count.count]));
    yield {
      id: `room ${room.id ?? room.name}`,
      what: `${room.id === null ? room.name : room.name.toLowerCase()}, a whole room`,
      detail: counts
        .filter((count) => count.count > 0 && !count.id.startsWith('keep'))
        .map((count) => `${count.count} ${count.label.split(',')[0]}${count.count === 1 ? '' : 's'}`)
        .join(', '),
      reason: room.row
        ? 'all that the survey has there'
        : `switchboard, switches, ways${hasBackup(at) ? ', both feeds' : ''}`,
      newRoom: room.id === null,
      assembly: true,
      rank: rank++ - (room.row ? 5 : 0),
      values: [],
      counts,
      place(choice) {
        const row = rowFor(at, room, { ...usual, ...choice });
        // Only this room is drafted: rows that wait elsewhere in the survey stay as they are.
        const alone = { ...at.doc, survey: [row] };
        const drawn = { ...applyPatch(alone, draftPatch(alone, at.hoursWanted)) };
        const survey = [...(at.doc.survey ?? []).filter((other) => other.id !== row.id), row];
        const patch = diff(at.doc, applyPatch({ ...drawn, survey }, {}));
        return { label: `Draw the ${room.name.toLowerCase()} whole`, patch: withPlaces(at.doc, patch), next: at.end };
      },
    };
  }
};
