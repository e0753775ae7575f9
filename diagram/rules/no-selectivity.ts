import { LEAST_RATIO, residualSelective } from '../calculations/selectivity';
import type { Part } from '../document/schema';
import { isOvercurrent, isResidual } from '../terminals/roles-of-parts';
import { recalled } from './clauses';
import type { Context } from './context';
import { chainsOf } from './readings/figures';
import { apart, delayed } from './readings/selectivity-remedies';
import type { Rule } from './types';
import { capital, inOrder, say, sayParts } from './readings/words';

/** Pairs of devices next to one another in a line path that meet a test, the lower ones by the upper. */
function pairs(
  context: Context,
  isOne: (part: Part) => boolean,
  together: (upper: Part, lower: Part) => boolean,
): Map<string, Set<string>> {
  const { graph } = context;
  const found = new Map<string, Set<string>>();
  for (const chain of chainsOf(context)) {
    let upper: Part | undefined;
    for (const id of chain) {
      const lower = graph.parts.get(id)!;
      if (!isOne(lower)) continue;
      if (upper && together(upper, lower)) found.set(upper.id, (found.get(upper.id) ?? new Set()).add(lower.id));
      upper = lower;
    }
  }
  return found;
}

/** Ratings less than 1.6 apart: common practice for devices of one kind; makers' tables say more. */
const tooClose = (upper: Part, lower: Part): boolean => {
  const above = isOvercurrent(upper) ? upper.rating : undefined;
  const below = isOvercurrent(lower) ? lower.rating : undefined;
  return above !== undefined && below !== undefined && above / below < LEAST_RATIO * (1 - 1e-9);
};

const tripTogether = (upper: Part, lower: Part): boolean => {
  if (!isResidual(upper) || !isResidual(lower) || upper.sensitivity === undefined || lower.sensitivity === undefined)
    return false;
  const device = ({ sensitivity, delay }: typeof upper) => ({ sensitivityA: sensitivity!, delay });
  return !residualSelective(device(upper), device(lower));
};

/** Two devices in series of which a fault at the far end opens both. */
export const noSelectivity: Rule = {
  meta: {
    id: 'no-selectivity',
    severity: 'advice',
    group: 'overload',
    title: 'A fault behind one device opens the one before it too',
    clauses: [recalled('IEC 60364-5-53', '536.4'), recalled('BS 7671', '536.4.1.4'), recalled('IEC 60364-1', '314.1')],
    lesson:
      'When the breaker of one lamp takes the main one with it, the whole home goes dark for a fault in one ' +
      'room, and whoever comes to look for it has no light to look by.',
    remedy:
      'Keep ratings in series at least 1.6 apart; before a 30 mA rcd use one of type S with three times its sensitivity.',
  },
  *check(context) {
    for (const [upper, lower] of pairs(context, isOvercurrent, tooClose)) {
      const ids = inOrder(context, lower).map(({ id }) => id);
      yield {
        heading: `${capital(say(context, upper))} opens together with ${sayParts(context, ids, 3)}`,
        message: `The ratings of ${say(context, upper)} and ${sayParts(context, ids)} are less than ${LEAST_RATIO} times apart: an overload behind may open both.`,
        parts: [upper, ...ids],
        get remedies() {
          return apart(context, upper, ids);
        },
      };
    }
    for (const [upper, lower] of pairs(context, isResidual, tripTogether)) {
      const ids = inOrder(context, lower).map(({ id }) => id);
      yield {
        heading: `${capital(say(context, upper))} opens together with ${sayParts(context, ids, 3)}`,
        message: `${capital(say(context, upper))} has no delay, or not three times the sensitivity of ${sayParts(context, ids)}: a fault to earth opens both.`,
        parts: [upper, ...ids],
        get remedies() {
          return delayed(context, upper, ids);
        },
      };
    }
  },
};
