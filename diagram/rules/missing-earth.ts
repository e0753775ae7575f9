import { isLoad } from '../terminals/roles-of-parts';
import { recalled } from './clauses';
import { earthGaps, hasWire } from './readings/earth-gaps';
import { openRegions } from './readings/open-regions';
import { earthRemedies } from './readings/lead-earth';
import type { Rule } from './types';
import { be, capital, say, sayParts } from './readings/words';

/** A socket, class 1 load or inverter whose earth does not reach the main earthing terminal. */
export const missingEarth: Rule = {
  meta: {
    id: 'missing-earth',
    severity: 'danger',
    group: 'polarity',
    title: 'Metal that must be earthed is not',
    clauses: [recalled('IEC 60364-4-41', '411.3.1.1'), recalled('BS 7671', '411.3.1.1')],
    lesson:
      'The earth core of a class 1 appliance does nothing until the day its insulation fails. Then, without it, the case stands ' +
      'at line voltage, no fuse blows, and the next person to touch it closes the circuit.',
    remedy: 'Lead the earth core to the earth bar, through every joint on the way.',
  },
  *check(context) {
    for (const { parts, joints, wires, on } of earthGaps(context)) {
      const names = sayParts(context, parts);
      const verb = parts.length === 1 ? 'has' : 'have';
      const what = {
        nothing:
          'The earth contact ends before the earth bar: a fault to the case makes it live, and nothing clears it.',
        line: 'The earth contact is joined to the line: the case stands at full voltage as drawn.',
        neutral:
          'The earth contact is joined to the neutral, not to earth: a break of that neutral makes the case live.',
      }[on];
      const crossed = openRegions(context).flatMap((region) =>
        region.swapped && region.points.some((id) => parts.includes(id)) ? region.wires : [],
      );
      yield {
        heading: on === 'line' ? `The case of ${names} ${be(parts.length)} live` : `${capital(names)} ${verb} no earth`,
        message: `${capital(names)} ${verb} no way to the main earthing terminal. ${what}`,
        parts: [...parts, ...joints],
        wires: [...wires, ...crossed],
        remedies: earthRemedies(context, { parts, joints, wires, on }),
      };
    }
  },
  *lacks(context) {
    for (const part of context.document.parts) {
      if (!isLoad(part) || part.class !== undefined || hasWire(context, context.graph.node(part.id, 'E')!)) continue;
      const wired = hasWire(context, context.graph.node(part.id, 'L')!);
      if (wired) yield { parts: [part.id], what: `the protection class of ${say(context, part.id)}` };
    }
  },
};
