/** px of the canvas at zoom 1 for 1/100 mm: the module of 2.5 mm is 9 px, so that nodes lie on whole pixels. */
export const PX = 0.036;

/** Length of the drawing in px of the canvas. */
export const px = (length: number): number => length * PX;

/** The screen's ink is a little heavier than the paper's, which is printed sharper than a screen shows. */
export const INK = 1.35;
