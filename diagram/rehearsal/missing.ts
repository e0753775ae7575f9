import { nameOf } from '../document/names';
import type { Installation, Part, Supply } from '../document/schema';
import type { Graph } from '../terminals/graph';
import { isOvercurrent, isResidual } from '../terminals/roles-of-parts';
import type { Fault } from '../circuit/fault-types';

/** A value that the drawing does not give and a walk wants. */
export interface Missing {
  /** "the resistance of the earth electrode" */
  words: string;
  /** id of the part; absent for the supply's data */
  part?: string;
  field: 'ra' | 'ze' | 'zln' | 'rating' | 'sensitivity' | 'curve';
  unit: 'ohm' | 'A' | '';
  /** the walk cannot begin without it; else a device is left out of it */
  stops: boolean;
}

const SUPPLY: Readonly<Record<'ra' | 'ze' | 'zln', string>> = {
  ra: 'the resistance of the earth electrode',
  ze: 'the external earth fault loop impedance',
  zln: 'the external line-neutral loop impedance',
};

/** What these faults want of the supply and it does not say. */
function ofSupply(supply: Supply, faults: readonly Fault[]): ('ra' | 'ze' | 'zln')[] {
  const earth = faults.some(({ kind }) => kind === 'line-to-case' || kind === 'neutral-to-earth');
  const loop = supply.system === 'TT' ? 'ra' : 'ze';
  const wanted: ('ra' | 'ze' | 'zln')[] = earth ? [loop] : [];
  if (faults.some(({ kind }) => kind === 'line-to-neutral')) wanted.push('zln');
  return wanted.filter((field) => supply[field] === undefined);
}

/**
 * The values that a walk of these faults lacks: first those that stop it, then those that leave a device out.
 * @param onMains the supply is live: its loops count
 */
export function missingFor(graph: Graph, faults: readonly Fault[], onMains: boolean): Missing[] {
  const found: Missing[] = [];
  if (onMains)
    for (const field of ofSupply(graph.document.supply, faults))
      found.push({ words: SUPPLY[field], field, unit: 'ohm', stops: true });
  for (const part of graph.parts.values()) {
    const say = (field: Missing['field'], word: string, unit: Missing['unit']) =>
      found.push({ words: `the ${word} of ${nameOf(graph.document, part)}`, part: part.id, field, unit, stops: false });
    if (isOvercurrent(part) && part.rating === undefined) say('rating', 'rated current', 'A');
    else if (isOvercurrent(part) && part.kind !== 'fuse' && part.curve === undefined) say('curve', 'curve', '');
    if (isResidual(part) && part.sensitivity === undefined) say('sensitivity', 'sensitivity', 'A');
  }
  return found;
}

/** The drawing with a missing value given. @returns null where the text is no such value */
export function withMissing(doc: Installation, missing: Missing, text: string): Installation | null {
  const curve = text.trim().toUpperCase();
  const number = Number(text.trim().replace(',', '.'));
  const value = missing.field === 'curve' ? curve : number;
  if (missing.field === 'curve' ? !['B', 'C', 'D'].includes(curve) : !(Number.isFinite(number) && number > 0))
    return null;
  if (missing.part === undefined) return { ...doc, supply: { ...doc.supply, [missing.field]: value } };
  const parts = doc.parts.map((part) =>
    part.id === missing.part ? ({ ...part, [missing.field]: value } as Part) : part,
  );
  return { ...doc, parts };
}
