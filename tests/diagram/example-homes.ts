import { readFileSync, readdirSync } from 'node:fs';
import path from 'node:path';
import { readDocument, type Installation } from '@/diagram/document/schema';

const folder = path.resolve(import.meta.dirname, '../fixtures/examples');

/** Names of the shared example files. */
export const EXAMPLES: readonly string[] = readdirSync(folder)
  .filter((name) => name.endsWith('.json'))
  .map((name) => name.slice(0, -'.json'.length))
  .sort();

/** One of them, as a document. */
export function readExample(name: string): Installation {
  const read = readDocument(JSON.parse(readFileSync(path.join(folder, `${name}.json`), 'utf8')));
  if (!read.ok) throw new Error(`${name} is no valid document`);
  return read.document;
}
