import type { Home } from '../document/home';
import { inStudy, lampRoom, onOverview, outletRoom } from './base';
import type { Lesson } from './types';

const twoLamps = (): Home => lampRoom().lamp('E2', 'S2', 'Q11');

const coloured = (line: string): Home =>
  outletRoom().cut('JL11', 'X1').wire('line', 'JL11', 'X1:L', undefined, { colour: line });

/** Drawing and file. */
export const drawing: Record<string, () => Lesson> = {
  'duplicate-ref': () => ({
    ...inStudy(twoLamps().set('S2', { ref: 'S1' }), twoLamps()),
    shows: 'Two switches of the study both bear the designation S1.',
    difference: 'They are S1 and S2.',
  }),
  'unnamed-way': () => ({
    ...onOverview(lampRoom().set('Q11', { label: undefined }), lampRoom().set('Q11', { label: 'Study lights' }), [
      'Q11',
      'E1',
    ]),
    shows: 'Way 1 behind breaker Q11 feeds the study; it has no name.',
    difference: 'The way is named "Study lights", and the chart at the board says so.',
  }),
  'wrong-colour': () => ({
    ...inStudy(coloured('GNYE'), outletRoom()),
    shows: 'The line core to outlet X1 is green and yellow, the colours of earth.',
    difference: 'The line core is brown.',
  }),
  'missing-data': () => ({
    ...onOverview(lampRoom().set('Q11', { rating: undefined }), lampRoom(), ['Q11', 'E1']),
    shows: 'Breaker Q11 bears no rating.',
    difference: 'Q11 bears its rating, 6 A of type B.',
  }),
  'unused-part': () => ({
    ...inStudy(
      lampRoom().part('lamp', 'E2', 'study', { watts: 12, pf: 0.9, class: 2, fixed: true }),
      lampRoom().lamp('E2', 'S2', 'Q11', { class: 2 }),
    ),
    shows: 'Beside lamp E1 on its switch there is a lamp E2 without any wire.',
    difference: 'E2 is wired, on its own switch S2.',
  }),
  'loose-wire': () => ({
    ...inStudy(lampRoom().line('JL11', 'S1:3'), lampRoom()),
    shows: 'A wire leads from the joint of the line to contact 3 of switch S1, which has only 1 and 2.',
    difference: 'The wire is gone; each wire ends at a terminal that exists.',
  }),
};
