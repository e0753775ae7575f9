import { recalled } from './clauses';
import { openRegions } from './readings/open-regions';
import { rejoin } from './readings/rejoin';
import type { Rule } from './types';
import { be, capital, say, sayParts } from './readings/words';

/** A load that nothing feeds, or that is backed up and dead on mains; one finding for each gap. */
export const openLine: Rule = {
  meta: {
    id: 'open-line',
    severity: 'defect',
    group: 'polarity',
    title: 'A load that nothing feeds',
    clauses: [recalled('IEC 60364-6', '6.4.3.2')],
    lesson:
      'The drawing shows the point, but in no position of its switches and in no condition does line reach it. Whoever wires it ' +
      'from this drawing will look for the missing core in the wall.',
    remedy: 'Lead the line to it, from its way through its switch.',
  },
  *check(context) {
    for (const { side, points, gap, wires, conditions, inverter, onMains } of openRegions(context)) {
      if (side !== 'L') continue;
      const who = sayParts(context, points);
      const where = gap.length > 0 ? ` The line ends at ${sayParts(context, gap)}.` : '';
      yield inverter === undefined
        ? {
            heading: `${capital(who)} ${be(points.length)} never fed`,
            message: `No condition and no position of the switches brings line to ${who}.${where}${onMains ? ` On mains ${sayParts(context, onMains)} ${be(onMains.length)} dead with ${points.length === 1 ? 'it' : 'them'}.` : ''}`,
            parts: [...gap, ...points, ...(onMains ?? [])],
            wires,
            remedies: rejoin(context, 'line', { points, gap }),
          }
        : {
            heading: `${capital(who)} ${be(points.length)} dead on mains`,
            message: `${capital(who)} must be fed in every condition, but no line reaches the input of ${say(context, inverter)}: on mains only the battery could feed ${points.length === 1 ? 'it' : 'them'}, until it is empty.`,
            parts: [inverter, ...gap, ...points],
            wires,
            ...(conditions && { conditions }),
          };
    }
  },
};
