import type { Installation, Part, SurveyRoom } from '../../document/schema';
import type { Way } from '../../terminals/ways';
import { LENGTH, OUTLETS_PER_RADIAL, OUTLET_WATTS } from './assumptions';
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

/**
 * The box of a way of lamps that has room for `watts` more in this room, mains or backup.
 * @returns undefined where the room has none: the addition needs a way of its own
 */
export function openBox(
  sketch: Sketch,
  doc: Installation,
  ways: readonly Way[],
  room: SurveyRoom,
  backup: boolean,
  adds: { points: number; watts: number },
  supply: WaySupply,
): RoomBox | undefined {
  for (const way of ways) {
    const device = sketch.find(way.device);
    if (way.backup !== backup || device?.kind !== 'mcb' || device.rating === undefined) continue;
    const ids = new Set(way.parts);
    const points = doc.parts.filter((part) => ids.has(part.id) && isLampOrFan(part)) as Extract<
      Part,
      { kind: 'lamp' | 'fan' }
    >[];
    const limit = lightingLimit(supply, device.rating);
    const watts = points.reduce((sum, part) => sum + (part.watts ?? 0), 0) + adds.watts;
    if (points.length + adds.points > limit.points || watts > limit.watts) continue;
    const control = lastSwitch(doc, ids, room.id, sketch);
    const neutral = jointOf(doc, ids, room.id, 'neutral', sketch);
    const earth = jointOf(doc, ids, room.id, 'earth', sketch);
    const run = neutral && sketch.arrivingAt(neutral)?.cable;
    const size = run && sketch.sizeOf(run);
    const board = control && sketch.find(control)?.board;
    if (!control || !neutral || !earth || !size || !board) continue;
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
