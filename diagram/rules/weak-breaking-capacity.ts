import { prospectiveA } from '../calculations/prospective-current';
import type { Part, PartOf } from '../document/schema';
import { exceeds } from './readings/amounts';
import { recalled } from './clauses';
import type { Context } from './context';
import { figuresOf } from './readings/figures';
import { lackOf, lackOfSupply } from './readings/lacking';
import { once } from './readings/once';
import type { Rule } from './types';
import { be, capital, sayParts } from './readings/words';

type Breaker = PartOf<'mcb' | 'rcbo'>;

/**
 * A gG fuse of at most 100 A limits what flows through a breaker of 6 kA up to a prospective 16 kA: the conditional rating
 * that household boards are tested for (BS EN 61439-3 annex ZB, from memory). No table is at hand for weaker breakers.
 */
const BACKED = { fuseUpToA: 100, icnFromA: 6000, uptoA: 16000 };

const isBacked = (before: readonly Part[], icn: number, currentA: number): boolean =>
  icn >= BACKED.icnFromA &&
  currentA <= BACKED.uptoA &&
  before.some(
    (part) =>
      part.kind === 'fuse' && part.standard !== 'dc' && part.rating !== undefined && part.rating <= BACKED.fuseUpToA,
  );

const isBreaker = (part: Part): part is Breaker => part.kind === 'mcb' || part.kind === 'rcbo';

/** Breakers on the mains with the devices before them and the greatest current that a fault just after them may reach, A. */
export const breakers = once((context: Context): { device: Breaker; before: Part[]; currentA: number }[] => {
  const found: { device: Breaker; before: Part[]; currentA: number }[] = [];
  const { graph, document, sections } = context;
  const { paths, practice, firstBehind } = figuresOf(context);
  const { voltage, zln, ze, system } = document.supply;
  if (zln === undefined) return found;
  // The loop to earth is the smaller one on some supplies, and a breaker must break that current too.
  const external = system === 'TT' || ze === undefined || ze === 0 ? zln : Math.min(zln, ze);
  for (const { device, upstream } of sections) {
    const ohm = paths.coldOhm(upstream);
    if (!isBreaker(device) || ohm === undefined) continue;
    const path = firstBehind(device.id)?.lineDevices ?? [];
    const before = path.slice(0, path.indexOf(device.id)).map((id) => graph.parts.get(id)!);
    found.push({
      device,
      before,
      currentA: prospectiveA({ voltage, loopOhm: external + 2 * ohm, factor: practice.cMax.value }),
    });
  }
  return found;
});

/** The prospective current, cold and at the voltage factor Cmax, above what a breaker is made to break. */
export const weakBreakingCapacity: Rule = {
  meta: {
    id: 'weak-breaking-capacity',
    severity: 'danger',
    group: 'overload',
    title: 'A breaker cannot break the current of a short circuit here',
    clauses: [recalled('IEC 60364-4-43', '434.5.1'), recalled('BS 7671', '434.5.1')],
    lesson:
      'Close to a strong supply a short circuit draws thousands of amperes. A breaker made for less tries to ' +
      'open, the arc does not go out, and the breaker itself bursts into the board.',
    remedy:
      'Fit breakers of a higher breaking capacity, or a fuse before them that limits the current and is listed for it.',
  },
  *check(context) {
    const { practice } = figuresOf(context);
    const weak = breakers(context).filter(
      ({ device, before, currentA }) =>
        device.icn !== undefined && exceeds(currentA, device.icn) && !isBacked(before, device.icn, currentA),
    );
    if (weak.length === 0) return;
    const ids = weak.map(({ device }) => device.id);
    const most = Math.max(...weak.map(({ currentA }) => currentA));
    const least = Math.min(...weak.map(({ device }) => device.icn!));
    const icn = practice.breakingCapacitiesA.value.find((value) => value >= most);
    const label = `Fit ${ids.length === 1 ? 'a breaker' : 'breakers'} of ${icn} A breaking capacity`;
    yield {
      heading: `${capital(sayParts(context, ids, 3))} ${be(ids.length)} too weak for a short circuit here`,
      message:
        `A short circuit just behind ${ids.length === 1 ? 'it' : 'them'} may draw ${Math.round(most)} A; ${least} A is what can be broken. ` +
        'No fuse before limits it.',
      parts: ids,
      conditions: context.evaluated
        .filter(({ condition }) => condition.base === 'mains')
        .map(({ condition }) => condition.name),
      remedies:
        icn === undefined
          ? []
          : [{ label, patch: { set: { parts: weak.map(({ device }): Part => ({ ...device, icn })) } } }],
    };
  },
  *lacks(context) {
    const { sections, document } = context;
    const devices = sections.map(({ device }) => device).filter(isBreaker);
    if (devices.length > 0 && document.supply.zln === undefined) yield* lackOfSupply(context, 'the line-neutral loop');
    for (const device of devices) if (device.icn === undefined) yield lackOf(context, device, 'the breaking capacity');
  },
};
