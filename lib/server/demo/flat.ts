import 'server-only';
import type { Installation } from '@/diagram/document/schema';
import { draftDocument } from '@/diagram/survey/draft';
import { parseSurvey } from '@/diagram/survey/parse';

const SURVEY = `name;kind;lamps;outlets;heavy;run
Corridor;passage;2x8;;;5
Living room;room;3x10;4;;9
Kitchen;room;2x12;4;oven 3200;8
Shower room;wet;1x9;;water heater 2000;6
Bedroom;sleeping;2x8;3;;11`;

/** Five rooms on one phase, no backup. */
export const weirFlat = (): Installation =>
  draftDocument(parseSurvey(SURVEY).rooms, {
    title: 'Weir Court, flat 2',
    practice: 'IEC',
    supply: { system: 'TN-C-S', voltage: 230, frequency: 50, ze: 0.35, zln: 0.3 },
    hoursWanted: 0,
  });
