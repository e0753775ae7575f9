import type { Home } from '../document/home';
import { atBoard, board, inStudy, lampRoom, onOverview, twoWays } from './base';
import type { Lesson } from './types';

/** The bars and the breaker of the way in a loft, away from fuse and main switch. */
const loftBoard = (): Home =>
  ['LB', 'NB', 'EB', 'Q11']
    .reduce<Home>((home, id) => home.set(id, { place: 'loft' }), lampRoom())
    .place('loft', 'passage', { name: 'Loft' })
    .cut('Q1:2', 'LB')
    .cut('Q1:4', 'NB')
    .cut('SUP:E', 'EB')
    .cable('kf', 16, 8)
    .line('Q1:2', 'LB', 'kf')
    .neutral('Q1:4', 'NB', 'kf')
    .earth('SUP:E', 'EB', 'kf');

const heated = (watts: number, rating: number, csa: number, length = 9): Home =>
  board()
    .way('Q12', 'study', { rating }, { csa, length })
    .heater('E5', 'S5', 'Q12', { watts, label: 'Heater' })
    .cable('cE5', csa, 1);

const farOutlet = (csa: number): Home =>
  board({ rcd: true })
    .way('Q12', 'study', { rating: 16 }, { csa, length: 90 })
    .socket('X5', 'Q12', { rating: 16, load: 2300 });

const twoHeaters = (): Home =>
  [11, 12].reduce<Home>(
    (home, n) =>
      home
        .way(`Q${n}`, 'study', { rating: 32 }, { csa: 6, length: 5 })
        .heater(`E${n}`, `S${n}`, `Q${n}`, { watts: 6900, label: 'Heater' })
        .cable(`cE${n}`, 6, 1),
    board(),
  );

const behindRcd = (rating: number): Home =>
  [11, 12].reduce<Home>(
    (home, n) => home.way(`Q${n}`, 'study', { rating: 25 }, { csa: 6 }).socket(`X${n}`, `Q${n}`, { rating: 16 }),
    board({ rcd: { rating } }),
  );

const weak = (icn: number): Home =>
  board({ supply: { zln: 0.05 } })
    .way('Q11', 'study', { icn })
    .lamp('E1', 'S1', 'Q11');

const onePole = (): Home =>
  lampRoom().set('Q1', { poles: 1 }).cut('SUP:N', 'Q1:3').cut('Q1:4', 'NB').neutral('SUP:N', 'NB');

const series = (upper: number): Home =>
  board()
    .part('mcb', 'Q8', 'hall', { poles: 1, rating: upper, curve: 'C', icn: 6000, label: 'Feeder' })
    .part('line-bar', 'LB8', 'hall', { rating: 63 })
    .line('LB', 'Q8:1')
    .line('Q8:2', 'LB8')
    .way('Q11', 'study', { rating: 13 }, { csa: 2.5 })
    .move('LB', 'Q11:1', 'LB8')
    .lamp('E1', 'S1', 'Q11');

const pump = (curve: 'B' | 'C'): Home =>
  board().way('Q12', 'study', { rating: 6, curve }).heater('E5', 'S5', 'Q12', { watts: 920, surge: 5, label: 'Pump' });

const heavyOutlet = (rating: number): Home =>
  board({ rcd: true, practice: 'IN' })
    .way('Q12', 'study', { rating }, { csa: 2.5 })
    .socket('X5', 'Q12', { rating: 16, load: 1000 });

const fanRoom = (): Home => board({ rcd: true }).way('Q11', 'study').fan('M1', 'S1', 'R1', 'Q11').socket('X1', 'Q11');

const heavyOutlets = (count: number): Home =>
  Array.from({ length: count }, (_, i) => `X${i + 1}`).reduce<Home>(
    (home, id) => home.socket(id, 'Q12', { rating: 16, load: 500 }),
    board({ rcd: true, practice: 'IN' }).way('Q12', 'study', { rating: 16 }, { csa: 4 }),
  );

const arrester = (): Home =>
  lampRoom().part('spd', 'F9', 'hall', { class: 2 }).line('LB', 'F9:L').neutral('NB', 'F9:N').earth('F9:E', 'EB');

/** Overload and short circuit. */
export const overload: Record<string, () => Lesson> = {
  'no-overcurrent': () => ({
    ...atBoard(loftBoard().drop('F1').line('SUP:L', 'Q1:1'), loftBoard()),
    shows:
      'No service fuse: from main switch Q1 a cable of 16 mm2 runs to a board in the loft, and nothing before it limits its current.',
    difference: 'Service fuse F1 stands before Q1 and the cable to the loft.',
  }),
  'overloaded-way': () => ({
    ...onOverview(heated(4600, 16, 4), heated(4600, 25, 4), ['Q12', 'E5']),
    shows: 'A heater of 4600 W, which takes 20 A, hangs on breaker Q12, B16.',
    difference: 'Q12 is a B25 before the same heater, and its cable of 4 mm2 carries as much.',
  }),
  'undersized-cable': () => ({
    ...onOverview(heated(3000, 20, 1.5), heated(3000, 20, 2.5), ['Q12', 'E5']),
    shows: 'Breaker Q12, B20, stands before a cable of 1.5 mm2.',
    difference: 'The cable has 2.5 mm2 and carries more than the 20 A that Q12 lets pass.',
  }),
  'high-drop': () => ({
    ...onOverview(farOutlet(2.5), farOutlet(6), ['Q12', 'X5']),
    shows: 'Outlet X5 with a load of 2300 W stands at the end of 90 m of 2.5 mm2.',
    difference: 'The run of 90 m has 6 mm2.',
  }),
  'weak-breaking-capacity': () => ({
    ...onOverview(weak(3000), weak(6000), ['Q11', 'E1']),
    shows: 'A home near its transformer: breaker Q11, made for 3000 A, stands where a short circuit draws 5060 A.',
    difference: 'Q11 is a breaker of 6000 A breaking capacity.',
  }),
  'overloaded-main': () => ({
    ...atBoard(twoHeaters().set('Q1', { rating: 32 }), twoHeaters()),
    shows: 'Two heaters of 6900 W hang on two ways behind main switch Q1 of 32 A.',
    difference: 'Q1 is a switch of 63 A.',
  }),
  'rcd-underrated': () => ({
    ...atBoard(behindRcd(40), behindRcd(63)),
    shows: 'Rcd Q2 of 40 A stands behind a fuse of 63 A and before two ways of 25 A.',
    difference: 'Q2 is an rcd of 63 A, as much as the fuse before it.',
  }),
  'single-pole-main': () => ({
    ...atBoard(onePole(), lampRoom()),
    shows: 'Main switch Q1 has one pole, in the line; the neutral of the supply goes straight to its bar.',
    difference: 'Q1 has two poles and opens line and neutral together.',
  }),
  'no-main-switch': () => ({
    ...atBoard(twoWays().drop('Q1').line('F1:2', 'LB').neutral('SUP:N', 'NB'), twoWays()),
    shows: 'Service fuse F1 is joined straight to the line bar of two ways; there is no main switch.',
    difference: 'Main switch Q1 stands between them.',
  }),
  'no-selectivity': () => ({
    ...atBoard(series(16), series(32)),
    shows: 'Breaker Q8, C16, stands before breaker Q11, B13.',
    difference: 'Q8 is a C32: a fault in the study opens Q11 alone.',
  }),
  'wrong-curve': () => ({
    ...onOverview(pump('B'), pump('C'), ['Q12', 'E5']),
    shows: 'A pump of 920 W, which starts with five times its current, hangs on breaker Q12, B6.',
    difference: 'Q12 is of type C and holds through the start.',
  }),
  'heavy-socket-on-light-way': () => ({
    ...onOverview(heavyOutlet(10), heavyOutlet(16), ['Q12', 'X5']),
    shows: 'Outlet X5 of 16 A hangs on breaker Q12, B10.',
    difference: 'Q12 is a B16 before the outlet of 16 A.',
  }),
  'regulator-feeds-other': () => ({
    ...inStudy(fanRoom().cut('JL11', 'X1').switched('R1:2', 'X1:L'), fanRoom()),
    shows: 'Fan M1 hangs on switch S1 and regulator R1; outlet X1 has its line from behind the regulator.',
    difference: 'X1 has its line from the joint, before switch and regulator.',
  }),
  'too-many-points': () => ({
    ...onOverview(heavyOutlets(3), heavyOutlets(2), ['Q12', 'X1', 'X2', 'X3']),
    shows: 'Three outlets of 16 A hang on one way.',
    difference: 'Two of them hang on it; a third needs a way of its own.',
  }),
  'no-spd': () => ({
    ...atBoard(lampRoom(), arrester()),
    shows: 'Service fuse, main switch and bars; no surge arrester.',
    difference: 'Arrester F9 stands at the bar behind the main switch, with its earth.',
  }),
};
