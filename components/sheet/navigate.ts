import { isBar } from '@/diagram/document/kinds';
import type { End, Installation } from '@/diagram/document/schema';
import { marksOf, wiresAt } from '@/diagram/commands/ends';
import { endKey, type Walk } from '@/diagram/commands/walk';
import type { Scene, ScenePart } from '@/diagram/layout/scene';
import { middle } from './canvas/pick';

/** Where the arrows lead: along the conductors, and beside where no conductor leads on. */

export type Direction = 'up' | 'down' | 'left' | 'right';

/** Steps of a part from its source along the line; along whatever reaches it where no line does. */
function depthOf(doc: Installation, walk: Walk, id: string): number {
  const part = doc.parts.find((candidate) => candidate.id === id);
  if (!part) return Infinity;
  const steps = marksOf(doc, part).flatMap((mark) => walk.get(endKey([id, mark])) ?? []);
  const line = steps.filter((step) => step.conductor === 'L');
  return Math.min(Infinity, ...(line.length > 0 ? line : steps).map((step) => step.depth));
}

const byX = (a: ScenePart, b: ScenePart): number => middle(a).x - middle(b).x || a.y - b.y;

function neighbours(scene: Scene, id: string): ScenePart[] {
  const parts = new Map(scene.parts.map((part) => [part.id, part]));
  const ids = new Set<string>();
  for (const { from, to } of scene.runs) {
    if (from[0] === id) ids.add(to[0]);
    if (to[0] === id) ids.add(from[0]);
  }
  ids.delete(id);
  return [...ids].flatMap((other) => parts.get(other) ?? []).sort(byX);
}

function beside(scene: Scene, from: ScenePart, direction: Direction): ScenePart | null {
  const at = middle(from);
  let best: ScenePart | null = null;
  let least = Infinity;
  for (const part of scene.parts) {
    if (part.id === from.id) continue;
    const to = middle(part);
    const along =
      direction === 'left'
        ? at.x - to.x
        : direction === 'right'
          ? to.x - at.x
          : direction === 'up'
            ? at.y - to.y
            : to.y - at.y;
    const across = direction === 'left' || direction === 'right' ? Math.abs(to.y - at.y) : Math.abs(to.x - at.x);
    if (along <= 0 || across > 3 * along + 500) continue;
    const cost = along + 2 * across;
    if (cost < least) {
      least = cost;
      best = part;
    }
  }
  return best;
}

/**
 * The next part in a direction: up towards the source, down away from it, left and right among those that hang on the same.
 * @returns null where nothing lies that way
 */
export function nextPart(doc: Installation, walk: Walk, scene: Scene, id: string, direction: Direction): string | null {
  const from = scene.parts.find((part) => part.id === id);
  if (!from) return null;
  const depth = depthOf(doc, walk, id);
  const around = neighbours(scene, id).map((part) => ({ part, depth: depthOf(doc, walk, part.id) }));
  const above = around.filter((near) => near.depth < depth).sort((a, b) => a.depth - b.depth);
  if (direction === 'up' && above[0]) return above[0].part.id;
  if (direction === 'down') {
    const below = around.filter((near) => near.depth > depth);
    if (below[0]) return below[0].part.id;
  }
  if ((direction === 'left' || direction === 'right') && above[0]) {
    const siblings = neighbours(scene, above[0].part.id).filter(
      (part) => depthOf(doc, walk, part.id) >= depth || part.id === id,
    );
    const index = siblings.findIndex((part) => part.id === id);
    const next = siblings[index + (direction === 'left' ? -1 : 1)];
    if (index >= 0 && next) return next.id;
  }
  return beside(scene, from, direction)?.id ?? null;
}

/** The terminal at which drawing goes on from a part: the free or outgoing one that lies farthest from the source. */
export function handEnd(doc: Installation, walk: Walk, id: string): End | null {
  const part = doc.parts.find((candidate) => candidate.id === id);
  if (!part) return null;
  const marks = marksOf(doc, part);
  if (isBar(part.kind)) {
    const free = marks.find((mark) => wiresAt(doc, [id, mark]).length === 0);
    return free ? [id, free] : null;
  }
  const line = marks.filter((mark) => walk.get(endKey([id, mark]))?.conductor === 'L');
  const rank = (mark: string): number => walk.get(endKey([id, mark]))?.depth ?? -1;
  const best = [...(line.length > 0 ? line : marks)].sort((a, b) => rank(b) - rank(a))[0];
  return best ? [id, best] : null;
}

/** The first part to take in hand on a sheet: the source, else the uppermost. */
export function firstPart(scene: Scene): string | null {
  const source = scene.parts.find((part) => part.kind === 'supply');
  const top = source ?? [...scene.parts].sort((a, b) => a.y - b.y || a.x - b.x)[0];
  return top?.id ?? null;
}
