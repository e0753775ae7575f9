import type { WayFigures } from '../circuit/way-figures';
import { amps, exceeds } from './readings/amounts';
import { recalled } from './clauses';
import { fedIn, figuresOf, onMains } from './readings/figures';
import { lackOfRating, lackOfWatts } from './readings/lacking';
import { changePart } from './readings/remedies';
import type { Remedy, Rule } from './types';
import { capital, say } from './readings/words';

/** The smallest device on sale for the demand, where the way's cables carry it. */
function biggerDevice({ device, cables, ibA }: WayFigures, ratings: readonly number[]): Remedy[] {
  if (device.kind !== 'mcb' && device.kind !== 'rcbo' && device.kind !== 'fuse') return [];
  const next = ratings.find((rating) => rating >= ibA!);
  const carried = next !== undefined && cables.every(({ capacity }) => capacity !== null && next <= capacity.izA);
  return carried ? [changePart(`Fit a device of ${next} A`, device, { rating: next })] : [];
}

/** Ib above In: IEC 60364-4-43 433.1, first half. */
export const overloadedWay: Rule = {
  meta: {
    id: 'overloaded-way',
    severity: 'defect',
    group: 'overload',
    title: 'A way is asked for more than its device is rated for',
    clauses: [recalled('IEC 60364-4-43', '433.1'), recalled('BS 7671', '433.1.1')],
    lesson:
      'The loads of a way add up. When they ask for more than the breaker is rated for, it opens some minutes ' +
      'after everything is on, again and again, until somebody fits a bigger one and the cable takes what the ' +
      'breaker no longer stops.',
    remedy: 'Move loads to another way, or fit a larger device where the cable carries it.',
  },
  *check(context) {
    const { ways, practice } = figuresOf(context);
    for (const { device: id } of context.ways) {
      const figures = ways.get(id)!;
      const { ibA, inA, device } = figures;
      if (ibA === null || inA === null || !exceeds(ibA, inA)) continue;
      yield {
        heading: `${capital(say(context, id))} carries ${amps(ibA)} and is rated ${amps(inA)}`,
        message:
          `With everything on, ${say(context, id)} is asked for ${amps(ibA)}; it is rated ${amps(inA)}. ` +
          `It will open in use. Move loads to another way.`,
        parts: [device.id],
        conditions: figures.drawn.some(({ isPoint }) => !isPoint) ? onMains(context) : fedIn(context, figures.drawn),
        remedies: biggerDevice(figures, practice.breakerRatingsA.value),
      };
    }
  },
  *lacks(context) {
    const { ways } = figuresOf(context);
    for (const { device: id } of context.ways) {
      const figures = ways.get(id)!;
      if (figures.inA === null) yield lackOfRating(context, figures.device);
      yield* lackOfWatts(context, figures);
    }
  },
};
