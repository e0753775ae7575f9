import type { Patch } from '@/diagram/document/patch';
import type { Face, Installation } from '@/diagram/document/schema';
import { buildScene } from '@/diagram/layout/build-scene';
import type { Scene } from '@/diagram/layout/scene';
import type { SceneDelta } from './scene-delta';

/** What is to be on the canvas. */
export interface Wanted {
  document: Installation;
  /** the document as it would be, laid over it */
  ghost: Installation | null;
  face: Face;
  /** page of the connections face */
  place: string | null;
}

/** The document whole with the scene on the canvas, where the worker knows nothing yet; then what differs. */
export type Told = {
  face: Face;
  place: string | null;
  /** from the document to the ghost */
  ghost: Patch | null;
} & (
  | {
      document: Installation;
      before: Scene | null;
      /** what is on the canvas is of this document */
      stands: boolean;
    }
  | { patch: Patch }
);

export interface DrawnAnswer {
  /** against the scene before; null where that one stands */
  scene: SceneDelta | null;
  /** against the scene of the same answer */
  ghost: SceneDelta | null;
}

/**
 * A face of a document as it is asked for.
 * @param before what a change neither touches nor blocks stays as it is there
 */
export const sceneOf = (document: Installation, { face, place }: Pick<Wanted, 'face' | 'place'>, before: Scene | null): Scene =>
  buildScene(document, face, { before, ...(place !== null && { place }) });
