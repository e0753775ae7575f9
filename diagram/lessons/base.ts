import { Home, type HomeOptions } from '../document/home';
import type { Lesson } from './types';

/** The homes that lessons begin with: right as drawn, and of no more parts than a small drawing shows well. */

type Drawings = Pick<Lesson, 'wrong' | 'right' | 'face' | 'place' | 'focus'>;

const pair = (wrong: Home, right: Home): Pick<Lesson, 'wrong' | 'right'> => ({
  wrong: wrong.document(),
  right: right.document(),
});

/** Both homes core by core in the study. */
export const inStudy = (wrong: Home, right: Home, focus?: readonly string[]): Drawings => ({
  ...pair(wrong, right),
  face: 'connections',
  place: 'study',
  focus,
});

/** Both homes core by core at the board. */
export const atBoard = (wrong: Home, right: Home, focus?: readonly string[]): Drawings => ({
  ...pair(wrong, right),
  face: 'connections',
  place: 'hall',
  focus,
});

/** Both homes in single lines. */
export const onOverview = (wrong: Home, right: Home, focus?: readonly string[]): Drawings => ({
  ...pair(wrong, right),
  face: 'overview',
  focus,
});

/** Neither meter nor arrester: the drawings are to be small, and only one lesson speaks of either. */
export const lean = (home: Home): Home => home.drop('P1').drop('F9').line('F1:2', 'Q1:1').neutral('SUP:N', 'Q1:3');

/** Service fuse F1, main switch Q1, bars LB NB EB, an rcd Q2 between where one is asked for; a study without ways. */
export function board(options: HomeOptions = {}): Home {
  const { rcd = false } = options;
  const home = lean(new Home({ ...options, rcd }))
    .drop('LB0')
    .drop('NB0')
    .place('study', 'room', { name: 'Study' });
  return rcd === false
    ? home.line('Q1:2', 'LB').neutral('Q1:4', 'NB')
    : home.line('Q1:2', 'Q2:1').neutral('Q1:4', 'Q2:3');
}

/** Way Q11 to the study: lamp E1 on switch S1. */
export const lampRoom = (options: HomeOptions = {}): Home => board(options).way('Q11', 'study').lamp('E1', 'S1', 'Q11');

/** Two ways of lamps in one room: E1 behind Q11, E2 behind Q12. */
export const twoWays = (options: HomeOptions = {}): Home =>
  lampRoom(options).way('Q12', 'study').lamp('E2', 'S2', 'Q12');

/** Way Q11 to the study: outlet X1, behind an rcd. */
export const outletRoom = (): Home => board({ rcd: true }).way('Q11', 'study').socket('X1', 'Q11');

/** Way Q21 to a bedroom on the bars of the backup: lamp E2 on switch S2, outlet X2. */
const withBedroom = (home: Home): Home =>
  home
    .place('bedroom', 'room', { name: 'Bedroom' })
    .way('Q21', 'bedroom', {}, { bars: '2' })
    .lamp('E2', 'S2', 'Q21')
    .socket('X2', 'Q21');

/** An inverter that feeds a bedroom; nothing else hangs on the mains. */
export const backedUp = (ratings: Parameters<Home['backup']>[0] = {}): Home =>
  withBedroom(
    lean(new Home({ rcd: false }))
      .drop('LB')
      .drop('NB')
      .backup(ratings),
  );

/** The same beside an rcd Q2 of the mains with its bars LB NB. */
export const backedUpBesideRcd = (): Home => withBedroom(lean(new Home()).backup());
