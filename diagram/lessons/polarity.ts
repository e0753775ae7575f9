import type { Home } from '../document/home';
import { inStudy, lampRoom, outletRoom, board } from './base';
import type { Lesson } from './types';

const neutralThroughSwitch = (): Home =>
  lampRoom()
    .cut('JL11', 'S1')
    .cut('S1', 'E1')
    .cut('JN11', 'E1')
    .line('JL11', 'E1:L', 'cE1')
    .neutral('JN11', 'S1:1')
    .neutral('S1:2', 'E1:N', 'cE1');

const fuseInNeutral = (): Home =>
  lampRoom()
    .part('fuse', 'F5', 'study', { rating: 3, standard: 'gG' })
    .cut('JN11', 'E1')
    .neutral('JN11', 'F5:1')
    .neutral('F5:2', 'E1:N', 'cE1');

const stairs = (): Home => board().way('Q11', 'study').twoWay('E1', 'S1', 'S2', 'Q11');

const threeOutlets = (): Home =>
  outletRoom().socket('X2', 'Q11').socket('X3', 'Q11').cut('JL11', 'X2').cut('JL11', 'X3');

/** Polarity and continuity. */
export const polarity: Record<string, () => Lesson> = {
  'switched-neutral': () => ({
    ...inStudy(neutralThroughSwitch(), lampRoom()),
    shows: 'Lamp E1 has its line straight from the joint; its neutral goes through switch S1.',
    difference:
      'S1 stands in the line, the neutral goes straight to E1: with the switch off nothing in the lamp is live.',
  }),
  'fused-neutral': () => ({
    ...inStudy(fuseInNeutral(), lampRoom()),
    shows: 'The neutral of lamp E1 goes through fuse F5.',
    difference: 'The neutral goes straight to E1. What opens on too much current stands in the line, at the board.',
  }),
  'reversed-polarity': () => ({
    ...inStudy(outletRoom().move('X1:L', 'JL11', 'X1:N').move('X1:N', 'JN11', 'X1:L'), outletRoom()),
    shows: 'At outlet X1 the brown line core ends at N and the blue neutral core at L.',
    difference:
      'Line ends at L and neutral at N, so that the switch and fuse of whatever is plugged in stand in the line.',
  }),
  'switched-earth': () => ({
    ...inStudy(
      outletRoom()
        .part('switch', 'S9', 'study', { rating: 6 })
        .cut('JE11', 'X1')
        .earth('JE11', 'S9:1')
        .earth('S9:2', 'X1:E'),
      outletRoom(),
    ),
    shows: 'The earth core of outlet X1 goes through switch S9.',
    difference: 'The earth goes to X1 in one piece; no contact can open it.',
  }),
  'missing-earth': () => ({
    ...inStudy(outletRoom().cut('JE11', 'X1'), outletRoom()),
    shows:
      'Outlet X1 has line and neutral; its earth contact is empty, and the earth core of the cable ends at the joint.',
    difference: 'The earth core goes on from the joint to X1.',
  }),
  'open-neutral': () => ({
    ...inStudy(lampRoom().cut('JN11', 'E1'), lampRoom()),
    shows: 'Lamp E1 has its switched line and its earth; nothing ends at its N.',
    difference: 'The neutral goes from the joint to N of E1.',
  }),
  'open-line': () => ({
    ...inStudy(lampRoom().cut('JL11', 'S1'), lampRoom()),
    shows: 'Switch S1 is joined to lamp E1, but no line comes to the switch.',
    difference: 'The line goes from the joint to S1, and from there to the lamp.',
  }),
  'short-circuit': () => ({
    ...inStudy(lampRoom().line('JL11', 'JN11'), lampRoom()),
    shows: 'In the study a wire leads from the joint of the line to the joint of the neutral.',
    difference: 'Line and neutral meet nowhere but in the lamp.',
  }),
  'bypassed-contact': () => ({
    ...inStudy(lampRoom().line('JL11', 'E1:L', 'cE1'), lampRoom()),
    shows: 'Lamp E1 hangs on switch S1; a second wire leads from the joint straight to L of the lamp.',
    difference: 'L of E1 has the switched line alone.',
  }),
  'permanent-feed': () => ({
    ...inStudy(lampRoom().drop('S1').line('JL11', 'E1:L', 'cE1'), lampRoom()),
    shows: 'The line goes from the joint straight to lamp E1; there is no switch.',
    difference: 'Switch S1 stands in the line of E1.',
  }),
  'two-way-miswired': () => ({
    ...inStudy(
      stairs()
        .cut('JL11', 'S1')
        .cut('S1:1', 'S2:1')
        .line('JL11', 'S1:1', 'cE1')
        .wire('strapper', 'S1:C', 'S2:1', 'cE1'),
      stairs(),
    ),
    shows:
      'Two-way switches S1 and S2 work lamp E1; the line ends at contact 1 of S1, and one of the two wires between them at its common C.',
    difference: 'The line ends at C of S1, the lamp at C of S2, and the two wires between them join 1 to 1 and 2 to 2.',
  }),
  'line-role-mismatch': () => ({
    ...inStudy(lampRoom().cut('S1', 'E1').neutral('S1:2', 'E1:L', 'cE1'), lampRoom()),
    shows: 'The wire from switch S1 to L of lamp E1 is drawn as a neutral, dashed and blue.',
    difference: 'It is drawn as what it is: a switched line.',
  }),
  'open-terminal': () => ({
    ...inStudy(
      lampRoom().part('switch', 'S2', 'study', { rating: 6 }).line('JL11', 'S2:1'),
      lampRoom().lamp('E2', 'S2', 'Q11'),
    ),
    shows: 'Beside lamp E1 on its switch S1 there is a switch S2 with the line at contact 1 and nothing at contact 2.',
    difference: 'S2 works lamp E2.',
  }),
  'crowded-terminal': () => ({
    ...inStudy(
      threeOutlets().line('X1:L', 'X2:L').line('X1:L', 'X3:L'),
      threeOutlets().line('X1:L', 'X2:L').line('X2:L', 'X3:L'),
    ),
    shows: 'Three outlets: three line cores stand under the one screw L of X1, from the joint, to X2 and to X3.',
    difference: 'The line loops on from outlet to outlet: two cores under a screw at most.',
  }),
};
