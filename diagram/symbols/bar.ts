import type { Face, Kind } from '../document/schema';
import { box, circle } from './strokes';
import { MODULE, type Stroke, type SymbolData, type TerminalPlace } from './types';

/** Bars and joints: as long as their terminals ask for. Terminals lie along the axis; conductors leave up or down. */
export type BarKind = 'line-bar' | 'neutral-bar' | 'earth-bar' | 'joint';

const NAMES: Record<BarKind, [name: string, standard: string]> = {
  'line-bar': ['line bar', 'IEC 60617, conductor, busbar (from memory)'],
  'neutral-bar': ['neutral bar', 'IEC 60617, terminal strip of the neutral (from memory)'],
  'earth-bar': ['earth bar', 'IEC 60617, terminal strip of the protective conductor (from memory)'],
  joint: ['joint', 'IEC 60617, junction of conductors (from memory)'],
};

/** 1/100 mm: the bar's axis below its upper edge, on either face. */
export const BAR_AXIS = 2 * MODULE;
export const BAR_HEIGHT = 4 * MODULE;
/** 1/100 mm between terminals of a bar on the connections face. */
export const BAR_PITCH = 4 * MODULE;
const JOINT_PITCH = 3 * MODULE;
const END = 2 * MODULE;

const pitchOf = (kind: BarKind): number => (kind === 'joint' ? JOINT_PITCH : BAR_PITCH);

/** Length of a bar or joint with `count` terminals on the connections face, 1/100 mm. */
export const barLength = (kind: BarKind, count: number): number => 2 * END + pitchOf(kind) * Math.max(0, count - 1);

/** Where the n-th terminal of a bar lies on the connections face, counted from 0. */
export function barTerminal(kind: BarKind, n: number): TerminalPlace {
  return { x: END + pitchOf(kind) * n, y: BAR_AXIS, side: 'up' };
}

/** Half the thickness of a bar. */
const HALF = 72;
/** Pieces of a bar, so that it is told apart without colour: line whole, neutral in long pieces, earth in short ones. */
const PIECES: Record<BarKind, [piece: number, gap: number] | null> = {
  'line-bar': null,
  'neutral-bar': [750, 125],
  'earth-bar': [375, 125],
  joint: null,
};

function barPath(kind: BarKind, from: number, to: number): string {
  const piece = PIECES[kind];
  const rect = (x: number, end: number) => `M${x} ${BAR_AXIS - HALF}H${end}V${BAR_AXIS + HALF}H${x}Z`;
  if (!piece) return rect(from, to);
  let d = '';
  for (let x = from; x < to; x += piece[0] + piece[1]) d += rect(x, Math.min(x + piece[0], to));
  return d;
}

function strokesOf(kind: BarKind, face: Face, length: number, cased: boolean): Stroke[] {
  if (kind === 'joint')
    return face === 'overview'
      ? [circle(END / 2, END / 2, 110, 'ink')]
      : [box(0, MODULE, length, BAR_HEIGHT - 2 * MODULE)];
  return [{ d: barPath(kind, 0, length), fill: cased ? 'paper' : 'ink' }];
}

/**
 * The picture of a bar or joint of a given length; a joint on the overview is a dot.
 * @param cased a line bar behind an inverter: an outline with a light core
 */
export function barSymbol(kind: BarKind, face: Face, length: number, cased = false): SymbolData {
  const dot = kind === 'joint' && face === 'overview';
  return {
    id: `${kind}${face === 'overview' ? '' : '.box'}${cased ? '.cased' : ''}`,
    name: NAMES[kind][0],
    standard: NAMES[kind][1],
    kinds: [kind satisfies Kind],
    width: dot ? END : length,
    height: dot ? END : BAR_HEIGHT,
    strokes: strokesOf(kind, face, length, cased),
    terminals: {},
  };
}
