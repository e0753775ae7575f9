import { KIND_NAME, isBar } from '../document/kinds';
import { byCode, type Installation, type Part, type Wire } from '../document/schema';
import type { Practice } from '../practices/types';
import { requireNonNegative } from './requirements';

export interface TakeOffLine {
  /** key into the price list, also what is printed: "cable 1.5 mm2 BN" */
  what: string;
  group: 'cable' | 'containment' | 'device' | 'accessory' | 'load';
  unit: 'm' | 'piece';
  quantity: number;
}

/** Kinds that are bought by the piece, and under which heading. */
const GROUP_OF: Partial<Record<Part['kind'], TakeOffLine['group']>> = {
  fuse: 'device',
  isolator: 'device',
  mcb: 'device',
  rcd: 'device',
  rcbo: 'device',
  spd: 'device',
  changeover: 'device',
  inverter: 'device',
  battery: 'device',
  electrode: 'device',
  socket: 'accessory',
  plug: 'accessory',
  switch: 'accessory',
  'switch-2way': 'accessory',
  'switch-cross': 'accessory',
  'switch-2pole': 'accessory',
  regulator: 'accessory',
  'line-bar': 'device',
  'neutral-bar': 'device',
  'earth-bar': 'device',
  lamp: 'load',
  fan: 'load',
  appliance: 'load',
};

function nameOf(part: Part): string {
  const words: string[] = [KIND_NAME[part.kind]];
  if ('pattern' in part && part.pattern) words.push(part.pattern);
  if ('poles' in part && part.poles && !isBar(part.kind)) words.push(`${part.poles}-pole`);
  if ('curve' in part && part.curve) words.push(`type ${part.curve}`);
  if ('rating' in part && part.rating !== undefined) words.push(`${part.rating} A`);
  if ('sensitivity' in part && part.sensitivity !== undefined) words.push(`${Math.round(part.sensitivity * 1000)} mA`);
  if (part.kind === 'inverter' && part.va !== undefined) words.push(`${part.va} VA`);
  if (part.kind === 'battery' && part.volts !== undefined && part.ah !== undefined)
    words.push(`${part.volts} V ${part.ah} Ah`);
  return words.join(' ');
}

/**
 * What is bought for a drawing: metres of single core by size and colour, with wastage; metres of conduit or trunking
 * where
 * the method asks for it; devices and accessories by the piece. Supply and meter are the distributor's.
 * @param wastage share added to every length, 0.1 for a tenth
 * @throws RangeError naming wastage
 */
export function takeOff(doc: Installation, practice: Practice, wastage: number): TakeOffLine[] {
  requireNonNegative('wastage', wastage);
  const lines = new Map<string, TakeOffLine>();
  const add = (line: Omit<TakeOffLine, 'quantity'>, quantity: number) => {
    const known = lines.get(line.what);
    if (known) known.quantity += quantity;
    else lines.set(line.what, { ...line, quantity });
  };
  const cables = new Map(doc.cables.map((cable) => [cable.id, cable]));
  const colourOf = (wire: Wire) => wire.colour ?? practice.colourSchemes[0].colours[wire.role].value[0];
  for (const wire of doc.wires) {
    const cable = wire.cable === undefined ? undefined : cables.get(wire.cable);
    if (!cable) continue;
    const csa = wire.role === 'earth' ? (cable.cpc ?? cable.csa) : cable.csa;
    const what = `core ${csa} mm2 ${colourOf(wire)}${cable.material === 'Al' ? ' aluminium' : ''}${cable.insulation === 'XLPE' ? ' XLPE' : ''}`;
    add({ what, group: 'cable', unit: 'm' }, cable.length * (1 + wastage));
  }
  for (const cable of doc.cables) {
    if (cable.method === 'C') continue;
    const what = cable.method === 'D1' ? 'duct in the ground' : `conduit or trunking, method ${cable.method}`;
    add({ what, group: 'containment', unit: 'm' }, cable.length * (1 + wastage));
  }
  for (const part of doc.parts) {
    const group = GROUP_OF[part.kind];
    if (group) add({ what: nameOf(part), group, unit: 'piece' }, part.kind === 'battery' ? (part.count ?? 1) : 1);
  }
  return [...lines.values()].sort((a, b) => byCode(a.group, b.group) || byCode(a.what, b.what));
}

export interface PricedLine extends TakeOffLine {
  /** null where the firm's list has no price for it */
  each: number | null;
  sum: number | null;
}

/**
 * Prices a take-off from the firm's own list; the tax is the share as entered.
 * @returns the lines, what has no price, and totals of the priced ones
 * @throws RangeError naming taxShare or the price
 */
export function priced(
  lines: readonly TakeOffLine[],
  prices: Readonly<Record<string, number>>,
  taxShare: number,
): { lines: PricedLine[]; unpriced: string[]; net: number; tax: number; total: number } {
  requireNonNegative('taxShare', taxShare);
  const out = lines.map((line): PricedLine => {
    const each = Object.hasOwn(prices, line.what) ? prices[line.what]! : null;
    if (each !== null) requireNonNegative(`prices.${line.what}`, each);
    return { ...line, each, sum: each === null ? null : each * line.quantity };
  });
  const net = out.reduce((sum, line) => sum + (line.sum ?? 0), 0);
  const unpriced = out.filter((line) => line.each === null).map((line) => line.what);
  return { lines: out, unpriced, net, tax: net * taxShare, total: net * (1 + taxShare) };
}
