import { isBar } from '../document/kinds';
import type { End } from '../document/schema';
import type { Sketch } from '../survey/drafting/sketch';
import { TERMINAL_HOLDS } from './ends';
import type { NewId } from './types';

/**
 * Where one more wire may end: a free screw of a bar, the terminal itself while it has room, else a joint beside it that
 * takes over what goes on from there.
 */
export function tapAt(sketch: Sketch, end: End, newId: NewId): End {
  const part = sketch.find(end[0]);
  if (part && isBar(part.kind)) return sketch.nextOn(part.id);
  if (sketch.wiresAt(end).length < TERMINAL_HOLDS) return end;
  const { place, board } = part ?? {};
  const joint = sketch.part({ id: newId(), kind: 'joint', ...(place && { place }), ...(board && { board }) }, null);
  const leaving = sketch.leaving(end);
  const role = (leaving[0] ?? sketch.arriving(end))!.role;
  for (const wire of leaving) sketch.moveStart(wire.id, sketch.nextOn(joint));
  sketch.wire(end, sketch.nextOn(joint), role);
  return sketch.nextOn(joint);
}
