import 'server-only';
import type { Face, Installation } from '@/diagram/document/schema';
import { buildScene } from '@/diagram/layout/build-scene';
import { connectionPages } from '@/diagram/layout/connections-scene';

/** Parts beyond which the browser works the drawing out: here it would keep everybody else waiting. */
const MOST_PARTS = 800;
/** Drawings that are kept as text; each is as long as its document. */
const KEPT = 40;

/** By document, which is another object after each change; oldest first. */
const known = new Map<Installation, Map<string, string>>();

/**
 * A face of a document as its scene in JSON, which a browser reads many times faster than it works it out; null where
 * that is left to the browser. It is worked out once for all who open that revision.
 * @param place page of the connections face; the first where it names none
 */
export function firstScene(document: Installation, face: Face, place: string | null = null): string | null {
  if (document.parts.length > MOST_PARTS) return null;
  const pages = face === 'connections' ? connectionPages(document) : [];
  const page = (pages.find((candidate) => candidate.place === place) ?? pages[0])?.place;
  const faces = known.get(document) ?? new Map<string, string>();
  known.delete(document);
  known.set(document, faces);
  const key = `${face} ${page ?? ''}`;
  let scene = faces.get(key);
  // A copy of the document, so that what the layout keeps of it goes with it.
  if (scene === undefined)
    faces.set(key, (scene = JSON.stringify(buildScene({ ...document }, face, page === undefined ? {} : { place: page }))));
  for (const [oldest] of known) {
    if (known.size <= KEPT) break;
    known.delete(oldest);
  }
  return scene;
}
