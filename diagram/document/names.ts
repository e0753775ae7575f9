import { KIND_NAME } from './kinds';
import { byCode, type Installation, type Part } from './schema';

const isDigit = (code: number): boolean => code >= 48 && code <= 57;

/** End of the run of digits, or of anything else, that begins at `at`. */
function endOfRun(text: string, at: number): number {
  const digits = isDigit(text.charCodeAt(at));
  let end = at + 1;
  while (end < text.length && isDigit(text.charCodeAt(end)) === digits) end++;
  return end;
}

/** Order of designations as a person reads them: letters by code, numbers by value, so that Q2 stands before Q11. */
export function compareDesignations(a: string, b: string): number {
  let i = 0;
  let j = 0;
  while (i < a.length && j < b.length) {
    const [endA, endB] = [endOfRun(a, i), endOfRun(b, j)];
    const [x, y] = [a.slice(i, endA), b.slice(j, endB)];
    const both = isDigit(a.charCodeAt(i)) && isDigit(b.charCodeAt(j));
    const order = both ? Number(x) - Number(y) || x.length - y.length : byCode(x, y);
    if (order !== 0) return order;
    i = endA;
    j = endB;
  }
  return Number(i < a.length) - Number(j < b.length);
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
