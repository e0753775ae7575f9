import { LEAST_RATIO } from '../../calculations/selectivity';
import type { Part } from '../../document/schema';
import { isOvercurrent, isResidual } from '../../terminals/roles-of-parts';
import type { Context } from '../context';
import type { Remedy } from '../types';
import { figuresOf } from './figures';
import { changePart } from './remedies';
import { say, sayParts } from './words';

const ratingOf = (part: Part): number | undefined => (isOvercurrent(part) ? part.rating : undefined);

/**
 * A larger device above, or smaller ones below that still carry their ways: the one nearest that is far enough apart.
 */
export function apart(context: Context, upper: string, lower: readonly string[]): Remedy[] {
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
export function delayed(context: Context, upper: string, lower: readonly string[]): Remedy[] {
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
