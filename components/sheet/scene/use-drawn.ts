'use client';

import { useEffect, useRef, useState, useSyncExternalStore } from 'react';
import { diff, isEmptyPatch } from '@/diagram/document/patch';
import type { Installation } from '@/diagram/document/schema';
import type { Scene } from '@/diagram/layout/scene';
import { browserDrawer, type Drawer, type Shown } from './drawer';
import type { Wanted } from './wanted';

const never = () => () => undefined;

/**
 * False on the server and in the first paint, which show paper, border and title block: the drawing itself is drawn in the
 * browser alone, once, and not sent as pages of markup as well.
 */
const useBrowser = (): boolean =>
  useSyncExternalStore(
    never,
    () => true,
    () => false,
  );

/** A scene in JSON and the document of which the server worked it out. */
export interface FirstScene {
  scene: string | null;
  of: Installation;
}

/** The server's scene, where it is of this very drawing. */
function firstShown(wanted: Wanted, first: FirstScene): Shown | null {
  if (typeof window === 'undefined' || first.scene === null) return null;
  // A sheet that is turned to later may show work of this window that the server has not yet.
  const same = wanted.document === first.of || isEmptyPatch(diff(wanted.document, first.of));
  return same ? { of: { ...wanted, ghost: null }, scene: JSON.parse(first.scene) as Scene, ghost: null } : null;
}

export interface Drawn {
  /** null until there is one */
  scene: Scene | null;
  /** laid over the scene; it stays until what has been made of it is drawn */
  ghost: Scene | null;
  /** the document that the scene shows: a moment behind the newest */
  of: Installation;
}

/** ms after which a sheet that was opened has its worker made ready, so that the first edit finds it so */
const READY_AFTER = 1500;

/** What the canvas shows: the document, its page and its ghost, worked out beside the page as they change. */
export function useDrawn({ document, ghost, face, place }: Wanted, first: FirstScene): Drawn {
  const browser = useBrowser();
  const drawer = useRef<Drawer | null>(null);
  const [shown, setShown] = useState(() => firstShown({ document, ghost, face, place }, first));
  const [failure, setFailure] = useState<{ error: unknown } | null>(null);
  const begun = useRef(shown);

  useEffect(() => {
    const mine = browserDrawer(begun.current);
    drawer.current = mine;
    const timer = setTimeout(() => mine.warm(), READY_AFTER);
    return () => {
      clearTimeout(timer);
      mine.close();
      drawer.current = null;
    };
  }, []);
  useEffect(() => {
    const mine = drawer.current;
    const here = () => drawer.current === mine;
    mine?.draw({ document, ghost, face, place }).then(
      (next) => here() && next && setShown(next),
      (error: unknown) => here() && setFailure({ error }),
    );
  }, [document, ghost, face, place]);

  if (failure) throw failure.error;
  if (!browser || !shown) return { scene: null, ghost: null, of: document };
  const taken = ghost === null && shown.of.document === document;
  return { scene: shown.scene, ghost: taken ? null : shown.ghost, of: shown.of.document };
}
