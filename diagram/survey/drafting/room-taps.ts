import type { Installation, Part, SurveyRoom } from '../../document/schema';
import type { Way } from '../../terminals/ways';
import { LENGTH, OUTLETS_PER_RADIAL, OUTLET_WATTS, POWER_FACTOR } from './assumptions';
import { lightingLimit } from './plan-lamps';
import { runOf, type WaySupply } from './way-plan';
import { RoomBox, type Taps } from './room-box';
import { sizeRun, type RunSize } from './size-run';
import type { Sketch } from './sketch';

/** Where more can be hung on a way that is drawn. */

const isLampOrFan = (part: Part | undefined): part is Extract<Part, { kind: 'lamp' | 'fan' }> =>
  part?.kind === 'lamp' || part?.kind === 'fan';

/** The joint in a room's part of a way whose conductors have this role. */
function jointOf(
  doc: Installation,
  ids: ReadonlySet<string>,
  room: string,
  role: 'neutral' | 'earth',
  sketch: Sketch,
): string | undefined {
  return doc.parts.find(
    ({ id, kind, place }) =>
      kind === 'joint' &&
      place === room &&
      ids.has(id) &&
      doc.wires.some((wire) => wire.role === role && (wire.from[0] === id || wire.to[0] === id)) &&
      sketch.find(id),
  )?.id;
}

/** A switch of the room that the way's line reaches, the last of the loop where that can be told. */
function lastSwitch(doc: Installation, ids: ReadonlySet<string>, room: string, sketch: Sketch): string | undefined {
  const fed = doc.parts.filter(
    ({ id, kind, place }) =>
      kind === 'switch' &&
      place === room &&
      ids.has(id) &&
      sketch.wiresAt([id, '1']).some((wire) => sketch.getWire(wire).role === 'line'),
  );
  const wires = ({ id }: Part) => sketch.wiresAt([id, '1']).map((wire) => sketch.getWire(wire));
  const leads = (part: Part, other: (kind: Part['kind'], place: string | undefined) => boolean) =>
    wires(part).some(({ from, to }) => {
      const next = sketch.find(to[0]);
      return from[0] === part.id && next !== undefined && other(next.kind, next.place);
    });
  return (fed.find((part) => !leads(part, () => true)) ?? fed.find((part) => leads(part, (_, place) => place !== room)))
    ?.id;
}

/** Points and watts on ways of lamps, by device; grows as more is hung on them. */
export type Held = Map<string, { points: number; watts: number }>;

function heldBy(doc: Installation, way: Way, held: Held): { points: number; watts: number } {
  const known = held.get(way.device);
  if (known) return known;
  const ids = new Set(way.parts);
  const points = doc.parts.filter((part) => ids.has(part.id)).filter(isLampOrFan);
  return { points: points.length, watts: points.reduce((sum, { watts }) => sum + (watts ?? 0), 0) };
}

/** m, of all runs of a way from box to box, and on to a point in the farthest. */
function lengthOf(sketch: Sketch, way: Way): number {
  const joints = way.parts.filter((id) => sketch.find(id)?.kind === 'joint');
  const runs = new Set(joints.map((id) => sketch.arrivingAt(id)?.cable).filter((cable) => cable !== undefined));
  const metres = [...runs].reduce((sum, cable) => sum + (sketch.cableOf(cable)?.length ?? 0), 0);
  return metres + LENGTH.boxToPoint + 2 * LENGTH.pointToPoint;
}

interface Addition {
  room: SurveyRoom;
  backup: boolean;
  points: number;
  watts: number;
}

/** True where a way of this size still serves its load, with the addition, as far as it goes. */
function stillServes(sketch: Sketch, way: Way, size: RunSize, watts: number, supply: WaySupply): boolean {
  const device = sketch.find(way.device);
  if (device?.kind !== 'mcb' || device.rating === undefined) return false;
  const needed = sizeRun({
    ...supply,
    ratingA: device.rating,
    curve: device.curve ?? 'C',
    amps: watts / (supply.voltage * POWER_FACTOR.lamp),
    lengthM: lengthOf(sketch, way),
    use: way.backup ? 'backup' : 'lighting',
    leastMm2: size.csaMm2,
  });
  return needed?.csaMm2 === size.csaMm2;
}

/**
 * The box of a way of lamps that has room for an addition in its room, mains or backup; the addition is counted on the way.
 * @returns undefined where the room has none: the addition needs a way of its own
 */
export function openBox(
  sketch: Sketch,
  doc: Installation,
  ways: readonly Way[],
  { room, backup, ...adds }: Addition,
  supply: WaySupply,
  held: Held,
): RoomBox | undefined {
  for (const way of ways) {
    const device = sketch.find(way.device);
    if (way.backup !== backup || device?.kind !== 'mcb' || device.rating === undefined) continue;
    const before = heldBy(doc, way, held);
    const after = { points: before.points + adds.points, watts: before.watts + adds.watts };
    const limit = lightingLimit(supply, device.rating);
    if (after.points > limit.points || after.watts > limit.watts) continue;
    const ids = new Set(way.parts);
    const control = lastSwitch(doc, ids, room.id, sketch);
    const neutral = jointOf(doc, ids, room.id, 'neutral', sketch);
    const earth = jointOf(doc, ids, room.id, 'earth', sketch);
    const run = neutral && sketch.arrivingAt(neutral)?.cable;
    const size = run && sketch.sizeOf(run);
    const board = control && sketch.find(control)?.board;
    if (!control || !neutral || !earth || !size || !board) continue;
    if (!stillServes(sketch, way, size, after.watts, supply)) continue;
    held.set(way.device, after);
    return RoomBox.reopen(sketch, room, board, size, [control, '1'], { neutral, earth });
  }
  return undefined;
}

/** The end of a row of outlets that may go on: what the next one hangs on, and in which size. */
export function openRow(
  sketch: Sketch,
  doc: Installation,
  ways: readonly Way[],
  place: string,
  room: SurveyRoom,
  supply: WaySupply,
): { from: Taps; size: RunSize } | undefined {
  for (const way of ways) {
    const device = sketch.find(way.device);
    if (way.backup || device?.kind !== 'mcb' || device.rating === undefined) continue;
    const ids = new Set(way.parts);
    const outlets = [...sketch.allParts()].filter(
      (part) => part.kind === 'socket' && part.place === place && (ids.has(part.id) || hangsOn(sketch, part.id, ids)),
    );
    const last = outlets.find(({ id }) =>
      (['L', 'N', 'E'] as const).every((mark) => sketch.wiresAt([id, mark]).length === 1),
    );
    if (!last || outlets.length >= OUTLETS_PER_RADIAL || way.parts.some((id) => isLampOrFan(sketch.find(id)))) continue;
    const wire = sketch.getWire(sketch.wiresAt([last.id, 'L'])[0]!);
    const size = wire.cable === undefined ? undefined : sketch.sizeOf(wire.cable);
    const count = outlets.length + 1;
    const amps = (count * OUTLET_WATTS) / supply.voltage;
    const lengthM = runOf(room) + (count - 1) * LENGTH.outletToOutlet;
    const needed =
      size &&
      sizeRun({
        ...supply,
        ratingA: device.rating,
        curve: device.curve ?? 'C',
        amps,
        lengthM,
        use: 'other',
        leastMm2: size.csaMm2,
      });
    if (!size || needed?.csaMm2 !== size.csaMm2) continue;
    return { from: { line: [last.id, 'L'], neutral: [last.id, 'N'], earth: [last.id, 'E'] }, size };
  }
  return undefined;
}

/** True for an outlet that was hung on a row of the way since the ways were found. */
function hangsOn(sketch: Sketch, id: string, ids: ReadonlySet<string>): boolean {
  const seen = new Set<string>();
  let at = id;
  while (!seen.has(at)) {
    seen.add(at);
    if (ids.has(at)) return true;
    const feeder = sketch
      .wiresAt([at, 'L'])
      .map((wire) => sketch.getWire(wire))
      .find(({ to }) => to[0] === at);
    if (!feeder) return false;
    at = feeder.from[0];
  }
  return false;
}
