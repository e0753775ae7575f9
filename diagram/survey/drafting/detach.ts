import type { End, Wire } from '../../document/schema';
import type { Sketch } from './sketch';

/** Takes a lamp or fan off its way, and the switch and regulator that served it alone; what hung behind hangs on what was before. */

/** Joins what leaves a terminal to what arrives there, and takes the arriving wire away. */
function bridge(sketch: Sketch, end: End): Wire | undefined {
  const arriving = sketch.arriving(end);
  const leaving = sketch.leaving(end);
  if (!arriving) return undefined;
  const [first, ...rest] = leaving;
  if (!first) {
    sketch.removeWire(arriving.id);
    return arriving;
  }
  if (first.cable === undefined && arriving.cable !== undefined) {
    // A loop inside the box was fed from a run: the run's core now lands where the loop did.
    sketch.moveEnd(arriving.id, first.to);
    sketch.removeWire(first.id);
  } else {
    sketch.moveStart(first.id, arriving.from);
    sketch.removeWire(arriving.id);
  }
  for (const wire of rest) sketch.moveStart(wire.id, arriving.from);
  return arriving;
}

/** Takes out a control of which nothing hangs on terminal 2 any more. */
function removeControl(sketch: Sketch, id: string): void {
  const part = sketch.find(id);
  if (!part || (part.kind !== 'switch' && part.kind !== 'regulator') || sketch.wiresAt([id, '2']).length > 0) return;
  const arriving = sketch.arriving([id, '1']);
  const onward = sketch.leaving([id, '1']).find(({ cable }) => cable !== undefined);
  if (arriving?.cable !== undefined && onward) {
    // The run to the next room left from here and from nowhere else: its line goes on through a joint.
    const joint = sketch.part(
      { id: sketch.freeId(`${id}.l`), kind: 'joint', place: part.place, board: part.board },
      null,
    );
    sketch.moveEnd(arriving.id, sketch.nextOn(joint));
    for (const wire of sketch.leaving([id, '1'])) sketch.moveStart(wire.id, sketch.nextOn(joint));
    sketch.removePart(id);
    return;
  }
  const last = sketch.leaving([id, '1']).length === 0;
  const before = bridge(sketch, [id, '1']);
  sketch.removePart(id);
  if (!before) return;
  if (last && before.cable !== undefined) removeRun(sketch, before);
  removeControl(sketch, before.from[0]);
}

/** Takes out a run whose line serves nothing more, with the joints it ended in; its breaker becomes a spare one. */
function removeRun(sketch: Sketch, line: Wire): void {
  for (const wire of sketch.wiresIn(line.cable!)) {
    const joint = sketch.find(wire.to[0]);
    if (joint?.kind !== 'joint' || sketch.wiresOn(joint.id).length > 1) continue;
    sketch.removeWire(wire.id);
    sketch.removePart(joint.id);
  }
  const [from] = line.from;
  if (sketch.find(from)?.kind === 'mcb' && sketch.wiresAt(line.from).length === 0)
    sketch.change<'mcb'>(from, { spare: true });
}

/** Takes a load off its way. It is lifted from the sketch until it is drawn again. */
export function detach(sketch: Sketch, load: string): void {
  const control = sketch.arriving([load, 'L'])?.from[0];
  for (const mark of ['L', 'N', 'E']) bridge(sketch, [load, mark]);
  sketch.lift(load);
  if (control !== undefined) removeControl(sketch, control);
}
