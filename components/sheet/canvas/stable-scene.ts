import type { Scene } from '@/diagram/layout/scene';

const same = (a: unknown, b: unknown): boolean => JSON.stringify(a) === JSON.stringify(b);

function reuse<T extends { id: string }>(before: readonly T[], after: T[]): T[] {
  const old = new Map(before.map((item) => [item.id, item]));
  return after.map((item) => {
    const kept = old.get(item.id);
    return kept && same(kept, item) ? kept : item;
  });
}

/** The new scene with the very objects of the old one where nothing changed, so that only what changed is drawn again. */
export function stableScene(before: Scene | null, after: Scene): Scene {
  if (!before || before.face !== after.face || before.place !== after.place) return after;
  return {
    ...after,
    parts: reuse(before.parts, after.parts),
    runs: reuse(before.runs, after.runs),
    frames: reuse(before.frames, after.frames),
    bands: same(before.bands, after.bands) ? before.bands : after.bands,
    dots: same(before.dots, after.dots) ? before.dots : after.dots,
    rings: same(before.rings, after.rings) ? before.rings : after.rings,
    texts: same(before.texts, after.texts) ? before.texts : after.texts,
  };
}
