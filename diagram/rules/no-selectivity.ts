import { LEAST_RATIO, residualSelective } from '../calculations/selectivity';
import type { Part } from '../document/schema';
import { isOvercurrent, isResidual } from '../terminals/roles-of-parts';
import { recalled } from './clauses';
import type { Context } from './context';
import { figuresOf } from './readings/figures';
import { changePart } from './readings/remedies';
import type { Remedy, Rule } from './types';
import { capital, inOrder, say, sayParts } from './readings/words';

/** Pairs of devices next to one another in a line path that meet a test, the lower ones by the upper. */
function pairs(
  context: Context,
  isOne: (part: Part) => boolean,
  together: (upper: Part, lower: Part) => boolean,
): Map<string, Set<string>> {
  const { graph } = context;
  const found = new Map<string, Set<string>>();
  for (const { lineDevices } of figuresOf(context).drawn) {
    const chain = lineDevices.map((id) => graph.parts.get(id)!).filter(isOne);
    chain.slice(1).forEach((lower, i) => {
      const upper = chain[i]!;
      if (together(upper, lower)) found.set(upper.id, (found.get(upper.id) ?? new Set()).add(lower.id));
    });
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

const ratingOf = (part: Part): number | undefined => (isOvercurrent(part) ? part.rating : undefined);

/** A larger device above, or smaller ones below that still carry their ways: the one nearest that is far enough apart. */
function apart(context: Context, upper: string, lower: readonly string[]): Remedy[] {
  const { practice, ways } = figuresOf(context);
  const sizes = practice.breakerRatingsA.value;
  const above = context.graph.parts.get(upper)!;
  const below = lower.map((id) => context.graph.parts.get(id)!);
  const most = Math.max(...below.map((part) => ratingOf(part) ?? 0));
  const larger = sizes.find((size) => size >= LEAST_RATIO * most);
  const remedies: Remedy[] = [];
  if (larger !== undefined && (above.kind === 'mcb' || above.kind === 'rcbo'))
    remedies.push(changePart(`Fit ${say(context, upper)} of ${larger} A`, above, { rating: larger }));
  const smaller = below.flatMap((part): Part[] => {
    const carried = ways.get(part.id)?.ibA ?? Infinity;
    const rating = sizes.findLast((size) => LEAST_RATIO * size <= ratingOf(above)! && size >= carried);
    return rating !== undefined && (part.kind === 'mcb' || part.kind === 'rcbo') ? [{ ...part, rating }] : [];
  });
  if (smaller.length === below.length) {
    const values = [...new Set(smaller.map((part) => ratingOf(part)!))].sort((a, b) => a - b);
    remedies.push({
      label: `Fit ${sayParts(context, lower)} of ${values.join(' and ')} A`,
      patch: { set: { parts: smaller } },
    });
  }
  return remedies;
}

/** The rcd above as one of type S, three times as coarse as the finest below. */
function delayed(context: Context, upper: string, lower: readonly string[]): Remedy[] {
  const above = context.graph.parts.get(upper)!;
  if (!isResidual(above)) return [];
  const finest = Math.max(...lower.map((id) => sensitivityOf(context.graph.parts.get(id)!)));
  const sensitivity = figuresOf(context).practice.rcdSensitivitiesA.value.find(
    (size) => size >= 3 * finest * (1 - 1e-9) && size >= (above.sensitivity ?? 0),
  );
  if (sensitivity === undefined) return [];
  const change = { delay: 'S', sensitivity } as const;
  const label = `Make ${say(context, upper)} one of type S, ${Math.round(sensitivity * 1000)} mA`;
  return [above.kind === 'rcd' ? changePart(label, above, change) : changePart(label, above, change)];
}

const sensitivityOf = (part: Part): number => (isResidual(part) ? (part.sensitivity ?? 0) : 0);

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
        remedies: apart(context, upper, ids),
      };
    }
    for (const [upper, lower] of pairs(context, isResidual, tripTogether)) {
      const ids = inOrder(context, lower).map(({ id }) => id);
      yield {
        heading: `${capital(say(context, upper))} opens together with ${sayParts(context, ids, 3)}`,
        message: `${capital(say(context, upper))} has no delay, or not three times the sensitivity of ${sayParts(context, ids)}: a fault to earth opens both.`,
        parts: [upper, ...ids],
        remedies: delayed(context, upper, ids),
      };
    }
  },
};
