import { byCode, type Position } from '../document/schema';
import { symbolFor } from '../symbols';
import { turnedSize } from '../symbols/turn';
import { MODULE } from '../symbols/types';
import type { OverviewPlan } from './overview-plan';
import { Ground } from './labels';
import type { Box } from './route-grid';

/** Stored positions stand; a part without one goes where the plan puts it beside its placed neighbour, or next to that. */

const boxOf = (plan: OverviewPlan, id: string, at: Position): Box => {
  const symbol = symbolFor(plan.graph.byId.get(id)!, 'overview');
  return { x: at.x, y: at.y, ...turnedSize(symbol, at.turn ?? 0) };
};

/** Free places round a wish, nearest first: to the right, the left, below, above. */
export function* around(wish: Position): Generator<Position> {
  yield wish;
  for (let ring = 1; ring <= 60; ring++)
    for (const [dx, dy] of [[1, 0], [-1, 0], [0, 1], [0, -1], [1, 1], [-1, 1], [1, -1], [-1, -1]] as const)
      yield { ...wish, x: wish.x + dx * ring * 2 * MODULE, y: wish.y + dy * ring * 2 * MODULE };
}

/** The position of every drawn part. */
export function overviewPositions(plan: OverviewPlan, stored: Readonly<Record<string, Position>>): Map<string, Position> {
  const kept = [...plan.positions.keys()].filter((id) => stored[id]);
  if (kept.length === 0) return plan.positions;
  const positions = new Map(kept.map((id) => [id, stored[id]!]));
  const missing = [...plan.positions.keys()].filter((id) => !stored[id]).sort(byCode);
  if (missing.length === 0) return positions;
  const ground = new Ground();
  for (const [id, at] of positions) ground.add(boxOf(plan, id, at));
  // in rounds: first what hangs on a placed part, then what hangs on that
  let waiting = missing;
  while (waiting.length > 0) {
    const anchored = waiting.filter((id) => neighbour(plan, id, positions) !== null);
    const round = anchored.length > 0 ? anchored : waiting.slice(0, 1);
    for (const id of round) {
      const wish = plan.positions.get(id)!;
      const near = neighbour(plan, id, positions);
      const shift = near === null ? { x: 0, y: 0 } : { x: positions.get(near)!.x - plan.positions.get(near)!.x, y: positions.get(near)!.y - plan.positions.get(near)!.y };
      let chosen: Position = { ...wish, x: wish.x + shift.x, y: wish.y + shift.y };
      for (const at of around(chosen)) {
        if (ground.overlap(boxOf(plan, id, at), MODULE - 1) > 0) continue;
        chosen = at;
        break;
      }
      positions.set(id, chosen);
      ground.add(boxOf(plan, id, chosen));
    }
    const done = new Set(round);
    waiting = waiting.filter((id) => !done.has(id));
  }
  return positions;
}

/** A placed part at the other end of one of its runs; the first by id. */
function neighbour(plan: OverviewPlan, id: string, positions: ReadonlyMap<string, Position>): string | null {
  const near = (plan.graph.at.get(id) ?? []).map((run) => (run.from[0] === id ? run.to[0] : run.from[0])).filter((other) => other !== id && positions.has(other));
  return near.sort(byCode)[0] ?? null;
}
