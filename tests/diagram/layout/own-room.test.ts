import { describe, expect, it } from 'vitest';
import type { Installation } from '@/diagram/document/schema';
import { buildScene } from '@/diagram/layout/build-scene';
import { draftDocument } from '@/diagram/survey/draft';
import { optionsOf, room } from '../survey/surveys';

/** A board in the room that it feeds, with some ways to other rooms. */
const home = (others: number): Installation =>
  draftDocument(
    [
      room('Porch', { kind: 'intake', lamps: 2, run: 4 }),
      ...Array.from({ length: others }, (_, i) => room(`Room ${i + 1}`, { outlets: 3, run: 9 })),
    ].map((row, order) => ({ ...row, order })),
    optionsOf(),
  );
const place = 'porch';

/** The cores that join the board to what stands in its own room. */
function own(doc: Installation): string[] {
  const here = new Map(doc.parts.filter((part) => part.place === place).map((part) => [part.id, part]));
  const load = (id: string) => ['switch', 'joint', 'lamp'].includes(here.get(id)!.kind);
  return doc.wires
    .filter(({ from, to, cable }) => cable && here.has(from[0]) && here.has(to[0]) && load(from[0]) !== load(to[0]))
    .map(({ id }) => id)
    .sort();
}

describe('a board in the room of its loads', () => {
  it('lets its cores run to them where it is small', () => {
    const doc = home(2);
    expect(own(doc).length).toBe(3);
    const { runs } = buildScene(doc, 'connections', { place });
    for (const id of own(doc)) expect(runs.filter(({ wires }) => wires.includes(id)).map(({ cut }) => cut)).toEqual([undefined]);
  });

  it('lets them leave at its foot and come in over the room where it has more than four ways', () => {
    const doc = home(5);
    const { runs, parts, frames } = buildScene(doc, 'connections', { place });
    const terminal = (id: string, mark: string) => {
      const { x, y } = parts.find((part) => part.id === id)!.terminals.find((t) => t.mark === mark)!;
      return { x, y };
    };
    expect(own(doc).length).toBe(3);
    for (const id of own(doc)) {
      const pair = runs.filter(({ wires }) => wires.includes(id));
      expect(pair.map((run) => run.id)).toEqual([`wire:${id}`, `wire:${id}@board`]);
      for (const { cut, from, to, points } of pair) {
        const [end, at, other] = cut === 'to' ? [from, points[0], points.at(-1)!] : [to, points.at(-1), points[0]!];
        expect(at).toEqual(terminal(...end));
        // it stops at a brace
        const brace = frames.some(
          (f) =>
            f.kind === 'brace' && f.x <= other.x && other.x <= f.x + f.width && Math.abs(other.y - f.y - f.height / 2) < 1000,
        );
        expect([id, cut, brace]).toEqual([id, cut, true]);
      }
      expect(new Set(pair.map(({ cut }) => cut)).size).toBe(2);
    }
    const written = frames.flatMap(({ kind, texts }) => (kind === 'brace' ? [texts.map(({ text }) => text).join(' ')] : []));
    expect(written.filter((words) => words.startsWith('way 1 ')).sort()).toEqual([
      expect.stringMatching(/from Q\d+$/),
      expect.stringMatching(/to S\d+$/),
    ]);
  });
});
