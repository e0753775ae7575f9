import type { End } from '@/diagram/document/schema';
import type { Point, Scene, ScenePart } from '@/diagram/layout/scene';

/** Where a terminal stands on the scene; a bar's unnamed screw stands with its free one. */
export function endPoint(scene: Scene, [id, mark]: End): Point | null {
  const part = scene.parts.find((candidate) => candidate.id === id);
  if (!part) return null;
  return part.terminals.find((terminal) => terminal.mark === mark) ?? part.terminals.at(-1) ?? middle(part);
}

export const middle = (part: ScenePart): Point => ({ x: part.x + part.width / 2, y: part.y + part.height / 2 });

/** The terminal nearest to a point, if one is within reach. Lengths in 1/100 mm. */
export function nearestEnd(scene: Scene, at: Point, reach: number, only?: string): End | null {
  let best: End | null = null;
  let least = reach;
  for (const part of scene.parts) {
    if (only && part.id !== only) continue;
    for (const { mark, x, y } of part.terminals) {
      const distance = Math.hypot(x - at.x, y - at.y);
      if (distance <= least) {
        least = distance;
        best = [part.id, mark];
      }
    }
  }
  return best;
}
