import { applyPatch, isEmptyPatch } from '@/diagram/document/patch';
import type { Installation } from '@/diagram/document/schema';
import type { Scene } from '@/diagram/layout/scene';
import { deltaOf, withDelta } from './scene-delta';
import { sceneOf, type DrawnAnswer, type Told } from './wanted';

/** What draws for one sheet: it keeps the document and its scene, and answers by what differs. */
export function drawWith(): (told: Told) => DrawnAnswer {
  let document: Installation | null = null;
  /** the scene that the page has, and what it is of */
  let scene: Scene | null = null;
  let of: { document: Installation; page: string } | null = null;

  return (told) => {
    const page = `${told.face} ${told.place ?? ''}`;
    if ('document' in told) {
      ({ document, before: scene } = told);
      of = told.stands ? { document, page } : null;
      // Asked for nothing but to be ready: what has been done once is done many times faster.
      if (told.stands && !told.ghost) sceneOf({ ...document }, told, scene);
    } else if (!document) throw new Error('A change came before the document it changes.');
    else if (!isEmptyPatch(told.patch)) document = applyPatch(document, told.patch);
    const stands = of?.document === document && of.page === page;
    const delta = stands ? null : deltaOf(scene, sceneOf(document, told, scene));
    const next = delta ? withDelta(scene, delta) : scene;
    const ghost = told.ghost && deltaOf(next, sceneOf(applyPatch(document, told.ghost), told, next));
    scene = next;
    of = { document, page };
    return { scene: delta, ghost };
  };
}
