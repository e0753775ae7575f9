import { describe, expect, it } from 'vitest';
import { applyPatch } from '@/diagram/document/patch';
import type { Face, Installation, Part, Wire } from '@/diagram/document/schema';
import { buildScene } from '@/diagram/layout/build-scene';
import { connectionPages } from '@/diagram/layout/connections-page';
import { placeAll } from '@/diagram/layout/place';
import type { Scene } from '@/diagram/layout/scene';
import * as check from './checks';
import { draftedHomes, toldHome } from './homes';

/** A change leaves alone the ways that it neither touches nor blocks. */

const placed = (doc: Installation): Installation => applyPatch(doc, placeAll(doc));
const homes = [toldHome(), ...draftedHomes(5, 33)]
  .filter((doc) => doc.parts.some(({ kind }) => kind === 'mcb') && doc.parts.length < 200)
  .map(placed);

/** A lamp more in the last room, wired to the first way. */
function grown(doc: Installation): Installation {
  const way = doc.parts.find(({ kind }) => kind === 'mcb')!;
  const lamp: Part = { id: 'new-lamp', kind: 'lamp', place: doc.places.at(-1)!.id, watts: 9 };
  const wire: Wire = { id: 'new-wire', from: [way.id, '2'], to: ['new-lamp', 'L'], role: 'line' };
  return placed(applyPatch(doc, { set: { parts: [lamp], wires: [wire] } }));
}

const pages = (doc: Installation): [Face, string | undefined][] => [
  ['overview', undefined],
  ...connectionPages(doc).map(({ place }): [Face, string] => ['connections', place]),
];
const scene = (doc: Installation, face: Face, place: string | undefined, before?: Scene): Scene =>
  buildScene(doc, face, { before, ...(place !== undefined && { place }) });

describe('ways that stay', () => {
  it('keeps every way whose ends stand still and that nothing new stands in', { timeout: 120_000 }, () => {
    let kept = 0;
    let moved = 0;
    for (const doc of homes) {
      const more = grown(doc);
      for (const [face, place] of pages(doc)) {
        const before = scene(doc, face, place);
        const after = scene(more, face, place, before);
        const changed = after.parts.filter(
          (part) => !before.parts.some((old) => old.id === part.id && JSON.stringify(old.terminals) === JSON.stringify(part.terminals)),
        );
        for (const old of before.runs) {
          const now = after.runs.find(({ id }) => id === old.id);
          if (!now) continue;
          const still = [0, -1].every((i) => JSON.stringify(old.points.at(i)) === JSON.stringify(now.points.at(i)));
          const blocked = changed.some(({ x, y, width, height }) =>
            old.points.slice(1).some((b, i) => {
              const a = old.points[i]!;
              return (
                Math.min(a.x, b.x) <= x + width &&
                Math.max(a.x, b.x) >= x &&
                Math.min(a.y, b.y) <= y + height &&
                Math.max(a.y, b.y) >= y
              );
            }),
          );
          if (!still || blocked) moved++;
          else {
            expect(JSON.stringify([face, place, old.id, now.points])).toBe(JSON.stringify([face, place, old.id, old.points]));
            kept++;
          }
        }
        for (const broken of [check.throughParts, check.overlaidRuns]) expect(broken(more, after)).toEqual([]);
      }
    }
    expect(kept).toBeGreaterThan(300);
    expect(moved).toBeLessThan(kept / 10);
  });

  it('gives the same bytes for the same drawing and the same scene before', { timeout: 60_000 }, () => {
    const [doc] = homes as [Installation];
    const more = grown(doc);
    for (const [face, place] of pages(doc).slice(0, 3)) {
      const before = scene(doc, face, place);
      expect(JSON.stringify(scene(doc, face, place, before))).toBe(JSON.stringify(before));
      const once = JSON.stringify(scene(more, face, place, before));
      expect(JSON.stringify(scene(check.permuted(more, 5), face, place, structuredClone(before)))).toBe(once);
    }
  });
});
