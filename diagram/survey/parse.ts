import { byCode, type SurveyRoom } from '../document/schema';
import { COLUMNS, COLUMN_TITLE, emptyRoom, kindFromName, readCell, writeCell, type Column } from './columns';

/** A survey as rows of text: pasted from a spreadsheet, and back. */

export interface PasteError {
  /** row of the pasted text, the heading not counted; 0 is the first */
  row: number;
  column: Column | null;
  /** what stood in the cell */
  text: string;
  message: string;
}

export interface PastedSurvey {
  rooms: SurveyRoom[];
  errors: PasteError[];
}

const MAX_ROOMS = 100;

/** Names under which people head a column, without case, spaces and signs. */
const HEADINGS: Record<Column, readonly string[]> = {
  name: ['name', 'room', 'rooms', 'place', 'roomname'],
  kind: ['kind', 'type', 'use'],
  lamps: ['lamps', 'lamp', 'lights', 'light', 'lampsnw', 'lampsnxw'],
  fans: ['fans', 'fan', 'fansnw', 'fansnxw'],
  outlets: ['outlets', 'outlet', 'sockets', 'socket', 'outletsn'],
  heavy: ['heavy', 'heavyappliances', 'appliances', 'heavywhatw', 'loads'],
  keepLamps: ['lampskept', 'keeplamps', 'lampsstayon', 'lampson', 'backuplamps', 'lampsbackup'],
  keepFans: ['fanskept', 'keepfans', 'fansstayon', 'fanson', 'backupfans', 'fansbackup'],
  keepOutletWatts: [
    'outletkeptw',
    'outletkept',
    'outletskept',
    'keepoutlet',
    'keepoutletwatts',
    'outletswatts',
    'outletsw',
    'backupoutlet',
  ],
  hours: ['hours', 'hour', 'h', 'hourswanted', 'autonomy'],
  run: ['run', 'runm', 'metres', 'meters', 'length', 'm', 'distance'],
};

const plain = (text: string): string => text.toLowerCase().replace(/[^a-z]/g, '');
const columnOf = (heading: string): Column | undefined =>
  COLUMNS.find((column) => HEADINGS[column].includes(plain(heading)));

/** Splits delimited text into rows of cells; a quoted cell may hold the delimiter, line ends and doubled quotes. */
function cellsOf(text: string, delimiter: string): string[][] {
  const rows: string[][] = [];
  let row: string[] = [];
  let cell = '';
  let quoted = false;
  for (let i = 0; i < text.length; i++) {
    const c = text[i]!;
    if (quoted) {
      if (c !== '"') cell += c;
      else if (text[i + 1] === '"') cell += text[++i];
      else quoted = false;
    } else if (c === '"' && cell.trim() === '') {
      cell = '';
      quoted = true;
    } else if (c === delimiter) {
      row.push(cell);
      cell = '';
    } else if (c === '\n') {
      rows.push([...row, cell]);
      row = [];
      cell = '';
    } else cell += c;
  }
  rows.push([...row, cell]);
  return rows.map((cells) => cells.map((value) => value.trim())).filter((cells) => cells.some((value) => value !== ''));
}

/** The delimiter that cuts the first row into most cells; a spreadsheet's clipboard has tabs. */
function delimiterOf(text: string): string {
  if (text.includes('\t')) return '\t';
  const first = (delimiter: string) => cellsOf(text, delimiter)[0]?.length ?? 0;
  return first(';') > first(',') ? ';' : ',';
}

/** Where the rows begin with a heading: a row all of whose cells are known names. */
function headingOf(cells: readonly string[]): (Column | undefined)[] | undefined {
  const columns = cells.map(columnOf);
  const known = columns.filter((column) => column !== undefined);
  const named = cells.filter((cell) => cell !== '').length;
  return columns.includes('name') && known.length >= Math.max(1, Math.ceil(named / 2)) ? columns : undefined;
}

/** A sign put before text that a spreadsheet would run as a formula; taken off again on the way in. */
const guarded = (text: string): string => (/^'*[=+\-@]/.test(text) ? `'${text}` : text);
const unguarded = (text: string): string => (/^'+[=+\-@]/.test(text) ? text.slice(1) : text);

/** A readable id for a room: `front-room`, or `front-room-2` where that is taken. */
function roomId(name: string, taken: ReadonlySet<string>): string {
  const slug =
    name
      .toLowerCase()
      .normalize('NFKD')
      .replace(/[^a-z0-9]+/g, '-')
      .replace(/^-|-$/g, '')
      .slice(0, 24)
      .replace(/-$/, '') || 'room';
  for (let n = 1; ; n++) {
    const id = n === 1 ? slug : `${slug}-${n}`;
    if (!taken.has(id)) return id;
  }
}

/** The order number that puts a new row last. */
export const nextOrder = (rooms: readonly SurveyRoom[]): number =>
  rooms.reduce((most, room) => Math.max(most, Math.floor(room.order) + 1), 0);

/**
 * Reads pasted rows as rooms: tab, comma or semicolon between cells, cells quoted or not, with a heading in any order of
 * known names or, without one, in the order of the table.
 * @param present the rooms that the table has already: new rows stand after them and take ids of their own
 * @returns every row that has something in it; a cell that cannot be read keeps the usual value and is an error
 */
export function parseSurvey(pasted: string, present: readonly SurveyRoom[] = []): PastedSurvey {
  const text = pasted.replace(/^\uFEFF/, '').replace(/\r\n?/g, '\n');
  const rows = cellsOf(text, delimiterOf(text));
  const heading = rows[0] && headingOf(rows[0]);
  const columns: readonly (Column | undefined)[] = heading ?? COLUMNS;
  const body = heading ? rows.slice(1) : rows;
  const errors: PasteError[] = [];
  const rooms: SurveyRoom[] = [];
  const taken = new Set(present.map(({ id }) => id));
  const order = nextOrder(present);

  heading?.forEach((column, i) => {
    const unknown = column === undefined && rows[0]![i];
    if (unknown)
      errors.push({ row: 0, column: null, text: unknown, message: `No column is called ${unknown}: it is left out` });
  });
  body.forEach((cells, row) => {
    if (present.length + rooms.length >= MAX_ROOMS) {
      errors.push({ row, column: null, text: cells.join(' '), message: `A survey has at most ${MAX_ROOMS} rooms` });
      return;
    }
    const values: Partial<SurveyRoom> = {};
    cells.forEach((cell, i) => {
      const column = columns[i];
      if (!column) return;
      const reading = readCell(column, unguarded(cell));
      if (reading.ok) Object.assign(values, reading.values);
      else errors.push({ row, column, text: cell, message: reading.message });
    });
    const id = roomId(values.name ?? '', taken);
    taken.add(id);
    rooms.push({ ...emptyRoom(id, order + row), kind: kindFromName(values.name ?? ''), ...values });
  });
  return { rooms: rooms.map(withoutGaps), errors };
}

/** The row without fields that were typed away. */
function withoutGaps(room: SurveyRoom): SurveyRoom {
  const { run, ...rest } = room;
  return run === undefined ? rest : { ...rest, run };
}

const quoted = (text: string): string => (/[",;\n\t]/.test(text) ? `"${text.replaceAll('"', '""')}"` : text);

/** The survey as comma-separated text with a heading, rows in the order of the table; {@link parseSurvey} reads it back. */
export function surveyCsv(rooms: readonly SurveyRoom[]): string {
  const sorted = [...rooms].sort((a, b) => a.order - b.order || byCode(a.id, b.id));
  const lines = [
    COLUMNS.map((column) => COLUMN_TITLE[column]),
    ...sorted.map((room) => COLUMNS.map((column) => guarded(writeCell(column, room)))),
  ];
  return `${lines.map((cells) => cells.map(quoted).join(',')).join('\n')}\n`;
}
