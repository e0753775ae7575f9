import { describe, expect, it } from 'vitest';
import { checkSurvey, soundRooms } from '@/diagram/survey/check';
import { optionsOf, room, sixRooms } from './surveys';

const options = optionsOf('IEC', 'TN-S');
const only = (...rooms: Parameters<typeof checkSurvey>[0]) => checkSurvey(rooms, options);

describe('checking a survey', () => {
  it('finds nothing in six rooms that are right', () => {
    expect(checkSurvey(sixRooms(), options)).toEqual([]);
  });

  it('says in the cell how many of how many stay on, and offers the number that is there', () => {
    const [error] = only(room('Kitchen', { lamps: 2, keepLamps: 3 }));
    expect(error).toMatchObject({
      room: 'kitchen',
      column: 'keepLamps',
      cell: '3 of 2',
      heading: 'Kitchen: 3 of 2 lamps stay on',
    });
    expect(error!.remedy).toEqual({ label: 'Make it 2', set: { keepLamps: 2 } });
  });

  it('says the same of fans', () => {
    expect(only(room('Study', { fans: 1, keepFans: 2 }))[0]).toMatchObject({
      column: 'keepFans',
      cell: '2 of 1',
      heading: 'Study: 2 of 1 fans stay on',
    });
  });

  it('tells two rooms of one name apart, whatever the case, and offers a name that is free', () => {
    const errors = only(room('Study'), { ...room('Study 2'), id: 'b' }, { ...room('study'), id: 'c' });
    expect(errors).toHaveLength(1);
    expect(errors[0]).toMatchObject({
      room: 'c',
      column: 'name',
      heading: 'Two rooms are called study',
      remedy: { label: 'Call it study 3', set: { name: 'study 3' } },
    });
  });

  it('asks for a name', () => {
    expect(only(room('x', { name: '  ' }))[0]).toMatchObject({
      room: 'x',
      column: 'name',
      heading: 'Row 1 has no name',
    });
  });

  it('does not take lamps of 0 W', () => {
    expect(only(room('Hall', { lamps: 2, lampWatts: 0 }))[0]).toMatchObject({
      column: 'lamps',
      cell: '2 × 0',
      remedy: { label: 'Make it 9 W', set: { lampWatts: 9 } },
    });
    expect(only(room('Hall', { lamps: 0, lampWatts: 0 }))).toEqual([]);
  });

  it('says when no cable on sale reaches so far with such a load', () => {
    const far = room('Barn', { run: 200, heavy: [{ what: 'mill', watts: 18_000 }] });
    // 18 kW at pf 0.85 is 92 A; over 202 m of 35 mm2 that is 2 x 202 x 0.524e-3 x 1.1965 x 92 = 23 V, 10 %: no size on sale does.
    expect(only(far)[0]).toMatchObject({
      room: 'barn',
      column: 'run',
      cell: '200 m',
      heading: 'Barn: 200 m is too far for 92 A',
    });
    expect(only({ ...far, run: 10 })).toEqual([]);
  });

  it('says when one phase cannot give what the home asks for', () => {
    const rooms = ['A', 'B', 'C', 'D'].map((name) => room(name, { heavy: [{ what: 'water heater', watts: 9000 }] }));
    const [error] = checkSurvey(rooms, options);
    expect(error).toMatchObject({ room: null, heading: 'The home asks for 157 A' });
  });

  it('says when what stays on is more than one inverter carries', () => {
    const rooms = [room('A', { lamps: 10, lampWatts: 1000, keepLamps: 10 })];
    expect(checkSurvey(rooms, options).map(({ heading }) => heading)).toContain(
      'What stays on is more than one inverter carries',
    );
  });

  it('leaves rows with errors out of what is summed', () => {
    expect(soundRooms([room('A', { lamps: 1, keepLamps: 2 }), room('B')], options).map(({ name }) => name)).toEqual([
      'B',
    ]);
  });
});
