import type { Point, Scene } from '../layout/scene';
import { textBox } from '../layout/text-box';
import { MODULE } from '../symbols/types';
import type { Area } from './iso-sheet';

/** Where a drawing that is larger than its sheet is cut: between rooms, across as few runs as can be. */

/** A stretch along one axis and what it costs to cut it. */
interface Span {
  from: number;
  to: number;
  cost: number;
}

function spans(scene: Scene, axis: 'x' | 'y'): Span[] {
  const size = axis === 'x' ? 'width' : 'height';
  const found: Span[] = [];
  const box = (b: Area, cost: number) => found.push({ from: b[axis], to: b[axis] + b[size], cost });
  for (const part of scene.parts) box(part, part.kind.endsWith('-bar') ? 1 : 100);
  for (const frame of scene.frames) if (frame.kind !== 'lane') box(frame, frame.kind === 'brace' ? 40 : 12);
  const texts = [
    ...scene.texts,
    ...scene.parts.flatMap((p) => p.texts),
    ...scene.runs.flatMap((r) => r.texts),
    ...scene.frames.flatMap((f) => f.texts),
  ];
  for (const text of texts) box(textBox(text), 60);
  for (const ring of scene.rings)
    box({ x: ring.x - ring.radius, y: ring.y - ring.radius, width: 2 * ring.radius, height: 2 * ring.radius }, 100);
  for (const run of scene.runs)
    for (let i = 0; i + 1 < run.points.length; i++) {
      const [a, b] = [run.points[i]!, run.points[i + 1]!];
      // a run that is cut lengthwise would vanish on both sheets
      found.push(
        a[axis] === b[axis]
          ? { from: a[axis] - 60, to: a[axis] + 60, cost: 200 }
          : { from: Math.min(a[axis], b[axis]), to: Math.max(a[axis], b[axis]), cost: 1 },
      );
    }
  return found;
}

/** What is drawn, with half a module round it: empty margins of a face take no paper. */
export function contentOf(scene: Scene): Area {
  const [xs, ys] = [spans(scene, 'x'), spans(scene, 'y')];
  const lanes = scene.frames.filter((frame) => frame.kind === 'lane');
  const bands = scene.bands.length > 0;
  const left = bands ? 0 : Math.min(scene.width, ...xs.map((s) => s.from)) - MODULE;
  const right = Math.max(0, ...xs.map((s) => s.to), ...lanes.map((f) => f.x + f.width)) + MODULE / 2;
  const top = bands ? 0 : Math.min(scene.height, ...ys.map((s) => s.from)) - MODULE;
  const bottom = Math.max(0, ...ys.map((s) => s.to), ...lanes.map((f) => f.y + f.height)) + MODULE / 2;
  return {
    x: Math.max(0, left),
    y: Math.max(0, top),
    width: Math.max(MODULE, right - Math.max(0, left)),
    height: Math.max(MODULE, bottom - Math.max(0, top)),
  };
}

/**
 * Cuts the stretch from `start` to `end` into pieces no longer than `most`.
 * @returns edges, with both ends
 */
export function cuts(scene: Scene, axis: 'x' | 'y', from: number, end: number, most: number): number[] {
  const edges = [from];
  if (end - from <= most) return [from, end];
  const all = spans(scene, axis);
  while (end - edges.at(-1)! > most) {
    const start = edges.at(-1)!;
    let best = start + most;
    let least = Infinity;
    // from the far end back over two fifths of the sheet: the fuller sheet wins where the cost is the same
    for (let at = Math.floor((start + most) / MODULE) * MODULE - MODULE / 2; at > start + most * 0.6; at -= MODULE) {
      const cost =
        all.reduce((sum, span) => (span.from < at && at < span.to ? sum + span.cost : sum), 0) +
        (start + most - at) / 4000;
      if (cost < least) {
        least = cost;
        best = at;
      }
    }
    edges.push(best);
  }
  return [...edges, end];
}

/** Where the runs of a scene pass a cut, for the match marks. */
export function crossingsAt(scene: Scene, axis: 'x' | 'y', at: number): Point[] {
  const other = axis === 'x' ? 'y' : 'x';
  return scene.runs.flatMap((run) =>
    run.points.slice(1).flatMap((b, i): Point[] => {
      const a = run.points[i]!;
      const between = Math.min(a[axis], b[axis]) < at && at < Math.max(a[axis], b[axis]);
      return between ? [axis === 'x' ? { x: at, y: a[other] } : { x: a[other], y: at }] : [];
    }),
  );
}
