import type { Scene } from '../layout/scene';
import { light } from '../symbols/palette';
import { runPath } from './draw-scene';
import type { Group, PathMark } from './primitives';

/** Red pencil on a drawing: rings round parts, and round wires along their whole run. */

const PENCIL = 55;
/** 1/100 mm between the ring and what it goes round */
const CLEAR = { part: { x: 170, y: 260 }, wire: 260 } as const;

const group = (marks: PathMark[]): Group => ({ x: 0, y: 0, scale: 1, marks });

/** Rings of wires: they go under the drawing, so that nothing is covered by the paper within them. */
export function wireRings(scene: Scene, wires: readonly string[]): Group {
  const ringed = scene.runs.filter((run) => run.wires.some((wire) => wires.includes(wire)));
  const along = (stroke: string, width: number) =>
    ringed.map((run): PathMark => ({ kind: 'path', d: runPath(run, 0), stroke, width }));
  return group([...along(light.red, 2 * CLEAR.wire), ...along(light.paper, 2 * (CLEAR.wire - PENCIL))]);
}

/** Rings of parts: they go over the drawing. */
export function partRings(scene: Scene, parts: readonly string[]): Group {
  return group(
    scene.parts
      .filter(({ id }) => parts.includes(id))
      .map(({ x, y, width, height }): PathMark => {
        const radii = `${width / 2 + CLEAR.part.x} ${height / 2 + CLEAR.part.y}`;
        const [left, right, middle] = [x - CLEAR.part.x, x + width + CLEAR.part.x, y + height / 2];
        const d = `M${left} ${middle}A${radii} 0 1 1 ${right} ${middle}A${radii} 0 1 1 ${left} ${middle}Z`;
        return { kind: 'path', d, stroke: light.red, width: PENCIL };
      }),
  );
}
