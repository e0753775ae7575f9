import 'server-only';
import type { Installation } from '@/diagram/document/schema';
import { apprenticesHome } from '@/lib/server/demo/apprentice';
import { weirFlat } from '@/lib/server/demo/flat';
import { quarryHouse } from '@/lib/server/demo/house';

export interface DemoHome {
  document: Installation;
  client: string;
  address: string;
  hoursWanted: number;
  dueInDays: number | null;
  /** drawn by the apprentice, to whom the job is given */
  byApprentice: boolean;
}

/** The three jobs of the demo: a flat without backup, a house with it, and the apprentice's drawing of that house with six mistakes. */
export const demoHomes = (): DemoHome[] => [
  {
    document: quarryHouse(),
    client: 'Iven Marlow',
    address: '3 Quarry Steps, Tillmere',
    hoursWanted: 4,
    dueInDays: 6,
    byApprentice: false,
  },
  {
    document: apprenticesHome(),
    client: 'Iven Marlow',
    address: '3 Quarry Steps, Tillmere',
    hoursWanted: 4,
    dueInDays: 2,
    byApprentice: true,
  },
  {
    document: weirFlat(),
    client: 'Dora Fenwick',
    address: 'Weir Court, flat 2, Tillmere',
    hoursWanted: 0,
    dueInDays: null,
    byApprentice: false,
  },
];
