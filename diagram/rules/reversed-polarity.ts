import { recalled, seen } from './clauses';
import { reversals } from './readings/reversals';
import { turnOver } from './readings/turn-over';
import type { Rule } from './types';
import { be, capital, sayParts } from './readings/words';

/** L on neutral and N on line, fed. */
export const reversedPolarity: Rule = {
  meta: {
    id: 'reversed-polarity',
    severity: 'danger',
    group: 'polarity',
    title: 'Line and neutral change places',
    clauses: [seen('BS 7671', '132.14.1'), recalled('BS 7671', '643.3')],
    lesson:
      'Everything works, and that is the trap. Switches and fuses in lamps and appliances now open the neutral; the screw ' +
      'shell of a lampholder, which a hand touches when the lamp is changed, stands at line voltage whether it is on or off.',
    remedy: 'Change the two wires over where they cross, and prove polarity at every point behind.',
  },
  *check(context) {
    for (const reversal of reversals(context)) {
      const { points, wires, conditions } = reversal;
      const names = sayParts(context, points);
      yield {
        heading: `${capital(names)} ${be(points.length)} the wrong way round`,
        message:
          `Line arrives at N and neutral at L of ${names}. ${points.length === 1 ? 'It works' : 'They work'}, ` +
          `but what should be dead when switched off stays at line voltage.`,
        parts: points,
        wires,
        conditions,
        remedies: turnOver(context, reversal),
      };
    }
  },
};
