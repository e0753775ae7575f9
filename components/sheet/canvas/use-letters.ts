import { useStore } from 'reactflow';

/** the zoom below which small lettering is left out: it could not be read */
const LETTERS_FROM = 0.42;

/** Whether the canvas is large enough on the screen for small lettering. */
export const useLetters = (): boolean => useStore((state) => state.transform[2] >= LETTERS_FROM);
