import type { Home } from '../document/home';
import { atBoard, backedUp, backedUpBesideRcd, board, inStudy, onOverview, outletRoom, twoWays } from './base';
import type { Lesson } from './types';

/** Both sources with ways of their own: the study on the mains, the bedroom on the inverter. */
const bothSources = (): Home =>
  backedUpBesideRcd().place('study', 'room', { name: 'Study' }).way('Q11', 'study').lamp('E1', 'S1', 'Q11');

const pluggedIn = (): Home =>
  board({ rcd: true })
    .way('Q11', 'study')
    .part('plug', 'PL1', 'study')
    .line('JL11', 'PL1:L')
    .neutral('JN11', 'PL1:N')
    .earth('JE11', 'PL1:E');

const mixedBedroom = (): Home => backedUpBesideRcd().way('Q12', 'bedroom').socket('X12', 'Q12');

/** Separation of circuits and sources. */
export const separation: Record<string, () => Lesson> = {
  'mixed-feeds': () => ({
    ...inStudy(twoWays().line('JL11', 'JL12'), twoWays()),
    shows: 'Two ways come to the study, behind Q11 and Q12; a wire joins the lines of both.',
    difference: 'The two lines are apart: with Q11 off everything behind it is dead.',
  }),
  backfeed: () => ({
    ...onOverview(bothSources().line('LB', 'LB2'), bothSources()),
    shows: 'A home with an inverter: the line bar of the mains and the bar of the backup ways are joined.',
    difference: 'The backup bar has the inverter alone; what the inverter gives can reach no line of the mains.',
    also: {
      rules: ['mixed-feeds'],
      because: 'a line that carries the backup to the mains in an outage joins two feeds while the mains is there',
    },
  }),
  'live-pins': () => ({
    ...inStudy(pluggedIn(), outletRoom()),
    shows: 'The way to the study ends in plug PL1, which hangs free.',
    difference: 'It ends in outlet X1, whose contacts nobody can touch.',
  }),
  'borrowed-neutral': () => ({
    ...inStudy(twoWays().lamp('E3', 'S3', 'Q12').move('JN12', 'E3', 'JN11'), twoWays().lamp('E3', 'S3', 'Q12')),
    shows:
      'Two ways come to the study. Lamp E3 has its line from the way behind Q12 and its neutral from the joint of the way behind Q11.',
    difference: 'E3 returns by the neutral of its own way.',
  }),
  'residual-imbalance': () => ({
    ...atBoard(outletRoom().cut('NB', 'JN11').neutral('Q1:4', 'JN11', 'k11'), outletRoom()),
    shows:
      'The way behind Q11 has its line from behind rcd Q2; its neutral goes past the rcd, straight from main switch Q1.',
    difference: 'The neutral of the way ends on the bar behind Q2, so that the rcd sees as much come home as goes out.',
  }),
  'backup-neutral-behind-other-rcd': () => ({
    ...atBoard(backedUpBesideRcd().neutral('NB', 'NB2'), backedUpBesideRcd(), [
      'NB',
      'NB2',
      'Q2',
      'Q5',
      'LB',
      'LB2',
      'Q21',
    ]),
    shows:
      'At the board the neutral bar behind rcd Q2 of the mains and the one behind rcd Q5 of the backup are joined.',
    difference: 'Each rcd has its own neutral bar, and the two meet nowhere behind them.',
  }),
  'backup-neutral-lost': () => ({
    ...atBoard(backedUp().move('NB2', 'JN21', 'NB0'), backedUp()),
    shows:
      'The bedroom way has its line from the backup bar, behind the inverter G1; its neutral ends on the neutral bar of the mains.',
    difference: 'Its neutral ends on the neutral bar of the backup, beside its line.',
  }),
  'live-after-main-off': () => ({
    ...onOverview(
      backedUp(),
      board({ rcd: true })
        .place('bedroom', 'room', { name: 'Bedroom' })
        .way('Q21', 'bedroom')
        .lamp('E2', 'S2', 'Q21')
        .socket('X2', 'Q21'),
    ),
    shows: 'The bedroom hangs on the bar of inverter G1, which goes on from its battery when main switch Q1 is off.',
    difference:
      'The bedroom hangs on the mains alone: with Q1 off nothing in it is live. A home that keeps its inverter carries the notice instead.',
  }),
  'two-sources-unmarked': () => ({
    ...onOverview(mixedBedroom(), mixedBedroom().notice('bedroom', 'Two sources: isolate the mains and the backup.'), [
      'Q12',
      'Q21',
      'E2',
      'X2',
      'X12',
    ]),
    shows:
      'In the bedroom an outlet of the mains and one of the inverter stand side by side; the documents hold no notice for it.',
    difference: 'The same home, with a notice at the bedroom that the report prints and the switchboard carries.',
  }),
  'shared-box-lines': () => ({
    ...atBoard(twoWays(), twoWays({ rcd: true })),
    shows: 'Two ways end in one switchboard of the study; nothing but the main switch stands before both.',
    difference: 'Rcd Q2 stands before both ways: one handle makes the whole switchboard dead.',
  }),
};
