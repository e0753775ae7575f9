import { amps, exceeds } from './readings/amounts';
import type { PartOf } from '../document/schema';
import { recalled } from './clauses';
import type { Context } from './context';
import { chainsOf, figuresOf } from './readings/figures';
import { isOvercurrent } from '../terminals/roles-of-parts';
import { lackOfRating } from './readings/lacking';
import { changePart } from './readings/remedies';
import { overloadedMains } from './overloaded-main';
import { isServiceBare } from './readings/bare-lines';
import type { Rule } from './types';
import { capital, say } from './readings/words';

type Overcurrent = PartOf<'fuse' | 'mcb' | 'rcbo'>;
type Rcd = PartOf<'rcd'>;

/** Overcurrent devices before each rcd on any path, and the first one after it on each. */
function around(context: Context): Map<Rcd, { before: Set<Overcurrent>; after: Set<Overcurrent> }> {
  const found = new Map<Rcd, { before: Set<Overcurrent>; after: Set<Overcurrent> }>();
  for (const lineDevices of chainsOf(context)) {
    const parts = lineDevices.map((id) => context.graph.parts.get(id)!);
    parts.forEach((rcd, at) => {
      if (rcd.kind !== 'rcd') return;
      const entry = found.get(rcd) ?? { before: new Set(), after: new Set() };
      for (const part of parts.slice(0, at)) if (isOvercurrent(part)) entry.before.add(part);
      const first = parts.slice(at + 1).find(isOvercurrent);
      if (first) entry.after.add(first);
      found.set(rcd, entry);
    });
  }
  return found;
}

/** An rcd whose rated current neither a device before it nor the sum of the ways after it limits. */
export const rcdUnderrated: Rule = {
  meta: {
    id: 'rcd-underrated',
    severity: 'defect',
    group: 'overload',
    title: 'Nothing keeps the current of an rcd within its rating',
    clauses: [recalled('IEC 60364-5-53', '536.4.3.2'), recalled('BS 7671', '536.4.202')],
    lesson:
      'An rcd opens on leakage, never on load. If more current can flow than it is rated for, before the fuse in ' +
      'front of it or the breakers behind it open, its contacts overheat, and the day it should trip it is ' +
      'welded shut.',
    remedy: 'Fit an rcd rated at least as the device before it, or as the sum of the ways behind it.',
  },
  *check(context) {
    const { practice } = figuresOf(context);
    const overloaded = new Set(overloadedMains(context).flatMap(({ devices }) => devices.map(({ id }) => id)));
    for (const [rcd, neighbours] of around(context)) {
      if (rcd.rating === undefined || overloaded.has(rcd.id)) continue;
      const before = [...neighbours.before];
      const after = [...neighbours.after];
      const ratings = [...before, ...after].map(({ rating }) => rating);
      // A device that is not rated leaves the question open: nothing is guessed.
      if (after.length === 0 || ratings.includes(undefined)) continue;
      const least = Math.min(...before.map(({ rating }) => rating!));
      const sum = after.reduce((total, { rating }) => total + rating!, 0);
      if (!exceeds(Math.min(least, sum), rcd.rating)) continue;
      if (before.length === 0 && isServiceBare(context)) continue;
      const next = practice.breakerRatingsA.value.find((rating) => rating >= Math.min(least, sum));
      yield {
        heading: `${capital(say(context, rcd.id))} is rated below what may flow through it`,
        message:
          `${capital(say(context, rcd.id))} is rated ${amps(rcd.rating)}. ` +
          (before.length > 0
            ? `The device before it lets ${amps(least)} flow`
            : 'Nothing before it limits the current') +
          `, and the ways behind it add up to ${amps(sum)}.`,
        parts: [rcd.id],
        remedies: next === undefined ? [] : [changePart(`Fit an rcd of ${next} A`, rcd, { rating: next })],
      };
    }
  },
  *lacks(context) {
    for (const rcd of context.parts('rcd'))
      if (rcd.kind === 'rcd' && rcd.rating === undefined) yield lackOfRating(context, rcd);
  },
};
