import type { End, SurveyRoom } from '../../document/schema';
import { LENGTH, OUTLET_WATTS, POWER_FACTOR, START, TWO_POLE_RATINGS, ratingFor, startsMotor } from './assumptions';
import { breakerId, dryPlaceId, roomKey, wayKey } from './ids';
import { outletPattern } from './plan';
import { isBackup, runOf, type WayPlan } from './way-plan';
import { RoomBox, cableOf, type Taps } from './room-box';
import type { RunSize } from './size-run';
import type { Sketch } from './sketch';

/** The bars that a way hangs between, and where they stand. */
export interface WayBars {
  lineBar: string;
  neutralBar: string;
  earthBar: string;
  place: string;
  board: string;
  /** A, breaking capacity that the place asks for */
  icn: number;
}

/** The breaker of a way, taken from the line bar. @returns where the way's first run begins */
function startWay(sketch: Sketch, way: WayPlan, bars: WayBars): Taps {
  const id = sketch.part({
    id: breakerId(way),
    kind: 'mcb',
    label: way.label,
    place: bars.place,
    board: bars.board,
    poles: 1,
    rating: way.ratingA,
    curve: way.curve,
    icn: bars.icn,
  });
  sketch.wire(sketch.nextOn(bars.lineBar), [id, '1'], 'line');
  return { line: [id, '2'], neutral: sketch.nextOn(bars.neutralBar), earth: sketch.nextOn(bars.earthBar) };
}

/** The size of a way; a way that nothing on sale serves is drawn in the largest, and the examination says so. */
const sizeOf = (sketch: Sketch, way: WayPlan): RunSize => {
  if (way.size) return way.size;
  const largest = sketch.practice.csaMm2[sketch.practice.csaMm2.length - 1]!;
  return { csaMm2: largest, cpcMm2: sketch.practice.cpcMm2.value[largest] ?? largest, grouped: 1 };
};

function drawLamps(sketch: Sketch, way: WayPlan, from: Taps, boards: ReadonlyMap<string, string>): void {
  const size = sizeOf(sketch, way);
  let taps = from;
  way.segments.forEach((segment, i) => {
    const { room } = segment;
    const key = wayKey(way);
    const run = cableOf(sketch, `${roomKey(room)}.${key}.run`, size, i === 0 ? runOf(room) : LENGTH.roomToRoom, {
      fromBoard: i === 0,
    });
    const box = RoomBox.enter(sketch, room, boards.get(room.id)!, i === 0 ? key : `${key}.on`, size, taps, run);
    box.fill(segment, isBackup(way));
    if (i + 1 < way.segments.length) taps = box.onward();
  });
}

/** Where a room's outlets stand: in a wet room beyond its zones. */
export function outletPlace(sketch: Sketch, room: SurveyRoom): string {
  if (room.kind !== 'wet') return room.id;
  return sketch.place({ id: dryPlaceId(room), name: `${room.name.slice(0, 55)}, outside the zones`, kind: 'room' });
}

interface OutletNeed {
  id: string;
  watts: number;
  size: RunSize;
  from: Taps;
  /** m, of the cable that brings it */
  length: number;
  fromBoard: boolean;
  /** name of its box, where that is to be told from the others of the room */
  box?: string;
}

/** One more outlet of a row. @returns where the row goes on */
export function drawOutlet(sketch: Sketch, room: SurveyRoom, need: OutletNeed): Taps {
  const { id, watts, from } = need;
  const pattern = outletPattern(sketch.practice, watts, sketch.supply.voltage);
  sketch.part(
    {
      id,
      kind: 'socket',
      place: outletPlace(sketch, room),
      ...(need.box && { board: need.box }),
      rating: pattern.ratingA,
      pattern: pattern.id,
      load: watts,
    },
    sketch.nextRef('X', sketch.outletsFrom),
  );
  const cable = cableOf(sketch, `${id}.cable`, need.size, need.length, { fromBoard: need.fromBoard });
  sketch.wire(from.line, [id, 'L'], 'line', cable);
  sketch.wire(from.neutral, [id, 'N'], 'neutral', cable);
  sketch.wire(from.earth, [id, 'E'], 'earth', cable);
  return { line: [id, 'L'], neutral: [id, 'N'], earth: [id, 'E'] };
}

function drawOutlets(sketch: Sketch, way: WayPlan, from: Taps, bars: WayBars): void {
  const size = sizeOf(sketch, way);
  const { room, outlets } = way.segments[0]!;
  const breaker: End = from.line;
  let taps = from;
  outlets.forEach((number, i) => {
    const first = i === 0;
    taps = drawOutlet(sketch, room, {
      id: `${roomKey(room)}.outlet${number}`,
      watts: OUTLET_WATTS,
      size,
      from: taps,
      length: first ? runOf(room) : LENGTH.outletToOutlet,
      fromBoard: first,
    });
  });
  if (!way.ring) return;
  const back = cableOf(sketch, `${roomKey(room)}.${wayKey(way)}.back`, size, runOf(room), { fromBoard: true });
  sketch.wire(breaker, taps.line, 'line', back);
  sketch.wire(sketch.nextOn(bars.neutralBar), taps.neutral, 'neutral', back);
  sketch.wire(sketch.nextOn(bars.earthBar), taps.earth, 'earth', back);
}

function drawKeptOutlet(sketch: Sketch, way: WayPlan, from: Taps): void {
  const { room } = way.segments[0]!;
  drawOutlet(sketch, room, {
    id: `${roomKey(room)}.kept-outlet`,
    watts: room.keepOutletWatts,
    size: sizeOf(sketch, way),
    from,
    length: runOf(room),
    fromBoard: true,
    box: 'Backup outlet',
  });
}

/** A heavy appliance behind its own two-pole switch; the earth passes the switch in a joint. */
function drawHeavy(sketch: Sketch, way: WayPlan, from: Taps): void {
  const { room } = way.segments[0]!;
  const { number, what, watts } = way.heavy!;
  const size = sizeOf(sketch, way);
  const id = `${roomKey(room)}.heavy${number}`;
  const motor = startsMotor(what);
  const place = room.id;
  const control = sketch.part({
    id: `${id}.switch`,
    kind: 'switch-2pole',
    label: what,
    place,
    rating: ratingFor(way.ratingA, TWO_POLE_RATINGS),
  });
  const joint = sketch.part({ id: `${id}.e`, kind: 'joint', place }, null);
  sketch.part({
    id,
    kind: 'appliance',
    label: what,
    place,
    watts,
    pf: motor ? POWER_FACTOR.motor : POWER_FACTOR.heater,
    ...(motor && { surge: START.motor }),
    class: 1,
    fixed: true,
  });
  const run = cableOf(sketch, `${id}.run`, size, runOf(room), { fromBoard: true });
  const tail = cableOf(sketch, `${id}.tail`, size, LENGTH.switchToAppliance);
  sketch.wire(from.line, [control, '1'], 'line', run);
  sketch.wire(from.neutral, [control, '3'], 'neutral', run);
  sketch.wire(from.earth, sketch.nextOn(joint), 'earth', run);
  sketch.wire([control, '2'], [id, 'L'], 'switched', tail);
  sketch.wire([control, '4'], [id, 'N'], 'neutral', tail);
  sketch.wire(sketch.nextOn(joint), [id, 'E'], 'earth', tail);
}

/** Draws a way whole: breaker, runs, accessories, loads. @param boards name of the switchboard by room */
export function drawWay(sketch: Sketch, way: WayPlan, bars: WayBars, boards: ReadonlyMap<string, string>): void {
  const from = startWay(sketch, way, bars);
  if (way.kind === 'lamps' || way.kind === 'backup') drawLamps(sketch, way, from, boards);
  else if (way.kind === 'outlets') drawOutlets(sketch, way, from, bars);
  else if (way.kind === 'heavy') drawHeavy(sketch, way, from);
  else drawKeptOutlet(sketch, way, from);
}
