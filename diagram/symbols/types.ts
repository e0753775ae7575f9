import type { Kind } from '../document/schema';

/**
 * A symbol: its own strokes on the 2.5 mm module, after IEC 60617. All lengths are 1/100 mm, integers; the origin is the
 * symbol's upper left corner. Screen, legend, SVG and PDF draw from this and nothing else.
 */
export interface Stroke {
  /** SVG path data, absolute or relative, M L H V C A Z only */
  d: string;
  weight?: 'thin' | 'normal' | 'heavy';
  fill?: 'ink' | 'paper' | 'none';
  dash?: 'short' | 'long';
}

export interface SymbolText {
  x: number;
  y: number;
  text: string;
  /** 1/100 mm, height of the capitals */
  size: number;
  anchor?: 'start' | 'middle' | 'end';
}

/** The side at which a conductor leaves the terminal. */
export type Side = 'up' | 'right' | 'down' | 'left';

export interface TerminalPlace {
  x: number;
  y: number;
  side: Side;
}

export interface SymbolData {
  id: string;
  /** for the legend: "circuit-breaker" */
  name: string;
  /** the standard's own name of the symbol, and the mark "from memory" where its page was not open */
  standard: string;
  kinds: readonly Kind[];
  width: number;
  height: number;
  strokes: readonly Stroke[];
  texts?: readonly SymbolText[];
  /** by terminal mark; a bar's terminals lie along it (see `barTerminal`) */
  terminals: Readonly<Record<string, TerminalPlace>>;
}

/** Stroke widths, 1/100 mm: three and no more. */
export const STROKE = { thin: 18, normal: 25, heavy: 50 } as const;
/** 1/100 mm: the module all symbols and routes stand on. */
export const MODULE = 250;
