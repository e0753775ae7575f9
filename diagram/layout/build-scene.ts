import { canonical, type Face, type Installation } from '../document/schema';
import { connectionsScene } from './connections-scene';
import { overviewScene } from './overview-scene';
import type { Scene } from './scene';

export interface SceneOptions {
  /** id of the place shown on the connections face; the first of `connectionPages` where left out */
  place?: string;
}

/**
 * A face of the document as things to draw. Works for any valid document, complete or not: parts without a stored
 * position are drawn where the layout would place them. Same document, same scene, whatever the order of its lists.
 */
export function buildScene(doc: Installation, face: Face, options: SceneOptions = {}): Scene {
  const sorted = canonical(doc);
  return face === 'overview' ? overviewScene(sorted) : connectionsScene(sorted, options.place);
}
