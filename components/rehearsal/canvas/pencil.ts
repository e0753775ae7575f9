import type { Point, Scene, ScenePart, SceneRun } from '@/diagram/layout/scene';
import type { PathStep } from '@/diagram/rehearsal/fault-path';

/** A stroke of the pencil: the way of the fault's current beside what carries it. Lengths are 1/100 mm. */
export interface PencilStroke {
  key: string;
  points: Point[];
  /** solid on the way out, dashed through earth and neutral */
  out: boolean;
}

/** 1/100 mm beside the wire */
const BESIDE = 230;

const sign = (value: number) => Math.sign(value);

/** A polyline of right angles, moved aside: to the right of its direction for a positive distance. */
export function aside(points: readonly Point[], distance: number): Point[] {
  const clean = points.filter((p, i) => i === 0 || p.x !== points[i - 1]!.x || p.y !== points[i - 1]!.y);
  const normal = (i: number): Point => {
    const a = clean[i]!;
    const b = clean[i + 1]!;
    return { x: -sign(b.y - a.y) * distance, y: sign(b.x - a.x) * distance };
  };
  if (clean.length < 2) return [...clean];
  return clean.map((p, i) => {
    const before = i > 0 ? normal(i - 1) : normal(i);
    const after = i < clean.length - 1 ? normal(i) : before;
    // At a right angle the two normals are across each other: their sum is the corner. Straight on, one is enough.
    const straight = before.x === after.x && before.y === after.y;
    return straight
      ? { x: p.x + before.x, y: p.y + before.y }
      : { x: p.x + before.x + after.x, y: p.y + before.y + after.y };
  });
}

const isBar = (kind: string): boolean => kind === 'neutral-bar' || kind === 'earth-bar';

interface Ends {
  run: SceneRun;
  /** points in the direction of the current */
  points: Point[];
  /** parts at which the run begins and ends, in that direction */
  first: string;
  last: string;
  out: boolean;
}

/** A run in the direction of the current that a step says; of a cable's other cores by where their line runs. */
function ends(run: SceneRun, steps: readonly PathStep[], parts: ReadonlyMap<string, ScenePart>, out: boolean): Ends {
  const step = steps[0]!;
  const [from, to] = [step.from[0], step.to[0]];
  const forward = (): boolean => {
    if (run.from[0] === from || run.to[0] === to) return true;
    if (run.from[0] === to || run.to[0] === from) return false;
    // The core ends at a bar that the run does not show: that end is where the run meets the board.
    const board = ['mcb', 'rcbo', 'fuse', 'rcd', 'isolator', 'line-bar', 'inverter'];
    const beginsAtBoard = board.includes(parts.get(run.from[0])?.kind ?? '');
    const toBar = isBar(parts.get(to)?.kind ?? '');
    return toBar ? !beginsAtBoard : beginsAtBoard;
  };
  const ahead = forward();
  return {
    run,
    points: ahead ? run.points : [...run.points].reverse(),
    first: ahead ? run.from[0] : run.to[0],
    last: ahead ? run.to[0] : run.from[0],
    out,
  };
}

/** Right-angled way between two points: straight, or with one bend. */
const elbow = (a: Point, b: Point): Point[] => (a.x === b.x || a.y === b.y ? [a, b] : [a, { x: a.x, y: b.y }, b]);

/** The way to a bar that stands apart: aside at this level, up or down beside the bar, to its end. */
function toBar(from: Point, bar: ScenePart): Point[] {
  const y = bar.y + bar.height / 2;
  const channel = from.x > bar.x + bar.width ? bar.x + bar.width + 400 : bar.x - 400;
  return [from, { x: channel, y: from.y }, { x: channel, y }, { x: channel < bar.x ? bar.x : bar.x + bar.width, y }];
}

/**
 * The pencil strokes of a fault's path on a face: beside each run that carries it, through the parts between, and along
 * to the bars and electrodes that stand apart.
 */
export function pencilStrokes(scene: Scene, path: readonly PathStep[]): PencilStroke[] {
  const parts = new Map(scene.parts.map((part) => [part.id, part]));
  const byWire = new Map(path.flatMap((step) => (step.wire === undefined ? [] : [[step.wire, step] as const])));
  const strokes: PencilStroke[] = [];
  const drawn: (Ends & { line: Point[] })[] = [];
  const joined = new Set<string>();
  for (const run of scene.runs) {
    for (const out of [true, false]) {
      const steps = run.wires.flatMap((id) => byWire.get(id) ?? []).filter((step) => step.out === out);
      if (steps.length === 0) continue;
      const each = ends(run, steps, parts, out);
      // Out on the right, home on the right of its own direction: in one cable the two lie on either side.
      const line = aside(each.points, BESIDE);
      strokes.push({ key: `${run.id} ${out}`, points: line, out });
      drawn.push({ ...each, line });
      for (const step of steps) {
        for (const [end, atEnd] of [
          [step.from[0], false],
          [step.to[0], true],
        ] as const) {
          const bar = parts.get(end);
          if (!bar || !isBar(bar.kind) || each.first === end || each.last === end) continue;
          const tip = atEnd ? line.at(-1)! : line[0]!;
          const way = toBar(tip, bar);
          strokes.push({ key: `${run.id} ${step.wire} bar`, points: atEnd ? way : [...way].reverse(), out });
          joined.add(end);
        }
      }
    }
  }
  // Through the parts: from where a run brings the current to where the next takes it on.
  for (const part of scene.parts) {
    for (const out of [true, false]) {
      const inward = drawn.filter((each) => each.out === out && each.last === part.id).map(({ line }) => line.at(-1)!);
      const onward = drawn.filter((each) => each.out === out && each.first === part.id).map(({ line }) => line[0]!);
      inward.slice(0, 1).forEach((a) => {
        onward.forEach((b, i) => strokes.push({ key: `${part.id} ${out} ${i}`, points: elbow(a, b), out }));
      });
    }
  }
  return strokes;
}

/** The head of an arrow in the middle of the longest stretch of a stroke, in its direction; null on a short one. */
export function arrowOf({ points }: PencilStroke): { at: Point; turn: number } | null {
  let best: { at: Point; turn: number } | null = null;
  let least = 1400;
  points.slice(1).forEach((b, i) => {
    const a = points[i]!;
    const length = Math.abs(a.x - b.x) + Math.abs(a.y - b.y);
    if (length <= least) return;
    least = length;
    const turn = b.x > a.x ? 0 : b.y > a.y ? 90 : b.x < a.x ? 180 : 270;
    best = { at: { x: (a.x + b.x) / 2, y: (a.y + b.y) / 2 }, turn };
  });
  return best;
}

interface Box {
  x: number;
  y: number;
  width: number;
  height: number;
}
const overlap = (a: Box, b: Box): number =>
  Math.max(0, Math.min(a.x + a.width, b.x + b.width) - Math.max(a.x, b.x)) *
  Math.max(0, Math.min(a.y + a.height, b.y + b.height) - Math.max(a.y, b.y));

/** Where a callout of this size covers least, near a part; the nearer the better. */
export function calloutPlace(scene: Scene, part: ScenePart, width: number, height: number): Box {
  const texts = [...scene.parts.flatMap(({ texts: own }) => own), ...scene.runs.flatMap(({ texts: own }) => own)].map(
    ({ x, y, text, size }) => ({ x, y: y - size, width: text.length * size * 0.86, height: size }),
  );
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
  let best: Box | null = null;
  let least = Infinity;
  for (let dy = -4500; dy <= 5500; dy += 500) {
    for (let dx = -6000; dx <= 6000; dx += 500) {
      const box = { x: middle.x + dx - width / 2, y: middle.y + dy - height / 2, width, height };
      if (box.x < 1300 || box.y < 300 || box.x + width > scene.width - 200 || box.y + height > scene.height - 100)
        continue;
      const near = overlap(box, {
        x: part.x - 400,
        y: part.y - 400,
        width: part.width + 800,
        height: part.height + 1600,
      });
      const covered = [...scene.parts, ...texts].reduce((sum, each) => sum + overlap(box, each), 0);
      const cost =
        40 * near +
        12 * covered +
        3 * runs.reduce((sum, each) => sum + overlap(box, each), 0) +
        260 * Math.hypot(dx, dy);
      if (cost < least) {
        least = cost;
        best = box;
      }
    }
  }
  return best ?? { x: middle.x + 600, y: middle.y + 1500, width, height };
}
