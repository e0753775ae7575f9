import type { End } from '../../document/schema';
import { OUTLET_WATTS } from '../../survey/drafting/assumptions';
import { USUAL_WATTS } from '../../survey/columns';
import { fixedAppliance, intoBox, outlet, regulatedFan, switchedLamp, type Source } from './assemblies';
import { Strokes, deviceBefore, draftFor, sizeFor, sizeWords, type Use } from './drawing';
import { boardOf, enter, roomsOf, theRoom, type Room } from './rooms';
import type { At, Choice, Count, Recipe, Suggestion, Value } from './types';

/** A cable to a room, from a breaker that is drawn or with a new one from the bar. */

interface Kind {
  id: string;
  use: Use;
  what: string;
  counts(room: Room): Count[];
  values: Value[];
  watts(choice: Choice): number;
  lacks(room: Room): string | null;
  habit: string;
  fill(s: Strokes, box: (board: boolean) => Source, choice: Choice, what: string): End;
}

const metres = (room: Room): Value => ({
  id: 'metres',
  label: 'run',
  unit: 'm',
  value: room.metres,
  least: 1,
  most: 200,
});
const each = (what: string, watts: number): Value => ({
  id: 'watts',
  label: what,
  unit: 'W',
  value: watts,
  least: 1,
  most: 20_000,
});

const counted = (n: number, what: string): string => `${n} ${what}${n === 1 ? '' : 's'}`;

const LAMPS: Kind = {
  id: 'lamps',
  use: 'lighting',
  what: 'lamps',
  counts: (room) => [
    { id: 'lamps', label: 'switch and lamp', count: Math.max(1, room.lacks?.lamps ?? 1), most: 8 },
    { id: 'fans', label: 'fan, regulator', count: room.lacks?.fans ?? 0, most: 4 },
  ],
  values: [each('each lamp', USUAL_WATTS.lamp)],
  watts: (choice) => choice.lamps! * choice.watts! + choice.fans! * USUAL_WATTS.fan,
  lacks: ({ lacks }) =>
    lacks && lacks.lamps > 0 ? `the survey has ${counted(lacks.lamps, 'lamp')} there not yet drawn` : null,
  habit: 'switches in one box, each with its lamp',
  fill(s, box, choice) {
    let source = box(true);
    let end: End = source.line;
    const loopOn = (loop: End) => {
      end = loop;
      source = { ...source, line: loop, run: undefined };
    };
    for (let n = 0; n < choice.lamps!; n++) loopOn(switchedLamp(s, source, choice.watts!).loop);
    for (let n = 0; n < choice.fans!; n++) loopOn(regulatedFan(s, source, USUAL_WATTS.fan).loop);
    return end;
  },
};

const OUTLETS: Kind = {
  id: 'outlets',
  use: 'outlets',
  what: 'outlets',
  counts: (room) => [{ id: 'outlets', label: 'outlet', count: Math.max(1, room.lacks?.outlets ?? 1), most: 10 }],
  values: [each('assumed at each', OUTLET_WATTS)],
  watts: (choice) => choice.outlets! * choice.watts!,
  lacks: ({ lacks }) =>
    lacks && lacks.outlets > 0 ? `the survey has ${counted(lacks.outlets, 'outlet')} there not yet drawn` : null,
  habit: 'looped from one outlet to the next',
  fill(s, box, choice) {
    let source = box(false);
    for (let n = 0; n < Math.max(1, choice.outlets!); n++) {
      const end = outlet(s, source, choice.watts!);
      source = { ...source, ...end, run: s.at.newId() };
      if (n + 1 < choice.outlets!) source.run = s.cable(source.size, 4);
    }
    return source.line;
  },
};

const heavy = (what: string, watts: number, lacking: boolean): Kind => ({
  id: `heavy-${what}`,
  use: 'heavy',
  what,
  counts: () => [],
  values: [each(what, watts)],
  watts: (choice) => choice.watts!,
  lacks: () => (lacking ? `the survey has ${what} there not yet drawn` : null),
  habit: 'behind its own two-pole switch',
  fill: (s, box, choice) => [fixedAppliance(s, box(false), what, choice.watts!), 'L'],
});

const kindsFor = (room: Room): Kind[] => {
  const missing = room.lacks?.heavy ?? [];
  return [
    LAMPS,
    OUTLETS,
    ...missing.map(({ what, watts }) => heavy(what, watts, true)),
    ...(missing.length === 0 ? [heavy('heater', 2000, false)] : []),
  ];
};

const isEmpty = (room: Room): boolean =>
  room.lacks === null || room.lacks.lamps + room.lacks.fans + room.lacks.outlets + room.lacks.heavy.length > 0;

/** Draws what stands in the room behind a breaker's outgoing terminal. */
function fillRoom(
  s: Strokes,
  room: Room,
  kind: Kind,
  line: End,
  device: { ratingA: number; curve: 'B' | 'C' | 'D' },
  choice: Choice,
): End {
  const place = enter(s, room);
  const size = sizeFor(s.at, kind.use, device, kind.watts(choice), choice.metres!);
  const run = s.cable(size, choice.metres!, { fromBoard: true });
  const neutral = s.neutral();
  if (!neutral) throw new Error('a way needs a neutral');
  const from = { line, neutral, earth: s.earth() };
  const box = (board: boolean): Source =>
    board ? intoBox(s, from, place, boardOf(s, place), size, run) : { ...from, place, size, run };
  return kind.fill(s, box, choice, kind.what);
}

const defaults = (values: readonly Value[], counts: readonly Count[]): Choice =>
  Object.fromEntries([
    ...values.map((value) => [value.id, value.value]),
    ...counts.map((count) => [count.id, count.count]),
  ]);

function line(at: At, room: Room, kind: Kind, index: number, newBreaker: boolean): Suggestion {
  const draft = draftFor(at, kind.use);
  const counts = kind.counts(room);
  const values = [metres(room), ...kind.values];
  const device = (choice: Choice) => {
    if (!newBreaker) return deviceBefore(at, kind.use);
    const amps = kind.watts(choice) / at.doc.supply.voltage;
    const ratingA =
      at.practice.breakerRatingsA.value.find((rating) => rating >= amps && rating >= draft.ratingA) ?? draft.ratingA;
    return { ratingA, curve: draft.curve };
  };
  const usual = defaults(values, counts);
  const size = sizeFor(at, kind.use, device(usual), kind.watts(usual), room.metres);
  const lacks = kind.lacks(room);
  const breaker = newBreaker ? `${device(usual).curve}${device(usual).ratingA}, ` : '';
  const reason = lacks ?? (isEmpty(room) ? kind.habit : 'the room has all that the survey asks for');
  const back = at.backup ? ', stays on in an outage' : '';
  return {
    id: `${newBreaker ? 'way' : 'cable'} ${room.id ?? room.name} ${kind.id}`,
    what: `${newBreaker ? 'way' : 'cable'} to ${theRoom(room)}, ${kind.what}`,
    detail: `${breaker}${sizeWords(size)}, ${room.metres} m`,
    reason: `${reason}${back}`,
    newRoom: room.id === null,
    assembly: newBreaker || counts.some((count) => count.most > 1),
    rank: (newBreaker ? 20 : 10) + index / 100 - (lacks ? 8 : 0) + (isEmpty(room) ? 0 : 5),
    values,
    counts,
    place(choice) {
      const s = new Strokes(at);
      const chosen = { ...usual, ...choice };
      const { ratingA, curve } = device(chosen);
      let from = at.end;
      if (newBreaker) {
        const label = `${room.name} ${kind.what}`.slice(0, 80);
        const id = s.part({ kind: 'mcb', label, poles: 1, rating: ratingA, curve, icn: at.practice.draft.icnA });
        s.sketch.wire(s.tap(at.end), [id, '1'], 'line');
        from = [id, '2'];
      } else nameBreaker(s, room, kind);
      const next = fillRoom(s, room, kind, newBreaker ? from : s.tap(from), { ratingA, curve }, chosen);
      return s.command(
        `Place ${newBreaker ? 'a way' : 'a cable'} to the ${room.name.toLowerCase()}, ${kind.what}`,
        next,
      );
    },
  };
}

/** A breaker without a label is called after the first thing it feeds. */
function nameBreaker(s: Strokes, room: Room, kind: Kind): void {
  const device = s.at.part;
  if ((device.kind === 'mcb' || device.kind === 'rcbo') && !device.label)
    s.sketch.change<'mcb'>(device.id, { label: `${room.name} ${kind.what}`.slice(0, 80) });
}

function* toRooms(at: At, newBreaker: boolean): Iterable<Suggestion> {
  if (!at.feed.N) return;
  let index = 0;
  for (const room of roomsOf(at)) for (const kind of kindsFor(room)) yield line(at, room, kind, index++, newBreaker);
}

/** From a bar: a whole way, breaker and all. */
export const waysFromBar: Recipe = (at) =>
  at.part.kind === 'line-bar' && at.conductor === 'L' ? toRooms(at, true) : [];

/** From a breaker's outgoing terminal: the cable and what stands at its end. */
export const cablesFromBreaker: Recipe = (at) =>
  (at.part.kind === 'mcb' || at.part.kind === 'rcbo') && at.mark === '2' && at.conductor === 'L'
    ? toRooms(at, false)
    : [];
