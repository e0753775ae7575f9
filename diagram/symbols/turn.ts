import type { Side, TerminalPlace } from './types';

/** Quarter turns of symbols, clockwise. */
export type Turn = 0 | 1 | 2 | 3;

const SIDES: readonly Side[] = ['up', 'right', 'down', 'left'];

export const turnedSide = (side: Side, turn: Turn): Side => SIDES[(SIDES.indexOf(side) + turn) % 4]!;

/** Width and height after turning. */
export const turnedSize = (size: { width: number; height: number }, turn: Turn): { width: number; height: number } =>
  turn % 2 === 0 ? { width: size.width, height: size.height } : { width: size.height, height: size.width };

/** A point of a symbol after turning, measured from the upper left corner of the turned box. */
export function turnedPoint(
  x: number,
  y: number,
  size: { width: number; height: number },
  turn: Turn,
): { x: number; y: number } {
  switch (turn) {
    case 0:
      return { x, y };
    case 1:
      return { x: size.height - y, y: x };
    case 2:
      return { x: size.width - x, y: size.height - y };
    case 3:
      return { x: y, y: size.width - x };
  }
}

export function turnedTerminal(
  place: TerminalPlace,
  size: { width: number; height: number },
  turn: Turn,
): TerminalPlace {
  return { ...turnedPoint(place.x, place.y, size, turn), side: turnedSide(place.side, turn) };
}

/** The SVG transform that puts a symbol's own strokes, turned, with its box's upper left corner at (x, y). */
export function turnTransform(x: number, y: number, size: { width: number; height: number }, turn: Turn): string {
  switch (turn) {
    case 0:
      return `translate(${x} ${y})`;
    case 1:
      return `translate(${x + size.height} ${y}) rotate(90)`;
    case 2:
      return `translate(${x + size.width} ${y + size.height}) rotate(180)`;
    case 3:
      return `translate(${x} ${y + size.width}) rotate(270)`;
  }
}
