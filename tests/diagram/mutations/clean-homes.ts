import { readFileSync } from 'node:fs';
import { fileURLToPath } from 'node:url';
import { readDocument, type Installation } from '@/diagram/document/schema';
import { draftDocument } from '@/diagram/survey/draft';
import { weirFlat } from '@/lib/server/demo/flat';
import { quarryHouse } from '@/lib/server/demo/house';
import { optionsOf, sixRooms } from '../survey/surveys';

/** Homes that are right: drafts in each practice and earthing system, the demo's, and the two clean example files. */
export function cleanHomes(): Map<string, Installation> {
  const homes = new Map<string, Installation>();
  const bare = sixRooms().map((room) => ({ ...room, keepLamps: 0, keepFans: 0, keepOutletWatts: 0 }));
  for (const practice of ['IEC', 'IN', 'GB'] as const)
    for (const system of ['TT', 'TN-S', 'TN-C-S'] as const) {
      homes.set(`${practice} ${system} with backup`, draftDocument(sixRooms(), optionsOf(practice, system)));
      homes.set(`${practice} ${system} without`, draftDocument(bare, optionsOf(practice, system, 0)));
    }
  homes.set('demo flat', weirFlat());
  homes.set('demo house', quarryHouse());
  for (const name of ['clean-flat', 'clean-backup-home']) {
    const read = readDocument(
      JSON.parse(readFileSync(fileURLToPath(new URL(`../../fixtures/homes/${name}.json`, import.meta.url)), 'utf8')),
    );
    if (!read.ok) throw new Error(`${name} is no valid document`);
    homes.set(name, read.document);
  }
  return homes;
}
