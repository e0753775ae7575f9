import { recalled } from './clauses';
import { misledRemedies } from './readings/misled';
import { openRegions } from './readings/open-regions';
import { rejoin } from './readings/rejoin';
import type { Rule, Violation } from './types';
import { be, capital, say, sayParts, sayWire } from './readings/words';

/** A load with line but no way back; one finding for each gap. */
export const openNeutral: Rule = {
  meta: {
    id: 'open-neutral',
    severity: 'defect',
    group: 'polarity',
    title: 'A load has line but no way back',
    clauses: [recalled('IEC 60364-6', '6.4.3.2')],
    lesson:
      'Current needs a way back to its source. Without a neutral the load does not work, and worse: its neutral terminal, which everybody ' +
      'takes for harmless, stands at line voltage through the load.',
    remedy: 'Join the neutral to the neutral bar of its own way.',
  },
  *check(context) {
    for (const { side, points, gap, wires, conditions, on, swapped, between, misled } of openRegions(context)) {
      if (side !== 'N' || swapped || between) continue;
      const who = sayParts(context, points);
      if (misled) {
        yield {
          severity: 'danger',
          heading: `The neutral of ${who} begins at line`,
          message:
            `The wire ${sayWire(context, misled.wire)} leads neutral from line at ${say(context, misled.at)}: nothing works, and every neutral ` +
            'terminal behind it, which everybody takes for harmless, is live with no fuse before it.',
          parts: [misled.at, ...points],
          wires: [misled.wire],
          remedies: misledRemedies(context, misled),
          ...(conditions && { conditions }),
        };
        continue;
      }
      const where = gap.length > 0 ? ` The way back ends at ${sayParts(context, gap)}.` : '';
      const violation: Violation = {
        heading: `${capital(who)} ${be(points.length)} without neutral`,
        message: `Line arrives at ${who}, but no neutral leads back to the source.${where} Beyond the break the neutral stands at line voltage.`,
        parts: [...gap, ...points],
        wires,
        remedies: on ? [] : rejoin(context, 'neutral', { points, gap }),
        ...(conditions && { conditions }),
      };
      if (on === 'earth')
        yield {
          ...violation,
          severity: 'danger',
          heading: `${capital(who)} ${points.length === 1 ? 'returns' : 'return'} through the earth`,
          message: `The neutral of ${who} is joined to the earth, which is no way back: load current runs in the earth, and an rcd trips as soon as it is switched on.`,
        };
      else if (on === 'line')
        yield {
          ...violation,
          message: `Both ends of ${who} are joined to line: no neutral leads back to the source, and nothing works.`,
        };
      else yield violation;
    }
  },
};
