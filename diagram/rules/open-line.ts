import { recalled } from './clauses';
import { misledRemedies } from './readings/misled';
import { openRegions } from './readings/open-regions';
import { rejoin } from './readings/rejoin';
import { shortedLines } from './readings/shorted-lines';
import { be, capital, say, sayParts, sayWire } from './readings/words';
import type { Rule } from './types';

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
    let told = shortedLines(context);
    for (const { side, points, gap, wires, conditions, inverter, onMains, misled } of openRegions(context)) {
      if (side !== 'L') continue;
      if (!misled && told-- > 0) continue;
      const who = sayParts(context, points);
      if (misled) {
        const other = misled.is === 'E' ? 'earth' : 'neutral';
        yield {
          severity: 'danger',
          heading: `The line of ${who} begins at ${other}`,
          message:
            `The wire ${sayWire(context, misled.wire)} leads line from ${other} at ${say(context, misled.at)}: ${who} ${be(points.length)} dead, ` +
            `and every breaker and switch before ${points.length === 1 ? 'it' : 'them'} opens ${other}.`,
          parts: [misled.at, ...points, ...(onMains ?? [])],
          wires: [misled.wire],
          remedies: misledRemedies(context, misled),
        };
        continue;
      }
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
