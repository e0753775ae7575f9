import fc from 'fast-check';
import { describe, expect, it } from 'vitest';
import { COLUMNS, kindFromName, readCell, writeCell } from '@/diagram/survey/columns';
import { parseSurvey, surveyCsv } from '@/diagram/survey/parse';
import { anySurvey, room, sixRooms } from './surveys';

const values = (column: (typeof COLUMNS)[number], text: string) => {
  const reading = readCell(column, text);
  return reading.ok ? reading.values : reading.message;
};

describe('a cell', () => {
  it.each(['3x9', '3 9', '3×9', '3 × 9 W', '3*9', ' 3 X 9w '])('reads %s as three lamps of 9 W', (text) => {
    expect(values('lamps', text)).toEqual({ lamps: 3, lampWatts: 9 });
  });

  it('reads a count alone and keeps the watts that were there', () => {
    expect(values('lamps', '3')).toEqual({ lamps: 3 });
    expect(values('fans', '-')).toEqual({ fans: 0 });
  });

  it('reads decimals with point or comma', () => {
    expect(values('lamps', '2x8,5')).toEqual({ lamps: 2, lampWatts: 8.5 });
    expect(values('hours', '3.5 h')).toEqual({ hours: 3.5 });
    expect(values('run', '18 m')).toEqual({ run: 18 });
    expect(values('run', '')).toEqual({ run: undefined });
  });

  it('reads heavy appliances with their watts', () => {
    expect(values('heavy', 'oven 3000; heater 2 kW')).toEqual({
      heavy: [
        { what: 'oven', watts: 3000 },
        { what: 'heater', watts: 2000 },
      ],
    });
    expect(values('heavy', 'hob 2 2500, water pump 0,75 kW')).toEqual({
      heavy: [
        { what: 'hob 2', watts: 2500 },
        { what: 'water pump', watts: 750 },
      ],
    });
  });

  it.each([
    ['lamps', '3x9x2', 'Lamps are typed as a count and watts: 3x9'],
    ['lamps', '61', 'Lamps are 0 to 60'],
    ['lamps', '3x2001', 'Lamps have 0 to 2000 W each'],
    ['fans', 'two', 'Fans are typed as a count and watts: 3x9'],
    ['outlets', '2.5', 'Outlets are 0 to 40'],
    ['hours', '73', 'Hours are 0 to 72'],
    ['hours', '-1', 'Hours are 0 to 72'],
    ['keepOutletWatts', '3001', 'Watts at the outlet are 0 to 3000'],
    ['heavy', 'oven', 'Say what it is and its watts: oven 3000'],
    ['heavy', '3000', 'Say what it is and its watts: oven 3000'],
    ['heavy', 'oven 20001', 'oven: watts are 1 to 20000'],
    ['kind', 'attic', 'A kind is one of room, sleeping, wet, passage, outdoor, intake'],
    ['run', '0', 'Metres are 1 to 200'],
  ] as const)('refuses in %s the text %s in words', (column, text, message) => {
    expect(values(column, text)).toBe(message);
  });

  it('guesses the kind from a name', () => {
    expect(['Bath', 'Back bedroom', 'Hall', 'Study', 'Balcony', 'Bathurst'].map(kindFromName)).toEqual([
      'wet',
      'sleeping',
      'passage',
      'room',
      'outdoor',
      'room',
    ]);
  });
});

describe('a paste', () => {
  it('takes tabs in the order of the table without a heading', () => {
    const { rooms, errors } = parseSurvey('Hall\tpassage\t2x9\t-\t-\t-\t1\t-\t-\t3\nBath\t\t2 7\t\t\theater 2000');
    expect(errors).toEqual([]);
    expect(rooms[0]).toEqual(room('Hall', { kind: 'passage', lamps: 2, keepLamps: 1, hours: 3 }));
    expect(rooms[1]).toEqual({
      ...room('Bath', { kind: 'wet', lamps: 2, lampWatts: 7, heavy: [{ what: 'heater', watts: 2000 }] }),
      order: 1,
    });
  });

  it('takes a heading in any order of known names, and says which column it does not know', () => {
    const { rooms, errors } = parseSurvey('Sockets;Room;Colour;Hours wanted\n4;Study;blue;2\n');
    expect(rooms).toEqual([room('Study', { outlets: 4, hours: 2 })]);
    expect(errors).toEqual([
      { row: 0, column: null, text: 'Colour', message: 'No column is called Colour: it is left out' },
    ]);
  });

  it('takes quoted cells with the delimiter, quotes and line ends in them', () => {
    const { rooms } = parseSurvey('name,heavy\r\n"Kitchen, ""old""","oven 3000;\nhob 2000"\r\n');
    expect(rooms[0]).toMatchObject({ name: 'Kitchen, "old"', heavy: [{ what: 'oven' }, { what: 'hob' }] });
  });

  it('keeps a row whose cell cannot be read and names row, column and text', () => {
    const { rooms, errors } = parseSurvey('name\thours\tlamps\nStudy\t99\t2x9');
    expect(rooms[0]).toMatchObject({ name: 'Study', hours: 0, lamps: 2 });
    expect(errors).toEqual([{ row: 0, column: 'hours', text: '99', message: 'Hours are 0 to 72' }]);
  });

  it('gives ids that are readable and new, and puts the rows last', () => {
    const present = [room('Study', { order: 4 })];
    const { rooms } = parseSurvey('name\nStudy\nÉtude\n???', present);
    expect(rooms.map(({ id, order }) => [id, order])).toEqual([
      ['study-2', 5],
      ['e-tude', 6],
      ['room', 7],
    ]);
  });

  it('stops at a hundred rooms and says so', () => {
    const text = `name\n${Array.from({ length: 101 }, (_, i) => `Room ${i}`).join('\n')}`;
    const { rooms, errors } = parseSurvey(text);
    expect(rooms).toHaveLength(100);
    expect(errors).toEqual([{ row: 100, column: null, text: 'Room 100', message: 'A survey has at most 100 rooms' }]);
  });

  it('has nothing in an empty paste', () => {
    expect(parseSurvey(' \n\t\n')).toEqual({ rooms: [], errors: [] });
  });
});

describe('the file of a survey', () => {
  it('heads its columns and writes cells as they are typed', () => {
    expect(surveyCsv(sixRooms().slice(2, 4))).toBe(
      'Name,Kind,Lamps,Fans,Outlets,Heavy,Lamps kept,Fans kept,Outlet kept W,Hours,Run m\n' +
        'Kitchen,room,2x12,,3,oven 3000,1,,,3,\n' +
        'Bath,wet,2x7,,1,heater 2000,1,,,2,\n',
    );
  });

  it('guards a name that a spreadsheet would run, and reads it back', () => {
    const name = '=HYPERLINK("x")';
    const csv = surveyCsv([room('x', { name })]);
    expect(csv).toContain(`"'=HYPERLINK(""x"")"`);
    expect(parseSurvey(csv).rooms[0]!.name).toBe(name);
  });

  it('reads back what it wrote, for every survey', () => {
    fc.assert(
      fc.property(anySurvey(true), (rooms) => {
        const back = parseSurvey(surveyCsv(rooms));
        expect(back.errors).toEqual([]);
        expect(back.rooms.map((row) => COLUMNS.map((column) => writeCell(column, row)))).toEqual(
          rooms.map((row) => COLUMNS.map((column) => writeCell(column, row))),
        );
      }),
      { numRuns: 100 },
    );
  });
});
