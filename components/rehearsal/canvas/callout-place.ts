import { textBox } from '@/diagram/layout/text-box';
import type { Scene, ScenePart } from '@/diagram/layout/scene';
import { overlap, type Box } from './figure-places';

const STEP = 500;
/** 1/100 mm about the part, in which a callout is looked for */
const REACH = 6000;

/** Where a callout of this size covers least, near a part; the nearer the better. */
export function calloutPlace(scene: Scene, part: ScenePart, width: number, height: number): Box {
  const texts = [...scene.parts, ...scene.runs, ...scene.frames].flatMap((each) => each.texts.map(textBox));
  const runs = scene.runs.flatMap(({ points }) =>
    points.slice(1).map((b, i) => {
      const a = points[i]!;
      return {
        x: Math.min(a.x, b.x) - 60,
        y: Math.min(a.y, b.y) - 60,
        width: Math.abs(a.x - b.x) + 120,
        height: Math.abs(a.y - b.y) + 120,
      };
    }),
  );
  const middle = { x: part.x + part.width / 2, y: part.y + part.height / 2 };
  const own = { x: part.x - 400, y: part.y - 400, width: part.width + 800, height: part.height + 1600 };
  // Only what lies near enough to be covered counts: a large home has thousands of stretches.
  const far = REACH + Math.max(width, height);
  const around = { x: middle.x - far, y: middle.y - far, width: 2 * far, height: 2 * far };
  const isNear = (box: Box) => overlap(around, box) > 0;
  const solid = [...scene.parts, ...texts].filter(isNear);
  const near = runs.filter(isNear);
  let best: Box = { x: middle.x + 600, y: middle.y + 1500, width, height };
  let least = Infinity;
  for (let dy = -REACH; dy <= REACH; dy += STEP) {
    for (let dx = -REACH; dx <= REACH; dx += STEP) {
      const box = { x: middle.x + dx - width / 2, y: middle.y + dy - height / 2, width, height };
      if (box.x < 1300 || box.y < 300 || box.x + width > scene.width - 200 || box.y + height > scene.height - 100)
        continue;
      const cost =
        40 * overlap(box, own) +
        12 * solid.reduce((sum, each) => sum + overlap(box, each), 0) +
        3 * near.reduce((sum, each) => sum + overlap(box, each), 0) +
        260 * Math.hypot(dx, dy);
      if (cost >= least) continue;
      least = cost;
      best = box;
    }
  }
  return best;
}
