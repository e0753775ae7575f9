import type { Point, Scene, ScenePart, SceneRun } from '@/diagram/layout/scene';
import type { PathStep } from '@/diagram/rehearsal/fault-path';
import { aside, elbow, longest, merged } from './pencil-lines';

/** A stroke of the pencil: the way of the fault's current beside what carries it. Lengths are 1/100 mm. */
export interface PencilStroke {
  key: string;
  points: Point[];
  /** solid on the way out, dashed through earth and neutral */
  out: boolean;
}

/** 1/100 mm beside the wire */
const BESIDE = 230;
/** 1/100 mm beside a bar, where the pencil goes up or down to it */
const CHANNEL = 450;

const BARS: ReadonlySet<string> = new Set(['neutral-bar', 'earth-bar']);
const BOARD: ReadonlySet<string> = new Set([
  'mcb',
  'rcbo',
  'fuse',
  'rcd',
  'isolator',
  'line-bar',
  'inverter',
  'meter',
  'supply',
]);

/** A run that carries the fault, in the direction of its current. */
interface Leg {
  run: SceneRun;
  points: readonly Point[];
  first: string;
  last: string;
  /** its points begin, or stop, at the brace of its cable: the rest of the core is another run */
  begins: boolean;
  stops: boolean;
  steps: PathStep[];
}

const distance = (a: Point, b: Point): number => Math.abs(a.x - b.x) + Math.abs(a.y - b.y);
const middleOf = (part: ScenePart): Point => ({ x: part.x + part.width / 2, y: part.y + part.height / 2 });

class Pencil {
  private readonly parts: ReadonlyMap<string, ScenePart>;
  readonly strokes: PencilStroke[] = [];

  constructor(
    private readonly scene: Scene,
    private readonly path: readonly PathStep[],
    private readonly cableOf: ReadonlyMap<string, string>,
  ) {
    this.parts = new Map(scene.parts.map((part) => [part.id, part]));
  }

  draw(): PencilStroke[] {
    const wires = this.path.filter((step) => step.wire !== undefined);
    const outward = this.legs(wires.filter(({ out }) => out));
    const homeward = this.legs(wires.filter(({ out }) => !out));
    const chains = this.chains(outward);
    for (const chain of chains) this.along(chain, true);
    const ridden = this.home(chains, homeward);
    for (const chain of this.chains(homeward.filter((leg) => !ridden.has(leg)))) this.along(chain, false);
    for (const step of wires) if (!step.out && this.runsOf(step).length === 0) this.across(step);
    return this.strokes;
  }

  /**
   * The runs on which a wire lies: its own, two where it leaves a board and comes in again on the same page; on the overview, where a run stands for a whole cable, that of its cable; else
   * the one between the same two parts.
   */
  private runsOf({ wire, from, to }: PathStep): SceneRun[] {
    const { runs, face } = this.scene;
    const own = runs.filter(({ wires }) => wires.includes(wire!));
    if (own.length > 0 || face === 'connections') return own;
    const cable = this.cableOf.get(wire!);
    const pair = (run: SceneRun) =>
      (run.from[0] === from[0] && run.to[0] === to[0]) || (run.from[0] === to[0] && run.to[0] === from[0]);
    const found = (cable === undefined ? undefined : runs.find((run) => run.cable === cable)) ?? runs.find(pair);
    return found ? [found] : [];
  }

  private legs(steps: readonly PathStep[]): Leg[] {
    const legs = new Map<string, Leg>();
    for (const [step, run] of steps.flatMap((step) => this.runsOf(step).map((run) => [step, run] as const))) {
      const known = legs.get(run.id);
      if (known) {
        known.steps.push(step);
        continue;
      }
      const ahead = this.isForward(run, step);
      const points = ahead ? run.points : [...run.points].reverse();
      const [first, last] = ahead ? [run.from[0], run.to[0]] : [run.to[0], run.from[0]];
      const stops = run.cut === (ahead ? 'to' : 'from');
      legs.set(run.id, { run, points, first, last, stops, begins: run.cut !== undefined && !stops, steps: [step] });
    }
    return [...legs.values()];
  }

  /** Whether a step's current runs along a run from its first point to its last. */
  private isForward(run: SceneRun, { from, to }: PathStep): boolean {
    if (run.from[0] === from[0] || run.to[0] === to[0]) return true;
    if (run.from[0] === to[0] || run.to[0] === from[0]) return false;
    const kind = (id: string) => this.parts.get(id)?.kind ?? '';
    const [starts, finishes] = [BOARD.has(kind(run.from[0])), BOARD.has(kind(run.to[0]))];
    // A core that ends at a bar meets the board at that end of the run, though the run ends at a device.
    if (BARS.has(kind(to[0])) && starts !== finishes) return finishes;
    if (BARS.has(kind(from[0])) && starts !== finishes) return starts;
    const [a, b] = [run.points[0]!, run.points.at(-1)!];
    const near = this.parts.get(to[0]);
    if (near && !BARS.has(near.kind)) return distance(b, middleOf(near)) <= distance(a, middleOf(near));
    const far = this.parts.get(from[0]);
    return !far || BARS.has(far.kind) || distance(a, middleOf(far)) <= distance(b, middleOf(far));
  }

  /** Legs one after the other, as the current takes them. */
  private chains(legs: readonly Leg[]): Leg[][] {
    const left = new Set(legs);
    const chains: Leg[][] = [];
    const starts = legs.filter((leg) => leg.begins || !legs.some((other) => other.last === leg.first));
    for (const start of [...starts, ...legs]) {
      if (!left.has(start)) continue;
      const chain: Leg[] = [];
      for (let leg: Leg | undefined = start; leg;) {
        left.delete(leg);
        chain.push(leg);
        const { last, stops }: Leg = leg;
        // where a run stops at the brace of its cable, the pencil is set down anew
        leg = stops ? undefined : [...left].find(({ first, begins }) => first === last && !begins);
      }
      chains.push(chain);
    }
    return chains;
  }

  private along(chain: readonly Leg[], out: boolean): void {
    const line = aside(merged(chain.map(({ points }) => points)), BESIDE);
    if (line.length > 1) this.strokes.push({ key: `${chain[0]!.run.id} ${out}`, points: line, out });
    if (!out) this.toBars(chain, line);
  }

  /**
   * The way home beside the way out: from the faulted part back along the same cables to the board, though the overview draws
   * their line alone. @returns the legs that it covers
   */
  private home(chains: readonly Leg[][], homeward: readonly Leg[]): Set<Leg> {
    const ridden = new Set<Leg>();
    if (this.scene.face === 'connections') return ridden;
    const carries = (leg: Leg) => homeward.find(({ run }) => run === leg.run);
    for (const chain of chains) {
      const way = chain.findLastIndex(
        (leg) => BOARD.has(this.parts.get(leg.first)?.kind ?? '') && !BOARD.has(this.parts.get(leg.last)?.kind ?? ''),
      );
      if (way < 0 || !carries(chain[way]!)) continue;
      const tail = chain.slice(way);
      const back = tail.map(({ points }) => [...points].reverse()).reverse();
      const line = aside(merged(back), BESIDE);
      this.strokes.push({ key: `${chain[way]!.run.id} home`, points: line, out: false });
      const covered = tail.flatMap((leg) => carries(leg) ?? []);
      for (const leg of covered) ridden.add(leg);
      this.toBars(covered, line);
    }
    return ridden;
  }

  /** From the end of a stroke to the bars at which its cores end. */
  private toBars(legs: readonly Leg[], line: readonly Point[]): void {
    const done = new Set<string>();
    for (const { steps, first, last } of legs) {
      for (const { from, to } of steps) {
        for (const [id, ends] of [
          [from[0], false],
          [to[0], true],
        ] as const) {
          const bar = this.parts.get(id);
          if (!bar || !BARS.has(bar.kind) || id === first || id === last || done.has(id)) continue;
          done.add(id);
          const way = wayToBar(ends ? line.at(-1)! : line[0]!, bar);
          this.strokes.push({ key: `${line[0]!.x} ${id}`, points: ends ? way : [...way].reverse(), out: false });
        }
      }
    }
  }

  /** A core that no run shows: straight across, between the two parts at which it ends. */
  private across({ wire, from, to }: PathStep): void {
    const [a, b] = [this.parts.get(from[0]), this.parts.get(to[0])];
    if (!a || !b) return;
    const bar = BARS.has(b.kind) ? b : BARS.has(a.kind) ? a : undefined;
    const other = bar === b ? a : b;
    const tip = { x: other.x, y: middleOf(other).y };
    const way = bar ? wayToBar(tip, bar) : elbow(middleOf(a), middleOf(b));
    this.strokes.push({ key: `across ${wire}`, points: bar === a ? [...way].reverse() : way, out: false });
  }
}

/** The way to a bar that stands apart: aside at this level, up or down beside the bar, to its nearer end. */
function wayToBar(from: Point, bar: ScenePart): Point[] {
  const y = bar.y + bar.height / 2;
  const right = from.x > bar.x + bar.width;
  const x = right ? bar.x + bar.width + CHANNEL : bar.x - CHANNEL;
  return [from, { x, y: from.y }, { x, y }, { x: right ? bar.x + bar.width : bar.x, y }];
}

/**
 * The pencil strokes of a fault's path on a face: beside each run that carries it, and along to the bars that stand apart.
 * @param cableOf id of each wire's cable, of those that have one
 */
export const pencilStrokes = (
  scene: Scene,
  path: readonly PathStep[],
  cableOf: ReadonlyMap<string, string>,
): PencilStroke[] => new Pencil(scene, path, cableOf).draw();

/** 1/100 mm: a shorter stretch bears no arrow */
const BEARS_ARROW = 1400;

/** The head of an arrow in the middle of the longest stretch of a stroke, in its direction; null on a short one. */
export function arrowOf({ points }: PencilStroke): { at: Point; turn: number } | null {
  const stretch = longest(points);
  if (!stretch || distance(stretch.a, stretch.b) < BEARS_ARROW) return null;
  const { a, b } = stretch;
  const turn = b.x > a.x ? 0 : b.y > a.y ? 90 : b.x < a.x ? 180 : 270;
  return { at: { x: (a.x + b.x) / 2, y: (a.y + b.y) / 2 }, turn };
}
