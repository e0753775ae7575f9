import type { End, SurveyRoom } from '../../document/schema';
import { LENGTH, POWER_FACTOR, REGULATOR_RATINGS, START, SWITCH_RATINGS, ratingFor } from './assumptions';
import { roomKey } from './ids';
import type { Segment } from './way-plan';
import type { RunSize } from './size-run';
import type { Sketch } from './sketch';

/** Where the conductors of a way can be taken on from. */
export interface Taps {
  line: End;
  neutral: End;
  earth: End;
}

const MOST_SWITCHES = 4;

/** Lamps by switch: each its own while there are few, else pairs and more in rows. */
function byRow(lamps: readonly number[], pairs: boolean): number[][] {
  const rows = Math.min(MOST_SWITCHES, pairs ? Math.ceil(lamps.length / 2) : lamps.length);
  return Array.from({ length: rows }, (_, row) =>
    lamps.slice(Math.floor((row * lamps.length) / rows), Math.floor(((row + 1) * lamps.length) / rows)),
  );
}

/** Draws cables of a way in its size; runs from the board are grouped with those that leave it together. */
export function cableOf(
  sketch: Sketch,
  id: string,
  size: RunSize,
  length: number,
  options: { cores?: number; fromBoard?: boolean } = {},
): string {
  const { draft } = sketch.practice;
  return sketch.cable({
    id: sketch.freeId(id),
    csa: size.csaMm2,
    cpc: size.cpcMm2,
    material: draft.material,
    insulation: draft.insulation,
    method: draft.method,
    length,
    ...(options.fromBoard && size.grouped > 1 && { grouped: size.grouped }),
    cores: options.cores ?? 3,
  });
}

/**
 * The part of one way in one room's switchboard: the line loops from switch to switch, neutrals and earths meet in a joint
 * each. No terminal of an accessory takes more than two conductors.
 */
export class RoomBox {
  private readonly key: string;

  private constructor(
    private readonly sketch: Sketch,
    private readonly room: SurveyRoom,
    private readonly board: string,
    private readonly size: RunSize,
    private line: End,
    private readonly neutral: string,
    private readonly earth: string,
    /** the run whose line core ends at the first switch; undefined once the line loops on inside the box */
    private run: string | undefined,
  ) {
    this.key = roomKey(room);
  }

  /** Brings a run into the room's switchboard. @param way what the joints are called after: `lamps1` */
  static enter(
    sketch: Sketch,
    room: SurveyRoom,
    board: string,
    way: string,
    size: RunSize,
    from: Taps,
    run: string,
  ): RoomBox {
    const joint = (what: string) =>
      sketch.part({ id: sketch.freeId(`${roomKey(room)}.${way}.${what}`), kind: 'joint', place: room.id, board }, null);
    const neutral = joint('n');
    const earth = joint('e');
    sketch.wire(from.neutral, sketch.nextOn(neutral), 'neutral', run);
    sketch.wire(from.earth, sketch.nextOn(earth), 'earth', run);
    return new RoomBox(sketch, room, board, size, from.line, neutral, earth, run);
  }

  /** The box of a way that is drawn already, to hang more on it. @param line a terminal on the way's unswitched line */
  static reopen(
    sketch: Sketch,
    room: SurveyRoom,
    board: string,
    size: RunSize,
    line: End,
    joints: { neutral: string; earth: string },
  ): RoomBox {
    return new RoomBox(sketch, room, board, size, line, joints.neutral, joints.earth, undefined);
  }

  /** Lamps on one switch, in a row. */
  lamps(numbers: readonly number[]): void {
    const { sketch, room, key } = this;
    const first = numbers[0]!;
    const control = this.switchFor(`lamp${first}`, numbers.length * room.lampWatts);
    let taps: Taps = { line: [control, '2'], neutral: sketch.nextOn(this.neutral), earth: sketch.nextOn(this.earth) };
    numbers.forEach((number, i) => {
      const id = `${key}.lamp${number}`;
      const earthed = room.kind !== 'wet';
      sketch.part({
        id,
        kind: 'lamp',
        place: room.id,
        watts: room.lampWatts,
        pf: POWER_FACTOR.lamp,
        class: earthed ? 1 : 2,
        fixed: true,
      });
      const cable = cableOf(sketch, `${id}.cable`, this.size, i === 0 ? LENGTH.boxToPoint : LENGTH.pointToPoint);
      sketch.wire(taps.line, [id, 'L'], 'switched', cable);
      sketch.wire(taps.neutral, [id, 'N'], 'neutral', cable);
      if (earthed) sketch.wire(taps.earth, [id, 'E'], 'earth', cable);
      taps = { line: [id, 'L'], neutral: [id, 'N'], earth: [id, 'E'] };
    });
  }

  /** A ceiling fan behind its own switch and regulator. */
  fan(number: number): void {
    const { sketch, room, key } = this;
    const id = `${key}.fan${number}`;
    const control = this.switchFor(`fan${number}`, room.fanWatts);
    const regulator = sketch.part({
      id: sketch.freeId(`${id}.regulator`),
      kind: 'regulator',
      place: room.id,
      board: this.board,
      rating: ratingFor(this.amps(room.fanWatts), REGULATOR_RATINGS),
    });
    sketch.wire([control, '2'], [regulator, '1'], 'switched');
    sketch.part({
      id,
      kind: 'fan',
      place: room.id,
      watts: room.fanWatts,
      pf: POWER_FACTOR.fan,
      surge: START.fan,
      class: 1,
      fixed: true,
    });
    const cable = cableOf(sketch, `${id}.cable`, this.size, LENGTH.boxToPoint);
    sketch.wire([regulator, '2'], [id, 'L'], 'switched', cable);
    sketch.wire(sketch.nextOn(this.neutral), [id, 'N'], 'neutral', cable);
    sketch.wire(sketch.nextOn(this.earth), [id, 'E'], 'earth', cable);
  }

  /** All that a plan hangs here. @param kept each lamp of a backed-up way has its own switch, so that it can be spared */
  fill(segment: Segment, kept: boolean): void {
    for (const row of byRow(segment.lamps, !kept)) this.lamps(row);
    for (const fan of segment.fans) this.fan(fan);
  }

  /** Where the run to the next room begins. */
  onward(): Taps {
    return { line: this.line, neutral: this.sketch.nextOn(this.neutral), earth: this.sketch.nextOn(this.earth) };
  }

  private amps(watts: number): number {
    return watts / (this.sketch.supply.voltage * POWER_FACTOR.lamp);
  }

  /** The next switch of the box: the line loops on to it, and a run that left the loop's end now leaves from here. */
  private switchFor(what: string, watts: number): string {
    const { sketch } = this;
    const id = sketch.part({
      id: sketch.freeId(`${this.key}.${what}.switch`),
      kind: 'switch',
      place: this.room.id,
      board: this.board,
      rating: ratingFor(this.amps(watts), SWITCH_RATINGS, sketch.practice.draft.switchA),
    });
    if (this.run === undefined)
      for (const leaving of sketch.leaving(this.line)) sketch.moveStart(leaving.id, [id, '1']);
    sketch.wire(this.line, [id, '1'], 'line', this.run);
    this.line = [id, '1'];
    this.run = undefined;
    return id;
  }
}
