import type { End } from '../../document/schema';
import {
  LENGTH,
  POWER_FACTOR,
  REGULATOR_RATINGS,
  START,
  SWITCH_RATINGS,
  TWO_POLE_RATINGS,
  ratingFor,
  startsMotor,
} from '../../survey/drafting/assumptions';
import { outletPattern } from '../../survey/drafting/plan';
import type { RunSize } from '../../survey/drafting/size-run';
import type { Strokes } from './drawing';

/** Where an accessory gets its three conductors, and where it is fixed. */
export interface Source {
  line: End;
  neutral: End;
  earth: End;
  place: string;
  board?: string;
  size: RunSize;
  /** the cable whose cores bring the conductors; absent where they come from the same box */
  run?: string;
}

const where = ({ place, board }: Pick<Source, 'place' | 'board'>) => ({ place, ...(board && { board }) });

/** The far end of a switched line: a load with its neutral and earth, by a cable of its own from the box. */
function load(s: Strokes, from: Source, line: End, part: { kind: 'lamp' | 'fan'; watts: number }): string {
  const { sketch } = s;
  const cable = s.cable(from.size, LENGTH.boxToPoint);
  const id = s.part({
    kind: part.kind,
    place: from.place,
    board: undefined,
    watts: part.watts,
    pf: POWER_FACTOR[part.kind],
    ...(part.kind === 'fan' && { surge: START.fan }),
    class: 1,
    fixed: true,
  });
  sketch.wire(line, [id, 'L'], 'switched', cable);
  sketch.wire(s.tap(from.neutral), [id, 'N'], 'neutral', cable);
  sketch.wire(s.tap(from.earth), [id, 'E'], 'earth', cable);
  return id;
}

const amps = (s: Strokes, watts: number): number => watts / s.at.doc.supply.voltage;

/** A switch and the lamp it works. @returns the switch's line side, where the line loops on */
export function switchedLamp(s: Strokes, from: Source, watts: number): { loop: End; lamp: string } {
  const rating = ratingFor(amps(s, watts), SWITCH_RATINGS, s.at.practice.draft.switchA);
  const control = s.part({ kind: 'switch', ...where(from), rating });
  s.sketch.wire(s.tap(from.line), [control, '1'], 'line', from.run);
  return { loop: [control, '1'], lamp: load(s, from, [control, '2'], { kind: 'lamp', watts }) };
}

/** A fan behind its switch and its speed regulator. */
export function regulatedFan(s: Strokes, from: Source, watts: number): { loop: End; fan: string } {
  const control = s.part({ kind: 'switch', ...where(from), rating: s.at.practice.draft.switchA });
  const regulator = s.part({ kind: 'regulator', ...where(from), rating: ratingFor(amps(s, watts), REGULATOR_RATINGS) });
  s.sketch.wire(s.tap(from.line), [control, '1'], 'line', from.run);
  s.sketch.wire([control, '2'], [regulator, '1'], 'switched');
  return { loop: [control, '1'], fan: load(s, from, [regulator, '2'], { kind: 'fan', watts }) };
}

/** A lamp worked from two places: one two-way switch here, one in a box of its own beside the lamp's other door. */
export function twoWayLamp(s: Strokes, from: Source, watts: number): { loop: End; lamp: string } {
  const rating = s.at.practice.draft.switchA;
  const near = s.part({ kind: 'switch-2way', ...where(from), rating, state: '1' });
  const box = s.sketch.nextRef('X', 11);
  const far = s.part({ kind: 'switch-2way', place: from.place, board: box, rating, state: '1' });
  s.sketch.wire(s.tap(from.line), [near, 'C'], 'line', from.run);
  const strappers = s.cable(from.size, LENGTH.roomToRoom);
  s.sketch.wire([near, '1'], [far, '1'], 'strapper', strappers);
  s.sketch.wire([near, '2'], [far, '2'], 'strapper', strappers);
  return { loop: [near, 'C'], lamp: load(s, from, [far, 'C'], { kind: 'lamp', watts }) };
}

/** An outlet on the three conductors. @returns where the row goes on */
export function outlet(s: Strokes, from: Source, watts: number): { line: End; neutral: End; earth: End } {
  const pattern = outletPattern(s.at.practice, watts, s.at.doc.supply.voltage);
  const ref = s.sketch.nextRef('X', 21);
  const id = s.part(
    { kind: 'socket', place: from.place, board: undefined, rating: pattern.ratingA, pattern: pattern.id, load: watts },
    ref,
  );
  s.sketch.wire(s.tap(from.line), [id, 'L'], 'line', from.run);
  s.sketch.wire(s.tap(from.neutral), [id, 'N'], 'neutral', from.run);
  s.sketch.wire(s.tap(from.earth), [id, 'E'], 'earth', from.run);
  return { line: [id, 'L'], neutral: [id, 'N'], earth: [id, 'E'] };
}

/** A fixed appliance behind its own two-pole switch; the earth passes the switch in a joint. */
export function fixedAppliance(s: Strokes, from: Source, what: string, watts: number): string {
  const { sketch } = s;
  const motor = startsMotor(what);
  const control = s.part({
    kind: 'switch-2pole',
    label: what,
    ...where({ place: from.place }),
    board: undefined,
    rating: ratingFor(amps(s, watts), TWO_POLE_RATINGS),
  });
  const joint = s.part({ kind: 'joint', place: from.place, board: undefined }, null);
  const id = s.part({
    kind: 'appliance',
    label: what,
    place: from.place,
    board: undefined,
    watts,
    pf: motor ? POWER_FACTOR.motor : POWER_FACTOR.heater,
    ...(motor && { surge: START.motor }),
    class: 1,
    fixed: true,
  });
  const tail = s.cable(from.size, LENGTH.switchToAppliance);
  sketch.wire(s.tap(from.line), [control, '1'], 'line', from.run);
  sketch.wire(s.tap(from.neutral), [control, '3'], 'neutral', from.run);
  sketch.wire(s.tap(from.earth), sketch.nextOn(joint), 'earth', from.run);
  sketch.wire([control, '2'], [id, 'L'], 'switched', tail);
  sketch.wire([control, '4'], [id, 'N'], 'neutral', tail);
  sketch.wire(sketch.nextOn(joint), [id, 'E'], 'earth', tail);
  return id;
}

/**
 * Brings a run into a room's switchboard: neutrals and earths meet in a joint each; the line core goes to the first
 * accessory, from which it loops on.
 */
export function intoBox(
  s: Strokes,
  from: { line: End; neutral: End; earth: End },
  place: string,
  board: string,
  size: RunSize,
  run: string,
): Source {
  const neutral = s.part({ kind: 'joint', place, board }, null);
  const earth = s.part({ kind: 'joint', place, board }, null);
  s.sketch.wire(from.neutral, s.sketch.nextOn(neutral), 'neutral', run);
  s.sketch.wire(from.earth, s.sketch.nextOn(earth), 'earth', run);
  return { line: from.line, neutral: [neutral, '1'], earth: [earth, '1'], place, board, size, run };
}
