import { GLYPH_HEIGHT, box, link } from './strokes';
import type { Stroke, TerminalPlace } from './types';

/** How a device stands on the connections face: a box, each pole between an upper and a lower terminal. */

/** 1/100 mm between the terminals of neighbouring poles. */
export const POLE_PITCH = 1500;
/** 1/100 mm from the box's edge to a terminal. */
export const INSET = 500;
const HEIGHT = 2500;
const FIRST = POLE_PITCH / 2;

export interface BoxedDevice {
  width: number;
  height: number;
  strokes: Stroke[];
  terminals: Record<string, TerminalPlace>;
}

/**
 * A boxed device of one or two poles.
 * @param glyph strokes of one pole at (x, y); the last pole is told so, for what stands once only
 * @param marks upper and lower mark of each pole
 */
export function boxedDevice(
  marks: readonly (readonly [string, string])[],
  glyph: (x: number, y: number, pole: number) => Stroke[],
): BoxedDevice {
  const width = POLE_PITCH * marks.length;
  const top = INSET + (HEIGHT - 2 * INSET - GLYPH_HEIGHT) / 2;
  const strokes: Stroke[] = [box(0, 0, width, HEIGHT)];
  const terminals: Record<string, TerminalPlace> = {};
  marks.forEach(([upper, lower], pole) => {
    const x = FIRST + pole * POLE_PITCH;
    strokes.push({ d: `M${x} ${INSET}V${top}M${x} ${top + GLYPH_HEIGHT}V${HEIGHT - INSET}` }, ...glyph(x, top, pole));
    terminals[upper] = { x, y: INSET, side: 'up' };
    terminals[lower] = { x, y: HEIGHT - INSET, side: 'down' };
  });
  if (marks.length > 1) strokes.push(link(FIRST, top, FIRST + POLE_PITCH));
  return { width, height: HEIGHT, strokes, terminals };
}

export const ONE_POLE = [['1', '2']] as const;
export const TWO_POLES = [
  ['1', '2'],
  ['3', '4'],
] as const;

/** On the overview one pole stands for all: the marks of a column, upper at the top, lower at the bottom. */
export function columnTerminals(x: number, height: number, upper: readonly string[], lower: readonly string[]) {
  const terminals: Record<string, TerminalPlace> = {};
  for (const mark of upper) terminals[mark] = { x, y: 0, side: 'up' };
  for (const mark of lower) terminals[mark] = { x, y: height, side: 'down' };
  return terminals;
}
