import type { Point, Scene } from '../layout/scene';
import { cropTo, trim } from './crop';
import { sceneGroups } from './draw-scene';
import { pageSvg } from './svg';

const within = (box: Point & { width: number; height: number }, at: Point): boolean =>
  at.x >= box.x && at.x <= box.x + box.width && at.y >= box.y && at.y <= box.y + box.height;

/**
 * A piece of a scene as an SVG of its own, in the light palette: the parts named and the runs between them.
 * @returns null where the scene draws none of them
 */
export function pieceSvg(scene: Scene, ids: readonly string[], title: string): string | null {
  const chosen = new Set(ids);
  const parts = scene.parts.filter((part) => chosen.has(part.id));
  if (parts.length === 0) return null;
  const runs = scene.runs.filter(({ from, to }) => chosen.has(from[0]) && chosen.has(to[0]));
  const rings = scene.rings.filter((ring) => chosen.has(ring.part));
  const alone: Scene = { ...scene, bands: [], frames: [], texts: [], parts, runs, rings, dots: [] };
  const crop = cropTo(alone);
  const ends = new Set(runs.flatMap((run) => [run.points[0], run.points.at(-1)].map((at) => `${at?.x} ${at?.y}`)));
  const dots = scene.dots.filter((dot) => within(crop, dot) && ends.has(`${dot.x} ${dot.y}`));
  const groups = sceneGroups(trim({ ...alone, dots }, crop));
  return pageSvg(
    { width: crop.width, height: crop.height, groups: [{ x: -crop.x, y: -crop.y, scale: 1, marks: [], groups }] },
    title,
  );
}
