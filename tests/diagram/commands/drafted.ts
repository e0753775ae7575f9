import type { Installation, PracticeId, Supply, SurveyRoom } from '@/diagram/document/schema';
import { emptyRoom } from '@/diagram/survey/columns';
import { draftDocument } from '@/diagram/survey/draft';

export const TN: Supply = { system: 'TN-S', voltage: 230, frequency: 50, ze: 0.4, zln: 0.3 };
export const TT: Supply = { system: 'TT', voltage: 230, frequency: 50, zln: 0.25, ra: 20 };

/** Rooms as a survey has them: some wet, some with heavy things, some on in an outage. */
const roomsFor = (count: number): SurveyRoom[] =>
  Array.from({ length: count }, (_, n) => ({
    ...emptyRoom(`room${n}`, n),
    name: `Room ${n + 1}`,
    kind: n % 5 === 3 ? 'wet' : 'room',
    lamps: 2 + (n % 2),
    lampWatts: 9,
    fans: n % 2,
    fanWatts: 55,
    outlets: 2,
    heavy: n % 5 === 2 ? [{ what: 'heater', watts: 2000 }] : [],
    keepLamps: n % 4 === 3 ? 0 : 1,
    keepFans: 0,
  }));

/** A home of so many rooms, drafted from its survey. */
export const draftedHome = (count: number, practice: PracticeId = 'IEC', supply: Supply = TN): Installation =>
  draftDocument(roomsFor(count), { title: 'Drafted home', practice, supply, hoursWanted: 2 });
