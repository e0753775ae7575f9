import type { End, Wire } from '../../document/schema';
import type { Context } from '../context';
import type { Remedy } from '../types';
import { say } from './words';

const at = (wire: Wire, part: string, mark?: string): boolean =>
  [wire.from, wire.to].some(([id, end]) => id === part && (mark === undefined || end === mark));
const far = (wire: Wire, part: string): End => (wire.from[0] === part ? wire.to : wire.from);

/**
 * "Lead the line through S1": the switch leaves the neutral of a lamp and goes into its line, with the wires that are there.
 * Offered for one switch and one lamp, each terminal with one wire.
 */
export function throughTheLine(context: Context, contact: string, point: string): Remedy[] {
  const { wires } = context.document;
  const sw = context.graph.parts.get(contact)!;
  if (sw.kind !== 'switch' && sw.kind !== 'regulator') return [];
  const only = (part: string, mark: string) => wires.filter((wire) => at(wire, part, mark));
  const [line, neutral] = [only(point, 'L'), only(point, 'N')];
  const sides = ['1', '2'].map((mark) => only(contact, mark));
  if ([line, neutral, ...sides].some((each) => each.length !== 1)) return [];
  const between = neutral[0]!;
  const supply = sides.map((each) => each[0]!).find((wire) => wire !== between);
  if (!at(between, contact) || !supply) return [];
  const inMark = at(supply, contact, '1') ? '1' : '2';
  const outMark = inMark === '1' ? '2' : '1';
  const moved: Wire[] = [
    { ...line[0]!, from: far(line[0]!, point), to: [contact, inMark], role: 'line' },
    { ...between, from: [contact, outMark], to: [point, 'L'], role: 'switched' },
    { ...supply, from: far(supply, contact), to: [point, 'N'], role: 'neutral' },
  ];
  return [{ label: `Lead the line through ${say(context, contact)}`, patch: { set: { wires: moved } } }];
}
