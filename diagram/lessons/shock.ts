import { Home } from '../document/home';
import { atBoard, backedUp, backedUpBesideRcd, board, lampRoom, lean, onOverview, outletRoom } from './base';
import type { Lesson } from './types';

const ON_TT = { supply: { system: 'TT', ra: 40 } } as const;

const rodHome = (): Home =>
  lean(new Home({ ...ON_TT, rcd: false }))
    .drop('LB0')
    .drop('NB0')
    .line('Q0:2', 'LB')
    .neutral('Q0:4', 'NB')
    .place('study', 'room', { name: 'Study' })
    .way('Q11', 'study')
    .lamp('E1', 'S1', 'Q11');

const farHeater = (metres: number): Home =>
  board()
    .way('Q12', 'study', { rating: 16 }, { csa: 2.5, length: metres })
    .heater('E5', 'S5', 'Q12', { watts: 500, label: 'Heater' });

const heaterWithEarth = (cpc: number): Home =>
  board({ supply: { ze: 0.1 } })
    .way('Q12', 'study', { rating: 32 }, { csa: 6 })
    .cable('k12', 6, 1, { cpc })
    .heater('E5', 'S5', 'Q12', { watts: 3000, label: 'Heater' })
    .cable('cE5', 6, 1);

const rcdBeforeInverter = (): Home =>
  backedUpBesideRcd()
    .drop('Q5')
    .line('Q4:2', 'LB2')
    .neutral('Q4:4', 'NB2')
    .move('LB0', 'Q3:1', 'LB')
    .move('NB0', 'Q3:3', 'NB');

const pipe = (): Home => lampRoom().part('bond', 'BW', 'hall', { to: 'water' });

const bath = (place: 'bath' | 'passage'): Home =>
  board({ rcd: true })
    .place('bath', 'wet', { name: 'Bath', zone: 1 })
    .place('passage', 'passage', { name: 'Passage' })
    .way('Q11', place, {}, {})
    .socket('X1', 'Q11');

/** Protection against shock. */
export const shock: Record<string, () => Lesson> = {
  'no-main-earth': () => ({
    ...atBoard(rodHome().cut('XE:E', 'EB'), rodHome()),
    shows: 'A home on TT: the earth bar gathers the earths of the ways, but no wire leads from it to electrode XE.',
    difference: 'The earth bar is joined to electrode XE.',
  }),
  'earth-neutral-joined': () => ({
    ...atBoard(lampRoom().neutral('NB', 'EB'), lampRoom()),
    shows: 'At the board, behind the main switch, a wire joins the neutral bar and the earth bar.',
    difference: 'The two bars are apart; they meet at the origin of the supply and nowhere in the home.',
  }),
  'no-rcd': () => ({
    ...atBoard(board().way('Q11', 'study').socket('X1', 'Q11'), outletRoom()),
    shows: 'Way 1, which feeds an outlet, hangs on main switch Q1 and breaker Q11; there is no rcd.',
    difference: 'Rcd Q2 of 30 mA stands before the bar.',
  }),
  'rcd-idle-on-backup': () => ({
    ...onOverview(rcdBeforeInverter(), backedUp()),
    shows: 'Outlet X2 hangs on inverter G1; the only rcd, Q2, stands before the inverter, on the side of the mains.',
    difference: 'Rcd Q5 stands behind the inverter, before the bar of the backed-up ways.',
  }),
  'no-earth-reference-on-backup': () => ({
    ...onOverview(backedUp({ bond: false }), backedUp(), ['G1', 'G2', 'F2', 'Q3', 'Q4', 'Q5']),
    shows:
      'Inverter G1 feeds the bedroom; it has no bond, so that its neutral has no earth once main switch Q1 is off.',
    difference: 'G1 bonds its neutral to earth while it runs on its battery.',
  }),
  'slow-disconnection': () => ({
    ...onOverview(farHeater(160), farHeater(20), ['Q12', 'E5']),
    shows: 'A heater of 500 W hangs on breaker Q12, B16, at the end of 160 m of 2.5 mm2; there is no rcd.',
    difference: 'The run is 20 m: enough current flows in a fault to open Q12 at once.',
  }),
  'thin-earth': () => ({
    ...onOverview(heaterWithEarth(1), heaterWithEarth(6), ['Q12', 'E5']),
    shows: 'A heater hangs on breaker Q12, B32, by a cable of 6 mm2 whose earth core has 1 mm2.',
    difference: 'The earth core has 6 mm2, as the line.',
  }),
  'no-main-bond': () => ({
    ...atBoard(pipe(), pipe().cable('kb', 10, 4, { cores: 1 }).earth('EB', 'BW:E', 'kb')),
    shows: 'A water pipe BW stands beside the board; no wire joins it to the earth bar.',
    difference: 'A bonding conductor of 10 mm2 joins the pipe to the earth bar.',
  }),
  'wet-place-socket': () => ({
    ...onOverview(bath('bath'), bath('passage'), ['Q11', 'X1']),
    shows: 'Outlet X1 stands in zone 1 of a bath.',
    difference: 'It stands in the passage before the bath.',
  }),
};
