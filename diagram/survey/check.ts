import type { SurveyRoom } from '../document/schema';
import { practices } from '../practices';
import { SERVICE_RATINGS } from './drafting/assumptions';
import { planWays } from './drafting/plan';
import { runOf } from './drafting/way-plan';
import { wholeRoom } from './drafting/wish';
import { DRAFT_AMBIENT, planHome, type HomeOptions } from './drafting/plan-home';
import { USUAL_WATTS, type Column } from './columns';

/** What is wrong with a survey, by row and cell. */
export interface SurveyError {
  /** id of the row; null where it is of the whole home */
  room: string | null;
  column: Column | null;
  /** what the cell shows in place of its value: `3 of 2` */
  cell: string;
  /** "Kitchen: 3 of 2 lamps stay on" */
  heading: string;
  message: string;
  remedy?: { label: string; set: Partial<SurveyRoom> };
}

const LEFT_OUT = 'Until this is right the room is left out of the sums and stays as drawn.';
const titled = (room: SurveyRoom, i: number): string => room.name.trim() || `Row ${i + 1}`;

function keptErrors(room: SurveyRoom, title: string): SurveyError[] {
  const errors: SurveyError[] = [];
  const kept = [
    ['keepLamps', 'lamps'],
    ['keepFans', 'fans'],
  ] as const;
  for (const [keep, held] of kept) {
    if (room[keep] <= room[held]) continue;
    const cell = `${room[keep]} of ${room[held]}`;
    errors.push({
      room: room.id,
      column: keep,
      cell,
      heading: `${title}: ${cell} ${held} stay on`,
      message: LEFT_OUT,
      remedy: { label: `Make it ${room[held]}`, set: { [keep]: room[held] } },
    });
  }
  return errors;
}

function wattErrors(room: SurveyRoom, title: string): SurveyError[] {
  const errors: SurveyError[] = [];
  const each = [
    ['lamps', 'lampWatts', 'lamp'],
    ['fans', 'fanWatts', 'fan'],
  ] as const;
  for (const [held, watts, what] of each) {
    if (room[held] === 0 || room[watts] > 0) continue;
    errors.push({
      room: room.id,
      column: held,
      cell: `${room[held]} × 0`,
      heading: `${title}: ${held} of 0 W`,
      message: LEFT_OUT,
      remedy: { label: `Make it ${USUAL_WATTS[what]} W`, set: { [watts]: USUAL_WATTS[what] } },
    });
  }
  return errors;
}

/** A name that no other row has: "Study 2". */
function freeName(name: string, taken: ReadonlySet<string>): string {
  for (let n = 2; ; n++) if (!taken.has(`${name} ${n}`.toLowerCase())) return `${name} ${n}`;
}

function nameErrors(rooms: readonly SurveyRoom[]): SurveyError[] {
  const errors: SurveyError[] = [];
  const taken = new Set(rooms.map(({ name }) => name.trim().toLowerCase()));
  const seen = new Set<string>();
  rooms.forEach((room, i) => {
    const name = room.name.trim();
    if (name === '') {
      errors.push({
        room: room.id,
        column: 'name',
        cell: 'name?',
        heading: `Row ${i + 1} has no name`,
        message: LEFT_OUT,
      });
      return;
    }
    if (seen.has(name.toLowerCase())) {
      const other = freeName(name.slice(0, 76), taken);
      taken.add(other.toLowerCase());
      errors.push({
        room: room.id,
        column: 'name',
        cell: name,
        heading: `Two rooms are called ${name}`,
        message: LEFT_OUT,
        remedy: { label: `Call it ${other}`, set: { name: other } },
      });
    }
    seen.add(name.toLowerCase());
  });
  return errors;
}

/** A way that no cable on sale serves within the drop allowed: too far for its load. */
function reachErrors(room: SurveyRoom, title: string, { practice, supply }: HomeOptions): SurveyError[] {
  const ways = planWays([wholeRoom(room)], {
    practice: practices[practice],
    voltage: supply.voltage,
    ambientC: DRAFT_AMBIENT,
  });
  const unserved = ways.find(({ size }) => !size);
  if (!unserved) return [];
  return [
    {
      room: room.id,
      column: 'run',
      cell: `${runOf(room)} m`,
      heading: `${title}: ${runOf(room)} m is too far for ${Math.round(unserved.amps)} A`,
      message: `No cable on sale carries "${unserved.label}" so far within the volt drop allowed. ${LEFT_OUT}`,
    },
  ];
}

/** Errors of the rows, in the order of the table; a row with one is left out of sums and of the draft. */
export function roomErrors(rooms: readonly SurveyRoom[], options: HomeOptions): SurveyError[] {
  const names = nameErrors(rooms);
  return rooms.flatMap((room, i) => {
    const title = titled(room, i);
    const typed = [
      ...names.filter((error) => error.room === room.id),
      ...keptErrors(room, title),
      ...wattErrors(room, title),
    ];
    return typed.length > 0 ? typed : reachErrors(room, title, options);
  });
}

/** The rows that have no error: what is summed and drafted. */
export function soundRooms(rooms: readonly SurveyRoom[], options: HomeOptions): SurveyRoom[] {
  const wrong = new Set(roomErrors(rooms, options).map(({ room }) => room));
  return rooms.filter(({ id }) => !wrong.has(id));
}

function homeErrors(rooms: readonly SurveyRoom[], options: HomeOptions): SurveyError[] {
  const plan = planHome(rooms, options);
  const errors: SurveyError[] = [];
  const largest = SERVICE_RATINGS[SERVICE_RATINGS.length - 1]!;
  const home = { room: null, column: null };
  if (plan.demand.demandA > largest) {
    const amps = Math.round(plan.demand.demandA);
    errors.push({
      ...home,
      cell: `${amps} A`,
      heading: `The home asks for ${amps} A`,
      message: `One phase gives ${largest} A at most. Take something off, or ask for three phases, which this sheet does not draw.`,
    });
  }
  if (plan.backupTooLarge)
    errors.push({
      ...home,
      cell: '',
      heading: 'What stays on is more than one inverter carries',
      message: 'Let fewer things stay on. Until then the draft leaves the backup source out.',
    });
  return errors;
}

/** Everything wrong with a survey: the rows first, then the home as a whole. */
export function checkSurvey(rooms: readonly SurveyRoom[], options: HomeOptions): SurveyError[] {
  return [...roomErrors(rooms, options), ...homeErrors(soundRooms(rooms, options), options)];
}
