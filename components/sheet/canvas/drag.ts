import { create } from 'zustand';

/** Parts that are being dragged, and how far, in 1/100 mm. Not in the document: only the drop is a command. */
interface Drag {
  ids: ReadonlySet<string>;
  dx: number;
  dy: number;
  /** let go: the parts stay here until the drawing that has them here is worked out */
  dropped: boolean;
}

const NOTHING: Drag = { ids: new Set(), dx: 0, dy: 0, dropped: false };

export const useDrag = create<Drag>(() => NOTHING);

export const endDrag = (): void => useDrag.setState(NOTHING);

/** The pointer has let go. @param moved whether the document has the parts elsewhere now */
export const dropDrag = (moved: boolean): void => (moved ? useDrag.setState({ dropped: true }) : endDrag());

/** Another drawing is on the canvas: what was dropped stands in its place on it. */
export const settleDrag = (): void => {
  if (useDrag.getState().dropped) endDrag();
};

/** How far a part is dragged now, as a transform; undefined while it is not. One subscription a part. */
export const useShift = (id: string): string | undefined =>
  useDrag(({ ids, dx, dy }) => (ids.has(id) ? `translate(${dx} ${dy})` : undefined));
