import type { Installation, SurveyRoom } from '@/diagram/document/schema';
import { draftDocument } from '@/diagram/survey/draft';

/** A drafted home of about so many parts: as many rooms as it takes. */
export function homeOf(parts: number): Installation {
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
  const draft = (rooms: number) =>
    draftDocument(
      Array.from({ length: rooms }, (_, i) => room(i)),
      {
        title: `${parts} parts`,
        practice: 'IEC',
        supply: { system: 'TN-S', voltage: 230, frequency: 50, ze: 0.3, zln: 0.3 },
        hoursWanted: 2,
      },
    );
  let rooms = Math.max(1, Math.round(parts / 24));
  let doc = draft(rooms);
  for (let i = 0; i < 4 && Math.abs(doc.parts.length - parts) > 0.03 * parts; i++) {
    rooms = Math.max(1, Math.round((rooms * parts) / doc.parts.length));
    doc = draft(rooms);
  }
  return doc;
}
