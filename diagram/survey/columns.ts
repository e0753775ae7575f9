import type { SurveyRoom } from '../document/schema';

/** The cells of a survey row: what each is called, how its text is read and how its value is written back. */

export const COLUMNS = [
  'name',
  'kind',
  'lamps',
  'fans',
  'outlets',
  'heavy',
  'keepLamps',
  'keepFans',
  'keepOutletWatts',
  'hours',
  'run',
] as const;
export type Column = (typeof COLUMNS)[number];

/** The heading of each column, as in the table and in the exported file. */
export const COLUMN_TITLE: Record<Column, string> = {
  name: 'Name',
  kind: 'Kind',
  lamps: 'Lamps',
  fans: 'Fans',
  outlets: 'Outlets',
  heavy: 'Heavy',
  keepLamps: 'Lamps kept',
  keepFans: 'Fans kept',
  keepOutletWatts: 'Outlet kept W',
  hours: 'Hours',
  run: 'Run m',
};

/** W, taken where a count is typed without watts. Common practice, no source. */
export const USUAL_WATTS = { lamp: 9, fan: 55 } as const;

/** m, from the board to a room, where the survey does not say. Common practice, no source. */
export const USUAL_RUN = 12;

export const ROOM_KINDS = [
  'room',
  'sleeping',
  'wet',
  'passage',
  'outdoor',
  'intake',
] as const satisfies readonly SurveyRoom['kind'][];

/** What people write for a kind; compared in lower case. */
const KIND_WORDS: Record<SurveyRoom['kind'], readonly string[]> = {
  room: ['room', 'living', 'kitchen', 'study', 'office', 'store', 'dining', 'lounge'],
  sleeping: ['sleeping', 'bed', 'bedroom', 'nursery'],
  wet: ['wet', 'bath', 'bathroom', 'shower', 'toilet', 'wc', 'washroom'],
  passage: ['passage', 'hall', 'hallway', 'landing', 'stairs', 'corridor', 'lobby'],
  outdoor: ['outdoor', 'outside', 'garden', 'balcony', 'terrace', 'yard', 'porch', 'veranda'],
  intake: ['intake', 'meter', 'board'],
};

/** The kind that a room's name suggests: "Bath" is wet, "Back bedroom" is for sleeping; a plain room otherwise. */
export function kindFromName(name: string): SurveyRoom['kind'] {
  const words = name.toLowerCase().split(/[^a-z]+/);
  return ROOM_KINDS.find((kind) => KIND_WORDS[kind].some((word) => words.includes(word))) ?? 'room';
}

/** An empty row: what a new room holds until somebody types. */
export const emptyRoom = (id: string, order: number): SurveyRoom => ({
  id,
  order,
  name: '',
  kind: 'room',
  lamps: 0,
  lampWatts: USUAL_WATTS.lamp,
  fans: 0,
  fanWatts: USUAL_WATTS.fan,
  outlets: 0,
  heavy: [],
  keepLamps: 0,
  keepFans: 0,
  keepOutletWatts: 0,
  hours: 0,
});

/** A cell's text as values of the row, or what is wrong with it, in words. */
export type CellReading = { ok: true; values: Partial<SurveyRoom> } | { ok: false; message: string };

const good = (values: Partial<SurveyRoom>): CellReading => ({ ok: true, values });
const bad = (message: string): CellReading => ({ ok: false, message });

const isNone = (text: string): boolean => text === '' || text === '-' || text === '–';

/** A number as typed: point or comma for the decimals; undefined when it is none. */
function numberIn(text: string): number | undefined {
  return /^\d+([.,]\d+)?$/.test(text) ? Number(text.replace(',', '.')) : undefined;
}

interface Range {
  what: string;
  max: number;
  whole?: boolean;
  /** letters that may follow the number: "W", "h" */
  unit?: string;
}

function readNumber(text: string, { what, max, whole, unit }: Range): number | string {
  if (isNone(text)) return 0;
  const value = numberIn(unit ? text.replace(new RegExp(`\\s*${unit}$`, 'i'), '') : text);
  if (value === undefined || value > max || (whole && !Number.isInteger(value))) return `${what} are 0 to ${max}`;
  return value;
}

function readOne(text: string, range: Range, values: (value: number) => Partial<SurveyRoom>): CellReading {
  const value = readNumber(text, range);
  return typeof value === 'string' ? bad(value) : good(values(value));
}

/** `3x9`, `3 9`, `3 × 9 W`, `3`: a count, and the watts of each where they are said. */
function readEach(
  text: string,
  what: string,
  maxCount: number,
  maxWatts: number,
): { count: number; watts?: number } | string {
  if (isNone(text)) return { count: 0 };
  const found = /^(\d+)(?:\s*[x×*]\s*|\s+)?(\d+(?:[.,]\d+)?)?\s*w?$/i.exec(text);
  const separated = found && (found[2] === undefined || /[\sx×*]/i.test(text));
  if (!found || !separated) return `${what} are typed as a count and watts: 3x9`;
  const count = Number(found[1]);
  const watts = found[2] === undefined ? undefined : numberIn(found[2]);
  if (count > maxCount) return `${what} are 0 to ${maxCount}`;
  if (watts !== undefined && watts > maxWatts) return `${what} have 0 to ${maxWatts} W each`;
  return { count, ...(watts !== undefined && { watts }) };
}

const MAX_HEAVY = 8;
const MAX_HEAVY_WATTS = 20_000;

/** `oven 3000; heater 2 kW`: heavy appliances, each with its watts. */
function readHeavy(text: string): CellReading {
  if (isNone(text)) return good({ heavy: [] });
  const heavy: SurveyRoom['heavy'] = [];
  for (const item of text.split(/[;\n]|,\s+(?=\D)/).map((piece) => piece.trim())) {
    if (item === '') continue;
    const found = /^(.*[a-z].*|[a-z])\s+(\d+(?:[.,]\d+)?)\s*(k?w)?$/i.exec(item);
    if (!found)
      return bad(
        `Say what it is and its watts: ${/^\d/.test(item) ? 'oven' : item.replace(/\s*[\d.,]+.*$/, '') || 'oven'} 3000`,
      );
    const what = found[1]!.trim();
    const watts = Number(found[2]!.replace(',', '.')) * (found[3]?.toLowerCase() === 'kw' ? 1000 : 1);
    if (what.length > 40) return bad('The name of an appliance has at most 40 letters');
    if (watts <= 0 || watts > MAX_HEAVY_WATTS) return bad(`${what}: watts are 1 to ${MAX_HEAVY_WATTS}`);
    heavy.push({ what, watts });
  }
  return heavy.length > MAX_HEAVY ? bad(`At most ${MAX_HEAVY} heavy appliances in a room`) : good({ heavy });
}

function readKind(text: string): CellReading {
  const word = text.toLowerCase();
  if (isNone(word)) return good({});
  const kind = ROOM_KINDS.find((candidate) => KIND_WORDS[candidate].includes(word));
  return kind ? good({ kind }) : bad(`A kind is one of ${ROOM_KINDS.join(', ')}`);
}

function readName(text: string): CellReading {
  return text.length > 80 ? bad('A name has at most 80 letters') : good({ name: text });
}

/**
 * Reads what somebody typed or pasted into one cell.
 * @param raw the text, with or without units: `3x9`, `oven 3 kW`, `4 h`
 * @returns the values to put into the row (a cell of lamps gives count and watts), or what is wrong, in words
 */
export function readCell(column: Column, raw: string): CellReading {
  const text = raw.trim();
  switch (column) {
    case 'name':
      return readName(text);
    case 'kind':
      return readKind(text);
    case 'lamps': {
      const each = readEach(text, 'Lamps', 60, 2000);
      return typeof each === 'string'
        ? bad(each)
        : good({ lamps: each.count, ...(each.watts !== undefined && { lampWatts: each.watts }) });
    }
    case 'fans': {
      const each = readEach(text, 'Fans', 20, 1000);
      return typeof each === 'string'
        ? bad(each)
        : good({ fans: each.count, ...(each.watts !== undefined && { fanWatts: each.watts }) });
    }
    case 'outlets':
      return readOne(text, { what: 'Outlets', max: 40, whole: true }, (outlets) => ({ outlets }));
    case 'heavy':
      return readHeavy(text);
    case 'keepLamps':
      return readOne(text, { what: 'Lamps kept on', max: 60, whole: true }, (keepLamps) => ({ keepLamps }));
    case 'keepFans':
      return readOne(text, { what: 'Fans kept on', max: 20, whole: true }, (keepFans) => ({ keepFans }));
    case 'keepOutletWatts':
      return readOne(text, { what: 'Watts at the outlet', max: 3000, unit: 'W' }, (keepOutletWatts) => ({
        keepOutletWatts,
      }));
    case 'hours':
      return readOne(text, { what: 'Hours', max: 72, unit: 'h' }, (hours) => ({ hours }));
    case 'run': {
      if (isNone(text)) return good({ run: undefined });
      const metres = readNumber(text, { what: 'Metres', max: 200, unit: 'm' });
      return typeof metres === 'string' || metres === 0 ? bad('Metres are 1 to 200') : good({ run: metres });
    }
  }
}

const each = (count: number, watts: number): string => (count === 0 ? '' : `${count}x${watts}`);
const orNothing = (value: number): string => (value === 0 ? '' : String(value));

/** The text of a cell, as {@link readCell} reads it back; nothing where there is none. */
export function writeCell(column: Column, room: SurveyRoom): string {
  switch (column) {
    case 'name':
    case 'kind':
      return room[column];
    case 'lamps':
      return each(room.lamps, room.lampWatts);
    case 'fans':
      return each(room.fans, room.fanWatts);
    case 'heavy':
      return room.heavy.map(({ what, watts }) => `${what.replace(/[;,\n]+/g, ' ').trim()} ${watts}`).join('; ');
    case 'run':
      return room.run === undefined ? '' : String(room.run);
    default:
      return orNothing(room[column]);
  }
}
