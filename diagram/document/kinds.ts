import type { Kind, Part } from './schema';

/** Terminals of a part and the joints inside it. One table, used by the engine, the symbols and the editor. */

/** The fixed terminal marks of a kind with all its poles; bars and joints take any positive integer instead. */
const MARKS: Record<Exclude<Kind, 'line-bar' | 'neutral-bar' | 'earth-bar' | 'joint'>, readonly string[]> = {
  supply: ['L', 'N', 'E'],
  fuse: ['1', '2'],
  meter: ['1', '2', '3', '4'],
  isolator: ['1', '2', '3', '4'],
  mcb: ['1', '2', '3', '4'],
  rcd: ['1', '2', '3', '4'],
  rcbo: ['1', '2', '3', '4'],
  spd: ['L', 'N', 'E'],
  electrode: ['E'],
  changeover: ['A1', 'A3', 'B1', 'B3', '2', '4'],
  inverter: ['in.L', 'in.N', 'in.E', 'out.L', 'out.N', 'out.E', 'bat.+', 'bat.-'],
  battery: ['+', '-'],
  socket: ['L', 'N', 'E'],
  plug: ['L', 'N', 'E'],
  switch: ['1', '2'],
  'switch-2way': ['C', '1', '2'],
  'switch-cross': ['1', '2', '3', '4'],
  'switch-2pole': ['1', '2', '3', '4'],
  regulator: ['1', '2'],
  lamp: ['L', 'N', 'E'],
  fan: ['L', 'N', 'E'],
  appliance: ['L', 'N', 'E'],
  bond: ['E'],
};

const BARS: ReadonlySet<Kind> = new Set(['line-bar', 'neutral-bar', 'earth-bar', 'joint']);

/** True for parts all of whose terminals are one net: bars and joints. */
export const isBar = (kind: Kind): boolean => BARS.has(kind);

/** Poles of a device that can have one or two; two where the drawing does not say. A one-pole mcb is the usual one. */
export function polesOf(part: Part): 1 | 2 {
  switch (part.kind) {
    case 'mcb':
      return part.poles ?? 1;
    case 'isolator':
    case 'changeover':
      return part.poles ?? 2;
    case 'rcd':
    case 'rcbo':
    case 'switch-2pole':
      return 2;
    default:
      return 1;
  }
}

/** The terminal marks a part has; empty for bars and joints (see {@link hasTerminal}). */
export function terminalsOf(part: Part): readonly string[] {
  if (part.kind === 'line-bar' || part.kind === 'neutral-bar' || part.kind === 'earth-bar' || part.kind === 'joint') return [];
  const marks = MARKS[part.kind];
  if (polesOf(part) === 1) {
    if (part.kind === 'mcb' || part.kind === 'isolator') return marks.slice(0, 2);
    if (part.kind === 'changeover') return ['A1', 'B1', '2'];
  }
  return marks;
}

/** True when `mark` is a terminal of the part; `count` limits the terminals of a bar. */
export function hasTerminal(part: Part, mark: string): boolean {
  if (part.kind === 'line-bar' || part.kind === 'neutral-bar' || part.kind === 'earth-bar' || part.kind === 'joint')
    return /^[1-9]\d{0,3}$/.test(mark) && (part.count === undefined || Number(mark) <= part.count);
  return terminalsOf(part).includes(mark);
}

/** The letter of a part's reference designation, IEC 81346-2 as used in the trade. */
export const REF_LETTER: Record<Kind, string> = {
  supply: 'W',
  fuse: 'F',
  meter: 'P',
  isolator: 'Q',
  mcb: 'Q',
  rcd: 'Q',
  rcbo: 'Q',
  spd: 'F',
  'line-bar': 'X',
  'neutral-bar': 'X',
  'earth-bar': 'X',
  joint: 'X',
  electrode: 'X',
  changeover: 'Q',
  inverter: 'G',
  battery: 'G',
  socket: 'X',
  plug: 'X',
  switch: 'S',
  'switch-2way': 'S',
  'switch-cross': 'S',
  'switch-2pole': 'S',
  regulator: 'R',
  lamp: 'E',
  fan: 'M',
  appliance: 'E',
  bond: 'X',
};

/** What the trade calls each kind, for lists, legends and screen readers. */
export const KIND_NAME: Record<Kind, string> = {
  supply: 'supply',
  fuse: 'fuse',
  meter: 'meter',
  isolator: 'isolator',
  mcb: 'mcb',
  rcd: 'rcd',
  rcbo: 'rcbo',
  spd: 'surge arrester',
  'line-bar': 'line bar',
  'neutral-bar': 'neutral bar',
  'earth-bar': 'earth bar',
  joint: 'joint',
  electrode: 'earth electrode',
  changeover: 'changeover switch',
  inverter: 'inverter',
  battery: 'battery',
  socket: 'outlet',
  plug: 'plug',
  switch: 'switch',
  'switch-2way': 'two-way switch',
  'switch-cross': 'cross switch',
  'switch-2pole': 'two-pole switch',
  regulator: 'fan regulator',
  lamp: 'lamp',
  fan: 'fan',
  appliance: 'appliance',
  bond: 'bond',
};
