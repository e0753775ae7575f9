import { canonical, type Face, type Installation } from '../document/schema';
import { connectionsScene } from './connections-scene';
import { overviewScene } from './overview-scene';
import { perDocument } from './per-document';
import type { Scene } from './scene';

/** The document in its one order, the same object for the same document. */
export const canonicalOf = perDocument(canonical);

export interface SceneOptions {
  /** id of the place shown on the connections face; the first of `connectionPages` where left out */
  place?: string;
  /** the same drawing before a change: what the change neither touches nor blocks keeps its way */
  before?: Scene | null;
}

/**
 * A face of the document as things to draw. Works for any valid document, complete or not: parts without a stored
 * position are drawn where the layout would place them. Same document and scene before, same scene, whatever the order
 * of its lists.
 */
export function buildScene(doc: Installation, face: Face, options: SceneOptions = {}): Scene {
  const sorted = canonicalOf(doc);
  const before = options.before ?? undefined;
  return face === 'overview' ? overviewScene(sorted, before) : connectionsScene(sorted, options.place, before);
}
