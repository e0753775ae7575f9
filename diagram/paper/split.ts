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
  for (const part of scene.parts) {
    box(part, part.kind.endsWith('-bar') ? 1 : 100);
    // what is written beside a part is read with it
    const all = [part, ...part.texts.map(textBox)];
    const from = Math.min(...all.map((b) => b[axis]));
    found.push({ from, to: Math.max(...all.map((b) => b[axis] + b[size])), cost: 8 });
  }
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

/** How much costlier a cut may be than the best one for the sake of pages that are evenly full: a twelfth of a run a module. */
const UNEVEN = 1 / 12;

/**
 * Cuts the stretch from `start` to `end` into as few pieces no longer than `most` as can be, where it costs least in all.
 * @returns edges, with both ends
 */
export function cuts(scene: Scene, axis: 'x' | 'y', from: number, end: number, most: number): number[] {
  const pieces = Math.ceil((end - from) / most);
  if (pieces <= 1) return [from, end];
  const places: number[] = [];
  for (let at = Math.floor(from / MODULE) * MODULE + MODULE / 2; at < end; at += MODULE) if (at > from) places.push(at);
  const cost = costsAt(spans(scene, axis), places);
  const even = (end - from) / pieces;
  // cheapest way to have made n cuts, the last of them at each place
  let least = places.map((at, i) => (at - from <= most ? cost[i]! : Infinity));
  const came: number[][] = [];
  for (let n = 2; n < pieces; n++) {
    const back: number[] = [];
    least = places.map((at, i) => {
      let best = Infinity;
      back[i] = -1;
      for (let k = i - 1; k >= 0 && at - places[k]! <= most; k--)
        if (least[k]! < best) {
          best = least[k]!;
          back[i] = k;
        }
      return best + cost[i]! + (Math.abs(at - from - n * even) / MODULE) * UNEVEN;
    });
    came.push(back);
  }
  let last = -1;
  let best = Infinity;
  places.forEach((at, i) => {
    const sum = least[i]! + (Math.abs(end - at - even) / MODULE) * UNEVEN;
    if (end - at > most || sum >= best) return;
    best = sum;
    last = i;
  });
  // no grid place lets so few pieces do: the pieces are full and the cuts fall where they fall
  if (last < 0) return Array.from({ length: pieces + 1 }, (_, i) => Math.min(end, from + i * most));
  const edges = [end];
  for (let n = came.length; ; n--) {
    edges.push(places[last]!);
    if (n === 0) break;
    last = came[n - 1]![last]!;
  }
  return [...edges, from].reverse();
}

/** What a cut costs at each of some places, in order: all spans that it goes through. */
function costsAt(all: readonly Span[], places: readonly number[]): number[] {
  const step = new Float64Array(places.length + 1);
  const first = (value: number): number => {
    let low = 0;
    let high = places.length;
    while (low < high) {
      const middle = (low + high) >> 1;
      if (places[middle]! <= value) low = middle + 1;
      else high = middle;
    }
    return low;
  };
  for (const span of all) {
    const [open, shut] = [first(span.from), first(span.to - 1e-6)];
    if (open >= shut) continue;
    step[open]! += span.cost;
    step[shut]! -= span.cost;
  }
  let sum = 0;
  return places.map((_, i) => (sum += step[i]!));
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
