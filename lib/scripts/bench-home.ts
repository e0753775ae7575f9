import type { Installation, SurveyRoom } from '@/diagram/document/schema';
import { draftDocument } from '@/diagram/survey/draft';

const room = (i: number): SurveyRoom => ({
  id: `r${String(i).padStart(4, '0')}`,
  order: i,
  name: `Room ${i}`,
  kind: 'room',
  lamps: 4,
  lampWatts: 9,
  fans: 1,
  fanWatts: 60,
  outlets: 4,
  heavy: i % 5 === 0 ? [{ what: 'Water heater', watts: 2000 }] : [],
  keepLamps: i < 20 ? 2 : 0,
  keepFans: 0,
  keepOutletWatts: 0,
  hours: i < 20 ? 2 : 0,
});

/** A drafted home of so many rooms, the first twenty with backup. */
const homeOfRooms = (rooms: number, title: string): Installation =>
  draftDocument(
    Array.from({ length: rooms }, (_, i) => room(i)),
    {
      title,
      practice: 'IEC',
      supply: { system: 'TN-S', voltage: 230, frequency: 50, ze: 0.3, zln: 0.3 },
      hoursWanted: 2,
    },
  );

/** A drafted home of about so many parts: as many rooms as it takes. */
export function homeOf(parts: number): Installation {
  let rooms = Math.max(1, Math.round(parts / 24));
  let doc = homeOfRooms(rooms, `${parts} parts`);
  for (let i = 0; i < 4 && Math.abs(doc.parts.length - parts) > 0.03 * parts; i++) {
    rooms = Math.max(1, Math.round((rooms * parts) / doc.parts.length));
    doc = homeOfRooms(rooms, `${parts} parts`);
  }
  return doc;
}

/** The smallest drafted home of at least so many parts. */
export function homeOfAtLeast(parts: number): Installation {
  let rooms = Math.ceil(parts / 30);
  while (homeOfRooms(rooms, '').parts.length < parts) rooms++;
  return homeOfRooms(rooms, `${parts} parts`);
}
