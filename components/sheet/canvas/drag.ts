import { create } from 'zustand';

/** Parts that are being dragged, and how far, in 1/100 mm. Not in the document: only the drop is a command. */
interface Drag {
  ids: ReadonlySet<string>;
  dx: number;
  dy: number;
}

export const useDrag = create<Drag>(() => ({ ids: new Set(), dx: 0, dy: 0 }));

export const endDrag = (): void => useDrag.setState({ ids: new Set(), dx: 0, dy: 0 });

/** How far a part is dragged now, as a transform; undefined while it is not. One subscription a part. */
export const useShift = (id: string): string | undefined =>
  useDrag(({ ids, dx, dy }) => (ids.has(id) ? `translate(${dx} ${dy})` : undefined));
