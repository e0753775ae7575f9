import { byCode } from '../../document/schema';
import type { Touched } from './touched';

/** What is known of all but the touched parts, and what is new of those, in lists and tables by id. */

type Parts = Pick<Touched, 'before' | 'after'>;

/** In order of id, where the tables are. */
export function mergedMap<T>(known: ReadonlyMap<string, T>, now: ReadonlyMap<string, T>, { before, after }: Parts): Map<string, T> {
  const anew = [...after].filter((id) => now.has(id)).sort(byCode);
  if (anew.every((id) => known.has(id))) {
    // Each in its old place: a copy keeps the order.
    const merged = new Map(known);
    for (const id of before) if (!after.has(id) || !now.has(id)) merged.delete(id);
    for (const id of anew) merged.set(id, now.get(id)!);
    return merged;
  }
  const merged = new Map<string, T>();
  let next = 0;
  for (const [id, value] of known) {
    if (before.has(id)) continue;
    for (; next < anew.length && anew[next]! < id; next++) merged.set(anew[next]!, now.get(anew[next]!)!);
    merged.set(id, value);
  }
  for (const id of anew.slice(next)) merged.set(id, now.get(id)!);
  return merged;
}

export function mergedSet(known: ReadonlySet<string>, now: ReadonlySet<string>, { before, after }: Parts): Set<string> {
  const merged = new Set(known);
  for (const id of before) merged.delete(id);
  for (const id of now) if (after.has(id)) merged.add(id);
  return merged;
}

/** In order of id, both lists and the result. */
export function mergedList<T>(
  known: readonly T[],
  now: readonly T[],
  { before, after }: Parts,
  idOf: (item: T) => string,
): T[] {
  const anew = now.filter((item) => after.has(idOf(item)));
  const merged: T[] = [];
  let next = 0;
  for (const item of known) {
    const id = idOf(item);
    if (before.has(id)) continue;
    while (next < anew.length && idOf(anew[next]!) < id) merged.push(anew[next++]!);
    merged.push(item);
  }
  while (next < anew.length) merged.push(anew[next++]!);
  return merged;
}

/** Puts items into a list at their places. @param list in order already */
export function insertInOrder<T>(list: T[], items: Iterable<T>, compare: (a: T, b: T) => number): void {
  for (const item of items) {
    let low = 0;
    let high = list.length;
    while (low < high) {
      const middle = (low + high) >> 1;
      if (compare(list[middle]!, item) < 0) low = middle + 1;
      else high = middle;
    }
    list.splice(low, 0, item);
  }
}
