import type { End } from '../../document/schema';
import { LENGTH, OUTLET_WATTS } from '../../survey/drafting/assumptions';
import { USUAL_WATTS } from '../../survey/columns';
import { fixedAppliance, intoBox, outlet, regulatedFan, switchedLamp, twoWayLamp, type Source } from './assemblies';
import { Strokes, sizeHere, sizeWords } from './drawing';
import { boardOf, enter, roomsOf, theRoom } from './rooms';
import type { At, Recipe, Suggestion } from './types';

/** What is hung on a line that has reached a room. */

const inRoom = (at: At): boolean =>
  at.conductor === 'L' &&
  !at.switched &&
  at.part.place !== undefined &&
  ['switch', 'switch-2way', 'joint', 'socket'].includes(at.part.kind);

const watts = (value: number) => ({ id: 'watts', label: 'load', unit: 'W', value, least: 1, most: 20_000 });

interface Line {
  id: string;
  what: string;
  reason: string;
  watts: number;
  draw(s: Strokes, from: Source, watts: number): End;
}

const LINES: readonly Line[] = [
  {
    id: 'lamp',
    what: 'switch and lamp',
    reason: 'the line loops on from here',
    watts: USUAL_WATTS.lamp,
    draw: (s, from, w) => switchedLamp(s, from, w).loop,
  },
  {
    id: 'fan',
    what: 'fan with regulator',
    reason: 'switch, regulator and fan in a row',
    watts: USUAL_WATTS.fan,
    draw: (s, from, w) => regulatedFan(s, from, w).loop,
  },
  {
    id: 'two-way',
    what: 'two-way landing light',
    reason: 'a lamp worked from two places',
    watts: USUAL_WATTS.lamp,
    draw: (s, from, w) => twoWayLamp(s, from, w).loop,
  },
  {
    id: 'outlet',
    what: 'outlet',
    reason: 'on the same way',
    watts: OUTLET_WATTS,
    draw: (s, from, w) => outlet(s, { ...from, run: s.cable(from.size, LENGTH.outletToOutlet) }, w).line,
  },
  {
    id: 'appliance',
    what: 'appliance with two-pole switch',
    reason: 'fixed, with its own isolation',
    watts: 1000,
    draw: (s, from, w) => [fixedAppliance(s, from, 'appliance', w), 'L'],
  },
];

/** In a row of outlets the next outlet comes first; at a switch the next lamp. */
const order = (at: At): readonly Line[] =>
  at.part.kind === 'socket' ? [LINES[3]!, ...LINES.filter((line) => line.id !== 'outlet')] : LINES;

function sourceAt(s: Strokes): Source | null {
  const { at } = s;
  const neutral = s.neutral();
  if (!neutral || !at.part.place) return null;
  const board = at.part.kind === 'socket' ? undefined : at.part.board;
  return {
    line: at.end,
    neutral,
    earth: s.earth(),
    place: at.part.place,
    ...(board && { board }),
    size: sizeHere(at, 'lighting'),
  };
}

export const pointsInRoom: Recipe = function* (at) {
  if (!inRoom(at) || !at.feed.N) return;
  const size = sizeHere(at, 'lighting');
  let rank = 10;
  for (const line of order(at))
    yield {
      id: line.id,
      what: line.what,
      detail: `${sizeWords(size)}, ${line.watts} W`,
      reason: line.reason,
      assembly: line.id !== 'outlet',
      rank: rank++,
      values: [watts(line.watts)],
      counts: [],
      place(choice) {
        const s = new Strokes(at);
        const next = line.draw(s, sourceAt(s)!, choice.watts ?? line.watts);
        return s.command(`Place ${line.what}`, next);
      },
    };
};

/** The same way goes on to the next room: board to board, as a loop. */
export const onToNextRoom: Recipe = function* (at) {
  if (!inRoom(at) || !at.feed.N || at.part.kind === 'socket') return;
  let rank = 20;
  for (const room of roomsOf(at)) {
    if (room.id === at.part.place) continue;
    const size = sizeHere(at, 'lighting');
    const lamps = room.lacks?.lamps ?? 0;
    yield {
      id: `on ${room.id ?? room.name}`,
      what: `loop on to ${theRoom(room)}, lamps`,
      detail: `${sizeWords(size)}, ${LENGTH.roomToRoom} m`,
      reason: lamps > 0 ? `the survey has ${lamps} there not yet drawn` : 'the same way serves both rooms',
      newRoom: room.id === null,
      assembly: true,
      rank: rank++ - (lamps > 0 ? 5 : 0),
      values: [
        { id: 'metres', label: 'run', unit: 'm', value: LENGTH.roomToRoom, least: 1, most: 200 },
        watts(USUAL_WATTS.lamp),
      ],
      counts: [{ id: 'lamps', label: 'switch and lamp', count: Math.max(1, lamps), most: 8 }],
      place(choice) {
        const s = new Strokes(at);
        const place = enter(s, room);
        const from = { line: s.tap(at.end), neutral: s.neutral()!, earth: s.earth() };
        const run = s.cable(size, choice.metres ?? LENGTH.roomToRoom);
        let source = intoBox(s, from, place, boardOf(s, place), size, run);
        for (let n = 0; n < Math.max(1, choice.lamps ?? Math.max(1, lamps)); n++)
          source = { ...source, line: switchedLamp(s, source, choice.watts ?? USUAL_WATTS.lamp).loop, run: undefined };
        return s.command(`Loop on to the ${room.name.toLowerCase()}`, source.line);
      },
    } satisfies Suggestion;
  }
};
