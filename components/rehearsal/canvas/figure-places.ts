import { textWidth } from '@/diagram/layout/lettering';
import { textBox } from '@/diagram/layout/text-box';
import type { Scene, ScenePart, SceneRing } from '@/diagram/layout/scene';

/** Where the volts and amperes of a way or a source stand: beside it, on as little else as can be. Lengths are 1/100 mm. */
export interface FigurePlace {
  x: number;
  y: number;
  anchor: 'start' | 'end';
  /** volts above amperes, or both in a line */
  lines: 1 | 2;
}

export interface Box {
  x: number;
  y: number;
  width: number;
  height: number;
}

/** height of the capitals */
export const FIGURE_SIZE = 220;
export const LINE_PITCH = 320;
const TWO = { width: textWidth('230 V', FIGURE_SIZE), height: LINE_PITCH + FIGURE_SIZE };
const ONE = { width: textWidth('230 V 12.1 A', FIGURE_SIZE), height: FIGURE_SIZE };
const GAP = 90;

export const overlap = (a: Box, b: Box): number =>
  Math.max(0, Math.min(a.x + a.width, b.x + b.width) - Math.max(a.x, b.x)) *
  Math.max(0, Math.min(a.y + a.height, b.y + b.height) - Math.max(a.y, b.y));

/** Everything on the sheet that a figure should not lie on. */
export function obstaclesOf(scene: Scene): Box[] {
  const texts = [...scene.texts, ...scene.frames, ...scene.parts, ...scene.runs].flatMap((each) =>
    'texts' in each ? each.texts.map(textBox) : [textBox(each)],
  );
  const runs = scene.runs.flatMap(({ points, ticks }) => {
    const stretches = points.slice(1).map((b, i) => {
      const a = points[i]!;
      return {
        x: Math.min(a.x, b.x) - 110,
        y: Math.min(a.y, b.y) - 110,
        width: Math.abs(a.x - b.x) + 220,
        height: Math.abs(a.y - b.y) + 220,
      };
    });
    const long = 200 * (ticks?.cores.length ?? 0) + 200;
    const marks = ticks
      ? [
          ticks.vertical
            ? { x: ticks.at.x - 260, y: ticks.at.y - 220, width: 520, height: long }
            : { x: ticks.at.x - long, y: ticks.at.y - 260, width: 2 * long, height: 520 },
        ]
      : [];
    return [...stretches, ...marks];
  });
  const rings = scene.rings.map(({ x, y, radius }) => ({
    x: x - radius,
    y: y - radius,
    width: 2 * radius,
    height: 2 * radius,
  }));
  const borders = scene.frames
    .filter(({ kind }) => kind === 'switchboard' || kind === 'room')
    .flatMap(({ x, y, width, height }) => [
      { x, y: y - 60, width, height: 120 },
      { x, y: y + height - 60, width, height: 120 },
      { x: x - 60, y, width: 120, height },
      { x: x + width - 60, y, width: 120, height },
    ]);
  return [...texts, ...scene.parts, ...runs, ...rings, ...borders];
}

type Candidate = FigurePlace & Box;

function candidatesAt(x: number, y: number, reach: number, both = true): Candidate[] {
  const sides = both ? (['start', 'end'] as const) : (['start'] as const);
  const found: Candidate[] = [];
  for (const lines of [2, 1] as const) {
    const { width, height } = lines === 2 ? TWO : ONE;
    for (const anchor of sides) {
      for (const dy of [0, -220, 220, -480, 480, -800, 800]) {
        const at = anchor === 'start' ? x + reach + GAP : x - reach - GAP;
        const top = y + dy - height / 2;
        found.push({ x: at, y: top, anchor, lines, width, height });
      }
    }
  }
  return found;
}

const boxOf = ({ x, y, anchor, width, height }: Candidate): Box => ({
  x: anchor === 'start' ? x : x - width,
  y,
  width,
  height,
});

/** The places of the figures of all ways and sources of a face, by id of the part; none moves when the figures change. */
export function figurePlaces(scene: Scene): ReadonlyMap<string, FigurePlace> {
  const taken = obstaclesOf(scene);
  const parts = new Map(scene.parts.map((part) => [part.id, part]));
  const places = new Map<string, FigurePlace>();
  const put = (id: string, candidates: readonly Candidate[]) => {
    let best: Candidate | undefined;
    let least = Infinity;
    candidates.forEach((candidate, i) => {
      const box = boxOf(candidate);
      const cost = taken.reduce((sum, each) => sum + overlap(box, each), 0) + 400 * i;
      if (cost < least) {
        least = cost;
        best = candidate;
      }
    });
    if (!best) return;
    taken.push(boxOf(best));
    places.set(id, { x: best.x, y: best.y, anchor: best.anchor, lines: best.lines });
  };
  const middle = ({ x, y, width, height }: ScenePart) => ({ x: x + width / 2, y: y + height / 2 });
  const ofRing = (ring: SceneRing): Candidate[] => {
    const device = parts.get(ring.part);
    const at = device && middle(device);
    return [
      ...candidatesAt(ring.x, ring.y, ring.radius),
      ...(device && at ? candidatesAt(at.x, at.y, device.width / 2) : []),
    ];
  };
  for (const part of scene.parts)
    if (part.kind === 'supply' || part.kind === 'inverter') {
      const { x, y } = middle(part);
      const below = part.kind === 'inverter' ? part.height / 2 + 420 : 0;
      put(
        part.id,
        [...candidatesAt(x, y, part.width / 2).reverse(), ...candidatesAt(x - part.width / 2, y + below, 0)].reverse(),
      );
    }
  for (const ring of scene.rings) put(ring.part, ofRing(ring));
  return places;
}
