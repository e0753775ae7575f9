import { readFileSync, readdirSync } from 'node:fs';
import path from 'node:path';
import fc from 'fast-check';
import { readDocument, type Installation } from '@/diagram/document/schema';
import { draftDocument } from '@/diagram/survey/draft';
import { anySurvey, optionsOf, sixRooms } from '../survey/surveys';

/** Documents for the tests of layout: the examples, a told home, and many drafted ones. */

const EXAMPLES = path.resolve(import.meta.dirname, '../../fixtures/examples');

/** A document as the layout would place it from nothing. */
export const unplaced = (doc: Installation): Installation => {
  const { sheet: _sheet, ...rest } = doc;
  return rest;
};

export function examples(): [name: string, doc: Installation][] {
  return readdirSync(EXAMPLES)
    .filter((file) => file.endsWith('.json'))
    .sort()
    .map((file) => {
      const read = readDocument(JSON.parse(readFileSync(path.join(EXAMPLES, file), 'utf8')));
      if (!read.ok) throw new Error(`${file}: ${read.errors[0]?.path}`);
      return [file.replace('.json', ''), unplaced(read.document)];
    });
}

export const toldHome = (): Installation => unplaced(draftDocument(sixRooms(), optionsOf()));

/** Drafted homes by seed, with and without backup, in each practice. */
export function draftedHomes(count: number, seed: number): Installation[] {
  const arbitrary = fc
    .tuple(
      fc.boolean().chain((backup) => anySurvey(backup)),
      fc.constantFrom('IEC', 'IN', 'GB'),
      fc.constantFrom('TT', 'TN-S', 'TN-C-S'),
    )
    .map(([rooms, practice, system]) => unplaced(draftDocument(rooms, optionsOf(practice as 'IEC', system as 'TT'))));
  return fc.sample(arbitrary, { numRuns: count, seed });
}
