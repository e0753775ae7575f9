import 'server-only';
import type { Installation, Supply, SurveyRoom } from '@/diagram/document/schema';
import { draftDocument } from '@/diagram/survey/draft';

export interface DemoHome {
  document: Installation;
  client: string;
  address: string;
  hoursWanted: number;
  dueInDays: number | null;
  /** drawn by the apprentice, to whom the job is given */
  byApprentice: boolean;
}

const supply: Supply = { system: 'TN-S', voltage: 230, frequency: 50, ze: 0.35, zln: 0.25 };
const room = (order: number, name: string, over: Partial<SurveyRoom> = {}): SurveyRoom => ({
  id: `r${order}`, order, name, kind: 'room', lamps: 2, lampWatts: 9, fans: 1, fanWatts: 60, outlets: 2, heavy: [], keepLamps: 0, keepFans: 0, keepOutletWatts: 0, hours: 0, ...over,
});

export const demoHomes = (): DemoHome[] => [
  {
    document: draftDocument([room(1, 'Living room'), room(2, 'Kitchen', { heavy: [{ what: 'Oven', watts: 2400 }] })], { title: 'Heron Row 9', practice: 'IEC', supply, hoursWanted: 0 }),
    client: 'O. Pell', address: 'Heron Row 9, Tillmere', hoursWanted: 0, dueInDays: 5, byApprentice: false,
  },
];
