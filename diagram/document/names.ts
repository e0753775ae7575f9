import { KIND_NAME } from './kinds';
import { byCode, type Installation, type Part } from './schema';

/** Splits "Q12" into letters and numbers, so that Q2 stands before Q11. */
const pieces = (text: string): string[] => text.match(/\d+|\D+/g) ?? [];

/** Order of designations as a person reads them: letters by code, numbers by value. */
export function compareDesignations(a: string, b: string): number {
  const left = pieces(a);
  const right = pieces(b);
  for (let i = 0; i < Math.min(left.length, right.length); i++) {
    const x = left[i]!;
    const y = right[i]!;
    const both = /^\d/.test(x) && /^\d/.test(y);
    const order = both ? Number(x) - Number(y) || x.length - y.length : byCode(x, y);
    if (order !== 0) return order;
  }
  return left.length - right.length;
}

/** Parts with a designation first, in its order; then by id. */
export function byDesignation(a: Part, b: Part): number {
  if (a.ref !== undefined && b.ref !== undefined)
    return compareDesignations(a.ref, b.ref) || compareDesignations(a.id, b.id);
  if (a.ref !== undefined) return -1;
  if (b.ref !== undefined) return 1;
  return compareDesignations(a.id, b.id);
}

/** What a person calls a part: its designation, else its kind and where it is: "lamp in Map room". */
export function nameOf(doc: Pick<Installation, 'places'>, part: Part): string {
  if (part.ref) return part.ref;
  const place = doc.places.find(({ id }) => id === part.place)?.name;
  return place ? `${KIND_NAME[part.kind]} in ${place}` : (part.label ?? KIND_NAME[part.kind]);
}

/** "Q1", "Q1 and Q2", "Q1, Q2 and 3 more". */
export function listNames(names: readonly string[], most = 6): string {
  const unique = [...new Set(names)];
  const shown = unique.length > most ? [...unique.slice(0, most - 1), `${unique.length - most + 1} more`] : unique;
  if (shown.length <= 1) return shown[0] ?? '';
  return `${shown.slice(0, -1).join(', ')} and ${shown.at(-1)}`;
}
