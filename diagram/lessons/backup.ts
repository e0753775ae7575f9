import type { Home } from '../document/home';
import { atBoard, backedUp, onOverview } from './base';
import type { Lesson } from './types';

/** What belongs to the source itself. */
const SOURCE = ['G1', 'G2', 'F2', 'Q4', 'Q5'];

/** An appliance on the backup instead of the outlet. */
const withAppliance = (home: Home, watts: number, surge = 1): Home =>
  home.drop('X2').heater('E3', 'S3', 'Q21', { watts, surge });

/** The next size of inverter, with the leads and the fuse that it needs. */
const larger = (surge: number): Home =>
  backedUp({ va: 1000, surge }).set('F2', { rating: 125 }).cable('kd', 50, 0.8).set('Q4', { rating: 10 });

/** A lamp without metal on the backup, so that its output needs no rcd. */
const lampOnBackup = (): Home =>
  backedUp()
    .drop('X2')
    .drop('E2')
    .drop('S2')
    .lamp('E2', 'S2', 'Q21', { class: 2 })
    .drop('Q5')
    .line('Q4:2', 'LB2')
    .neutral('Q4:4', 'NB2');

/** A flooded battery away from the board, where somebody sleeps or where air moves. */
const flooded = (name: string, where: { sleeping?: boolean; ventilated: boolean }): Home =>
  backedUp()
    .place('corner', where.sleeping ? 'room' : 'passage', { name, ...where })
    .set('G2', { chemistry: 'flooded', place: 'corner' });

/** Backup. */
export const backup: Record<string, () => Lesson> = {
  'backup-overload': () => ({
    ...onOverview(withAppliance(backedUp(), 900), withAppliance(larger(2000), 900), SOURCE),
    shows:
      'Inverter G1 of 700 VA, with its battery and its output. In an outage it feeds an appliance of 900 W and a lamp.',
    difference: 'G1 is an inverter of 1000 VA, with a fuse of 125 A and leads for it.',
  }),
  'backup-surge': () => ({
    ...onOverview(withAppliance(backedUp(), 300, 6), withAppliance(larger(2500), 300, 6), SOURCE),
    shows:
      'Inverter G1 of 700 VA, 1400 VA for a start. In an outage it feeds a fridge of 300 W, which starts with six times as much.',
    difference: 'G1 is an inverter of 1000 VA that gives 2500 VA for a start.',
  }),
  'short-autonomy': () => ({
    ...onOverview(
      backedUp({ hoursWanted: 10 }),
      backedUp({ hoursWanted: 10 }).set('G2', { count: 2, arrangement: 'parallel' }),
      SOURCE,
    ),
    shows: 'Ten hours are asked of one battery of 12 V, 200 Ah, before 112 W.',
    difference: 'Two such batteries stand side by side.',
  }),
  'no-battery-fuse': () => ({
    ...onOverview(backedUp().drop('F2').wire('dc+', 'G2:+', 'G1:bat.+', 'kd'), backedUp(), SOURCE),
    shows: 'Battery G2 is joined to inverter G1 with nothing between.',
    difference: 'Fuse F2, made for dc, stands close to the plus of the battery.',
  }),
  'battery-reversed': () => ({
    ...atBoard(
      backedUp()
        .cut('F2:2', 'G1:bat.+')
        .cut('G2:-', 'G1:bat.-')
        .wire('dc+', 'F2:2', 'G1:bat.-', 'kd')
        .wire('dc-', 'G2:-', 'G1:bat.+', 'kd'),
      backedUp(),
      ['G1', 'G2', 'F2'],
    ),
    shows: 'The lead from plus of battery G2 ends at minus of inverter G1, and the lead from minus at plus.',
    difference: 'Plus goes to plus and minus to minus.',
  }),
  'thin-battery-lead': () => ({
    ...onOverview(backedUp().cable('kd', 10, 0.3), backedUp(), SOURCE),
    shows: 'Inverter G1 of 700 VA is joined to its battery by leads of 10 mm2.',
    difference: 'The leads have 35 mm2 and carry what the fuse F2 of 100 A lets pass.',
  }),
  'charger-overload': () => ({
    ...onOverview(backedUp({ charge: 90 }), backedUp({ charge: 20 }), SOURCE),
    shows: 'Inverter G1 charges a battery of 200 Ah with 90 A.',
    difference: 'It charges with 20 A, a tenth of its 200 Ah.',
  }),
  'battery-place': () => ({
    ...onOverview(
      flooded('Bedroom 2', { sleeping: true, ventilated: false }),
      flooded('Landing', { ventilated: true }),
    ),
    face: 'connections',
    place: 'corner',
    shows: 'The flooded battery G2 stands in bedroom 2; two leads go from it to the inverter in the hall.',
    difference: 'The battery stands on a ventilated landing.',
  }),
  'no-backup-isolation': () => ({
    ...atBoard(
      lampOnBackup().set('Q4', { poles: 1 }).cut('G1:out.N', 'Q4:3').cut('Q4:4', 'NB2').neutral('G1:out.N', 'NB2'),
      lampOnBackup(),
      SOURCE,
    ),
    shows: 'Breaker Q4 at the output of inverter G1 has one pole, in the line; the neutral goes past it.',
    difference: 'Q4 has two poles and opens line and neutral of the output together.',
  }),
};
