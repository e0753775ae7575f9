import type { Point, Scene, SceneText } from '../layout/scene';
import { textBox } from '../layout/text-box';
import type { Group } from './primitives';

/** A piece of a scene, 1/100 mm. */
export interface Crop extends Point {
  width: number;
  height: number;
}

/** A small drawing: what is seen of it, and its marks in the light palette. */
export interface Picture {
  crop: Crop;
  groups: readonly Group[];
}

/** Left free round what is shown. */
const MARGIN = 450;

const textsOf = (scene: Scene): SceneText[] => [
  ...[...scene.parts, ...scene.runs, ...scene.frames].flatMap(({ texts }) => texts),
  ...scene.texts,
];

/**
 * The piece of a scene that matters, with a margin: all that is drawn, without the empty ground around it, or the parts
 * named, with their lettering and the runs between them. Names of bands lie outside.
 */
export function cropTo(scene: Scene, focus?: readonly string[]): Crop {
  const has = (id: string) => !focus || focus.includes(id);
  const parts = scene.parts.filter(({ id }) => has(id));
  const runs = scene.runs.filter(({ from, to }) => has(from[0]) && has(to[0]));
  const around = new Set(parts.map(({ frame }) => frame));
  const frames = scene.frames.filter(({ id, kind }) => (focus ? around.has(id) : kind !== 'lane'));
  const texts = focus ? [...parts, ...frames, ...runs].flatMap((of) => of.texts) : textsOf(scene);
  const boxes = [
    ...parts,
    ...frames,
    ...texts.map(textBox),
    ...scene.rings
      .filter(({ part }) => has(part))
      .map(({ x, y, radius }) => ({ x: x - radius, y: y - radius, width: 2 * radius, height: 2 * radius })),
    ...runs.flatMap(({ points }) => points.map((point) => ({ ...point, width: 0, height: 0 }))),
  ];
  const left = Math.min(...boxes.map(({ x }) => x)) - MARGIN;
  const top = Math.min(...boxes.map(({ y }) => y)) - MARGIN;
  const right = Math.max(...boxes.map(({ x, width }) => x + width)) + MARGIN;
  const bottom = Math.max(...boxes.map(({ y, height }) => y + height)) + MARGIN;
  return { x: left, y: top, width: right - left, height: bottom - top };
}

/** A scene without its bands and without the words that the edge of a piece would cut through. */
export function trim(scene: Scene, crop: Crop): Scene {
  const whole = (text: SceneText): boolean => {
    const box = textBox(text);
    return (
      box.x >= crop.x &&
      box.y >= crop.y &&
      box.x + box.width <= crop.x + crop.width &&
      box.y + box.height <= crop.y + crop.height
    );
  };
  const trimmed = <T extends { texts: SceneText[] }>(of: T): T => ({ ...of, texts: of.texts.filter(whole) });
  return {
    ...scene,
    bands: [],
    parts: scene.parts.map(trimmed),
    runs: scene.runs.map(trimmed),
    frames: scene.frames.map(trimmed),
    texts: scene.texts.filter(whole),
  };
}
