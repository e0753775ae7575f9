import { findById, type Installation, type Part } from '../../document/schema';
import { isOvercurrent } from '../../terminals/roles-of-parts';
import type { WayResult } from '../examination';
import type { Difference } from './difference';

/** What of a part reaches a result: all but its label, where something else names it; of a way's, whether there is one. */
function withoutLabel({ places }: Installation, part: Part): Part {
  const named = part.ref !== undefined || places.some(({ id }) => id === part.place);
  // The group of an appliance in the sum of the demand is read from its label.
  if (!named || part.kind === 'appliance') return part;
  const { label = '', ...rest } = part;
  return { ...rest, label: isOvercurrent(part) && label.trim() !== '' ? '*' : '' } as Part;
}

/** Parts among the changed ones of which nothing but the label changed, to one that says as much: as they were. */
export function relabelled(before: Installation, after: Installation, { parts }: Difference): Map<string, Part> {
  const found = new Map<string, Part>();
  for (const id of parts) {
    const [was, is] = [findById(before.parts, id), findById(after.parts, id)];
    if (!was || !is) continue;
    const fields = [withoutLabel(before, was), withoutLabel(after, is)].map((part) => JSON.stringify(Object.entries(part).sort()));
    if (fields[0] === fields[1]) found.set(id, was);
  }
  return found;
}

/** The figures of the ways with the labels that their devices have now. */
export const relabel = (ways: readonly WayResult[], doc: Installation, { size }: ReadonlyMap<string, Part>): WayResult[] =>
  size === 0 ? [...ways] : ways.map((way) => ({ ...way, label: findById(doc.parts, way.part)!.label ?? '' }));
