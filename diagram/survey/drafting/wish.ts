import type { SurveyRoom } from '../../document/schema';

/** What is to be drawn in a room: numbers of lamps, fans and outlets that its parts are called by, from 1. */
export interface Wish {
  room: SurveyRoom;
  lamps: number[];
  fans: number[];
  outlets: number[];
  heavy: { number: number; what: string; watts: number }[];
  /** of these, what stays on in an outage, besides the ones above */
  keptLamps: number[];
  keptFans: number[];
  keptOutlet: boolean;
}

/** Whole numbers from one to another, both counted. */
export const numbers = (from: number, to: number): number[] =>
  Array.from({ length: Math.max(0, to - from + 1) }, (_, i) => from + i);

/** All of a room, as a draft from nothing draws it: what stays on has the first numbers. */
export const wholeRoom = (room: SurveyRoom): Wish => ({
  room,
  lamps: numbers(room.keepLamps + 1, room.lamps),
  fans: numbers(room.keepFans + 1, room.fans),
  outlets: numbers(1, room.outlets),
  heavy: room.heavy.map((item, i) => ({ number: i + 1, ...item })),
  keptLamps: numbers(1, room.keepLamps),
  keptFans: numbers(1, room.keepFans),
  keptOutlet: room.keepOutletWatts > 0,
});
