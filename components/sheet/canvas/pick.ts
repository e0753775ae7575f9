import type { End } from '@/diagram/document/schema';
import type { Point, Scene, ScenePart } from '@/diagram/layout/scene';

/** Where a terminal stands on the scene; a bar's unnamed screw stands with its free one. */
export function endPoint(scene: Scene, [id, mark]: End): Point | null {
  const part = scene.parts.find((candidate) => candidate.id === id);
  if (!part) return null;
  return part.terminals.find((terminal) => terminal.mark === mark) ?? part.terminals.at(-1) ?? middle(part);
}

export const middle = (part: ScenePart): Point => ({ x: part.x + part.width / 2, y: part.y + part.height / 2 });

/** A terminal under a pointer; on the overview several of a part may be drawn at one point. */
export interface Near {
  ends: End[];
  at: Point;
  /** from the pointer, 1/100 mm */
  distance: number;
}

/** The terminals within reach of a point, the nearest first. Lengths in 1/100 mm. */
export function endsNear(scene: Scene, at: Point, reach: number, only?: string): Near[] {
  const found = new Map<string, Near>();
  for (const part of scene.parts) {
    if (only && part.id !== only) continue;
    for (const { mark, x, y } of part.terminals) {
      const distance = Math.hypot(x - at.x, y - at.y);
      if (distance > reach) continue;
      const key = `${part.id} ${x} ${y}`;
      const known = found.get(key);
      if (known) known.ends.push([part.id, mark]);
      else found.set(key, { ends: [[part.id, mark]], at: { x, y }, distance });
    }
  }
  return [...found.values()].sort((a, b) => a.distance - b.distance);
}

/** px on the screen within which a finger takes a terminal: half of a target of 44 */
export const REACH = 22;
/** px: two terminals closer than this are not told apart by a finger */
const APART = 24;

/**
 * What a finger means: one terminal, or two to choose from where they lie too close together.
 * @param scale px on the screen for 1/100 mm
 * @param under id of the part under the finger, if any: its own nearest terminal is meant where none is within reach
 */
export function meant(scene: Scene, at: Point, scale: number, under?: string): Near[] {
  const [first, second] = endsNear(scene, at, REACH / scale);
  if (!first) return under === undefined ? [] : endsNear(scene, at, Infinity, under).slice(0, 1);
  if (!second) return [first];
  const apart = Math.hypot(first.at.x - second.at.x, first.at.y - second.at.y) * scale;
  return apart < APART ? [first, second] : [first];
}
