import type { WayFigures } from '../circuit/way-figures';
import { capacityOf } from '../circuit/way-cables';
import type { Practice } from '../practices/types';
import { amps, exceeds, sayCable } from './readings/amounts';
import { recalled } from './clauses';
import type { Context } from './context';
import { figuresOf } from './readings/figures';
import { lackOfCables, lackOfRating } from './readings/lacking';
import { changeCables, changePart } from './readings/remedies';
import type { Remedy, Rule } from './types';
import { mostA, thinCables, type Thin } from './readings/thin-cables';
import { capital, say } from './readings/words';

function remediesOf(
  { graph }: Context,
  practice: Practice,
  { device, inA, ibA }: WayFigures,
  thin: readonly Thin[],
): Remedy[] {
  const thicker = thin.map(({ cable, needA }) => {
    const csa = practice.csaMm2.find(
      (size) => size > cable.csa && (capacityOf(graph, practice, { ...cable, csa: size })?.izA ?? 0) >= needA!,
    );
    const cpc = csa === undefined ? undefined : Math.max(practice.cpcMm2.value[csa] ?? csa, cable.cpc ?? 0);
    return csa === undefined ? null : { ...cable, csa, cpc };
  });
  const remedies: Remedy[] = [];
  if (thicker.every((cable) => cable !== null))
    remedies.push(changeCables(`Pull ${[...new Set(thicker.map(({ csa }) => csa))].join(' and ')} mm2`, thicker));
  const least = Math.min(...thin.map(({ izA }) => izA));
  const smaller = practice.breakerRatingsA.value.findLast(
    (rating) => rating <= least && rating < inA! && rating >= (ibA ?? Infinity),
  );
  if (smaller !== undefined && (device.kind === 'mcb' || device.kind === 'rcbo'))
    remedies.push(changePart(`Fit a device of ${smaller} A`, device, { rating: smaller }));
  return remedies;
}

/**
 * In above Iz: IEC 60364-4-43 433.1, second half. A cable that leans on the service fuse alone is judged by that fuse.
 */
export const undersizedCable: Rule = {
  meta: {
    id: 'undersized-cable',
    severity: 'danger',
    group: 'overload',
    title: 'A cable is thinner than its device protects',
    clauses: [recalled('IEC 60364-4-43', '433.1'), recalled('IEC 60364-5-52', '523.1'), recalled('BS 7671', '433.1.1')],
    lesson:
      'The breaker is there for the cable. If it lets more current flow than the cable can carry as it is laid, ' +
      'bunched or warm, the insulation bakes for years behind the plaster, and the breaker never opens before it ' +
      'burns.',
    remedy: 'Pull the next larger size, or fit a device that the cable can carry.',
  },
  *check(context) {
    const { ways, practice } = figuresOf(context);
    for (const figures of ways.values()) {
      const thin = thinCables(context, practice, figures);
      if (thin.length === 0) continue;
      const { device } = figures;
      const worst = thin.reduce((a, b) => (a.izA <= b.izA ? a : b));
      const more =
        thin.length > 1 ? ` ${thin.length - 1} more of its runs ${thin.length > 2 ? 'are' : 'is'} too thin.` : '';
      yield {
        heading: `${capital(say(context, device.id))} does not protect its cable`,
        message:
          `${capital(sayCable(worst.cable))} of ${say(context, device.id)} carries ${worst.capacity ? '' : 'less than '}${amps(worst.izA)} as it is laid; it must carry ` +
          `${amps(worst.needA!)} before the device opens.${more}`,
        parts: [device.id],
        wires: thin.flatMap(({ wires }) => wires),
        remedies: remediesOf(context, practice, figures, thin),
      };
    }
  },
  *lacks(context) {
    const { ways, practice } = figuresOf(context);
    for (const { device, inA, cables, section } of ways.values()) {
      if (inA === null && cables.length > 0) yield lackOfRating(context, device);
      yield* lackOfCables(context, section.edges);
      for (const each of cables) {
        const { cable, capacity, wires, needA } = each;
        const most = mostA(context, practice, each);
        if (capacity === null && (most === null || needA === null || !exceeds(needA, most)))
          yield {
            parts: [],
            wires,
            what: `a size and laying that the table of the practice holds for ${sayCable(cable)}`,
          };
      }
    }
  },
};
