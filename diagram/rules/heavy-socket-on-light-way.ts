import { practices } from '../practices';
import type { PartOf } from '../document/schema';
import { amps, exceeds } from './readings/amounts';
import { COMMON_PRACTICE, recalled } from './clauses';
import type { Context } from './context';
import { figuresOf } from './readings/figures';
import { lackOfRating } from './readings/lacking';
import type { WayFigures } from '../circuit/way-figures';
import { changePart } from './readings/remedies';
import type { Remedy, Rule } from './types';
import { be, capital, say, sayParts } from './readings/words';

/** A, what is printed on an outlet: its rating, else that of its pattern in the practice. */
const ratingOf = (context: Context, socket: PartOf<'socket'>): number | undefined =>
  socket.rating ?? practices[context.practice].sockets.find(({ id }) => id === socket.pattern)?.ratingA;

const socketsOn = ({ drawn }: WayFigures): PartOf<'socket'>[] =>
  drawn.flatMap(({ part }) => (part.kind === 'socket' ? [part] : []));

/** The way's device as large as the outlets say, where the cables carry it. */
function largerDevice({ device, cables }: WayFigures, rating: number, onSale: readonly number[]): Remedy[] {
  const next = onSale.find((each) => each >= rating);
  const carried = next !== undefined && cables.every(({ capacity }) => capacity !== null && capacity.izA >= next);
  if (!carried || (device.kind !== 'mcb' && device.kind !== 'rcbo')) return [];
  return [changePart(`Fit a device of ${next} A`, device, { rating: next })];
}

/** An outlet that promises more than its way gives. */
export const heavySocketOnLightWay: Rule = {
  meta: {
    id: 'heavy-socket-on-light-way',
    severity: 'defect',
    group: 'overload',
    title: 'An outlet promises more than its way gives',
    clauses: [recalled('IS 732', 'power sub-circuits'), COMMON_PRACTICE],
    lesson:
      'Whoever sees a 16 A outlet plugs a 16 A heater into it. On a way of lamps the breaker opens, the lamps go ' +
      'with it, and the next thing to be exchanged is the breaker.',
    remedy: 'Give heavy outlets their own way with a device of their rating, or fit outlets that fit the way.',
  },
  *check(context) {
    const { ways, practice } = figuresOf(context);
    for (const figures of ways.values()) {
      const { device, inA } = figures;
      if (inA === null) continue;
      const heavy = socketsOn(figures).filter((socket) => exceeds(ratingOf(context, socket) ?? 0, inA));
      if (heavy.length === 0) continue;
      const ids = heavy.map(({ id }) => id);
      const most = Math.max(...heavy.map((socket) => ratingOf(context, socket)!));
      yield {
        heading: `${capital(sayParts(context, ids, 3))} ${be(ids.length)} too heavy for ${say(context, device.id)}`,
        message: `${capital(say(context, device.id))} is rated ${amps(inA)}; ${sayParts(context, ids)} may be asked for ${amps(most)}.`,
        parts: [...ids, device.id],
        remedies: largerDevice(figures, most, practice.breakerRatingsA.value),
      };
    }
  },
  *lacks(context) {
    for (const figures of figuresOf(context).ways.values())
      for (const socket of socketsOn(figures))
        if (ratingOf(context, socket) === undefined) yield lackOfRating(context, socket);
  },
};
