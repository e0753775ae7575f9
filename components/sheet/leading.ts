import { bendRun, routeAgain, stretchAcross } from '@/diagram/commands/bend-run';
import { isRefusal } from '@/diagram/commands/types';
import { applyPatch } from '@/diagram/document/patch';
import type { Scene, SceneRun } from '@/diagram/layout/scene';
import { MODULE } from '@/diagram/symbols/types';
import type { Hands } from './hands';

/** Leading runs by hand: with a pointer by a stretch, with keys by the longest stretch that lies across the arrow. */

/** The run in hand, where there is one and no part. */
export function runInHand(scene: Scene, selection: { parts: readonly string[]; wires: readonly string[] }): SceneRun | null {
  if (selection.parts.length > 0) return null;
  return scene.runs.find((run) => run.wires.some((wire) => selection.wires.includes(wire))) ?? null;
}

const held = (hands: Hands): SceneRun | null => runInHand(hands.scene(), hands.store.getState().selection);

/** Leads a stretch of a run along another line, 1/100 mm; the run stays in hand. */
export function leadTo(hands: Hands, run: SceneRun, stretch: number, to: number): void {
  hands.do(bendRun(hands.doc, hands.view.getState().face, run, stretch, to));
}

/** Leads the run in hand by modules: upright stretches to the side, level ones up and down. */
export function leadBy(hands: Hands, dx: number, dy: number): void {
  const run = held(hands);
  if (!run) return;
  const { face } = hands.view.getState();
  let { doc } = hands;
  let last: ReturnType<typeof bendRun> | null = null;
  for (const [axis, by] of [
    ['x', dx],
    ['y', dy],
  ] as const) {
    const stretch = by === 0 ? null : stretchAcross(run, axis);
    if (stretch === null) continue;
    last = bendRun(doc, face, run, stretch, run.points[stretch]![axis] + by * MODULE);
    if (!isRefusal(last)) doc = applyPatch(doc, last.patch);
  }
  if (last) hands.do(last);
  else hands.store.getState().say('No stretch of it lies across that way.');
}

/** The lines on which the stretches would lie that keys have moved so far, as paths to draw. */
export function ledSoFar(run: SceneRun, dx: number, dy: number): string[] {
  return (
    [
      ['x', dx],
      ['y', dy],
    ] as const
  ).flatMap(([axis, by]) => {
    const stretch = by === 0 ? null : stretchAcross(run, axis);
    return stretch === null ? [] : [pathLed(run, stretch, run.points[stretch]![axis] + by * MODULE)];
  });
}

/** The way of a run with one stretch on another line, before the sheet has worked out the rest. */
export function pathLed({ points }: SceneRun, stretch: number, to: number): string {
  const upright = points[stretch]!.x === points[stretch + 1]!.x;
  const moved = [points[stretch]!, points[stretch + 1]!].map(({ x, y }) => (upright ? { x: to, y } : { x, y: to }));
  const way = [...points.slice(0, stretch + 1), ...moved, ...points.slice(stretch + 1)];
  return way.map(({ x, y }, i) => `${i === 0 ? 'M' : 'L'}${x} ${y}`).join('');
}

/** Takes back the stretches led by hand of the runs in hand; with nothing in hand, of the whole face. */
export function routeInHandAgain(hands: Hands): void {
  const { parts, wires } = hands.store.getState().selection;
  const touching = hands.doc.wires
    .filter((wire) => parts.includes(wire.from[0]) || parts.includes(wire.to[0]))
    .map((wire) => wire.id);
  hands.do(routeAgain(hands.doc, hands.view.getState().face, [...wires, ...touching]));
}
