import type { WayFigures } from '../circuit/way-figures';
import type { PointsLimit } from '../practices/types';
import { exceeds, watts } from './readings/amounts';
import { seen } from './clauses';
import { figuresOf } from './readings/figures';
import type { Rule } from './types';
import { capital, say } from './readings/words';

/**
 * What a limit counts on a way. A way with lamps or fans is counted by all its points but heavy outlets, small outlets
 * among them as IS 732 does (from memory); a way with heavy outlets by those. A way with neither has no limit.
 */
function counted({ drawn }: WayFigures, limit: PointsLimit): { points: number; watts: number } | null {
  const heavyFrom = limit.fromA ?? 16;
  const isHeavy = (each: (typeof drawn)[number]) => each.part.kind === 'socket' && (each.part.rating ?? 0) >= heavyFrom;
  const isLight = (each: (typeof drawn)[number]) => each.part.kind === 'lamp' || each.part.kind === 'fan';
  const sum = (list: readonly (typeof drawn)[number][]) => list.reduce((total, each) => total + each.watts, 0);
  if (limit.of === 'lighting') {
    const points = drawn.filter((each) => each.isPoint && !isHeavy(each));
    return drawn.some(isLight) ? { points: points.length, watts: sum(points) } : null;
  }
  const points = drawn.filter(isHeavy);
  return points.length > 0 ? { points: points.length, watts: sum(drawn) } : null;
}

const NAME: Record<PointsLimit['of'], string> = { lighting: 'lamps, fans and small outlets', power: 'heavy outlets' };

/** A way with more points or watts than the practice allows on one. */
export const tooManyPoints: Rule = {
  meta: {
    id: 'too-many-points',
    severity: 'advice',
    group: 'overload',
    title: 'More hangs on a way than the practice allows',
    clauses: [seen('IS 732', 'sub-circuits: 10 points or 800 W; 2 power outlets or 3000 W')],
    lesson:
      'A limit on the points of a way is a limit on what goes dark together and on what somebody may add later ' +
      'without asking. It is cheaper to keep now than to divide the way afterwards.',
    remedy: 'Divide the way in two.',
  },
  *check(context) {
    const { ways, practice } = figuresOf(context);
    for (const { device: id } of context.ways) {
      const figures = ways.get(id)!;
      for (const { value: limit } of practice.pointsLimits) {
        const has = counted(figures, limit);
        if (!has || (has.points <= limit.points && !exceeds(has.watts, limit.watts))) continue;
        yield {
          heading: `${capital(say(context, id))} has more on it than one way should`,
          message: `${capital(NAME[limit.of])} on it: ${has.points}, of ${watts(has.watts)}; ${limit.points} or ${watts(limit.watts)} are the limit of one way.`,
          parts: [id],
        };
      }
    }
  },
};
