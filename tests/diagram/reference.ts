import { readFileSync } from 'node:fs';

/** Published check values, one record each with its source; `how` "memory" was not seen on a page. */
export interface ReferenceRecord {
  id: string;
  value: unknown;
  source: { title: string; locator: string; how: 'found' | 'memory' | 'formula' };
  [field: string]: unknown;
}

export type ReferenceFile =
  | 'capacity'
  | 'clauses'
  | 'conductors'
  | 'factors'
  | 'mcb'
  | 'networks'
  | 'rcd'
  | 'voltage-drop'
  | 'worked-examples'
  | 'zs-max';

/** All records of one file of published values. */
export function reference(file: ReferenceFile): ReferenceRecord[] {
  const url = new URL(`../fixtures/reference/${file}.json`, import.meta.url);
  return (JSON.parse(readFileSync(url, 'utf8')) as { records: ReferenceRecord[] }).records;
}

/** One record; fails loudly when it is not there. */
export function record(file: ReferenceFile, id: string): ReferenceRecord {
  const found = reference(file).find((entry) => entry.id === id);
  if (!found) throw new Error(`no record ${id} in ${file}`);
  return found;
}

/** Rounds half away from zero to so many places, as tables are printed. */
export function printed(value: number, places: number): number {
  const scale = 10 ** places;
  return Math.round(value * scale + 1e-9) / scale;
}
