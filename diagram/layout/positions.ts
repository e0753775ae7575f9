import { byCode, type Position } from '../document/schema';
import { turnedSize } from '../symbols/turn';
import { MODULE } from '../symbols/types';
import { Ground } from './labels';

/** Free places round a wish, nearest first: to the right, the left, below, above. */
export function* around(wish: Position): Generator<Position> {
  yield wish;
  for (let ring = 1; ring <= 60; ring++)
    for (const [dx, dy] of [
      [1, 0],
      [-1, 0],
      [0, 1],
      [0, -1],
      [1, 1],
      [-1, 1],
      [1, -1],
      [-1, -1],
    ] as const)
      yield { ...wish, x: wish.x + dx * ring * 2 * MODULE, y: wish.y + dy * ring * 2 * MODULE };
}

/**
 * Stored positions stand. A part without one goes where the plan has it beside its placed neighbour, or next to that
 * where something stands there already; nothing that has a place is moved for it.
 * @param near ids of the parts a part is wired to
 * @param size of a part's upright symbol
 */
export function fillIn(
  planned: ReadonlyMap<string, Position>,
  stored: Readonly<Record<string, Position>>,
  near: (id: string) => readonly string[],
  size: (id: string) => { width: number; height: number },
): Map<string, Position> {
  const positions = new Map<string, Position>();
  for (const id of [...planned.keys()].sort(byCode)) if (stored[id]) positions.set(id, stored[id]!);
  if (positions.size === 0) return new Map(planned);
  const box = (id: string, at: Position) => ({ x: at.x, y: at.y, ...turnedSize(size(id), at.turn ?? 0) });
  const ground = new Ground();
  for (const [id, at] of positions) ground.add(box(id, at));
  let waiting = [...planned.keys()].filter((id) => !positions.has(id)).sort(byCode);
  const placed = (id: string): string | undefined =>
    [...near(id)].filter((other) => other !== id && positions.has(other)).sort(byCode)[0];
  // in rounds: first what hangs on a placed part, then what hangs on that
  while (waiting.length > 0) {
    const anchored = waiting.filter((id) => placed(id) !== undefined);
    const round = anchored.length > 0 ? anchored : waiting.slice(0, 1);
    for (const id of round) {
      const wish = planned.get(id)!;
      const other = placed(id);
      const [actual, meant] = other === undefined ? [wish, wish] : [positions.get(other)!, planned.get(other)!];
      const at = { ...wish, x: wish.x + actual.x - meant.x, y: wish.y + actual.y - meant.y };
      const free = [...around(at)].find((candidate) => ground.overlap(box(id, candidate), MODULE - 1) === 0) ?? at;
      positions.set(id, free);
      ground.add(box(id, free));
    }
    const done = new Set(round);
    waiting = waiting.filter((id) => !done.has(id));
  }
  return positions;
}
