import { rcdBand } from '../calculations/rcd-time';
import { tripBand, type TripBand } from '../calculations/trip-curve';
import { nameOf } from '../document/names';
import type { Part } from '../document/schema';
import type { Graph } from '../terminals/graph';
import { isOvercurrent, isResidual } from '../terminals/roles-of-parts';
import type { Steady } from './steady';
import { deviceOf } from './way-faults';

/** What a device makes of the currents that now flow in it. */
export interface Urge extends TripBand {
  part: Part;
  amps: number;
  astrayAmps: number;
}

const NEVER: TripBand = { earliestS: Infinity, latestS: Infinity };
const sooner = (a: TripBand, b: TripBand): TripBand => ({
  earliestS: Math.min(a.earliestS, b.earliestS),
  latestS: Math.min(a.latestS, b.latestS),
});

/**
 * The urge of every closed device. Overcurrent is watched in the poles that the device protects.
 * @param overcurrent false where the source's greatest current is not known: then only residual devices are held to
 * clear
 */
export function urges(graph: Graph, steady: Steady, opened: ReadonlySet<string>, overcurrent: boolean): Urge[] {
  const found: Urge[] = [];
  for (const part of graph.parts.values()) {
    if (opened.has(part.id) || !graph.contactsOf.has(part.id)) continue;
    if (!isOvercurrent(part) && !isResidual(part)) continue;
    const poles = steady.poleAmps(part.id);
    const watched = part.kind === 'rcbo' && (part.poles ?? 1) === 1 ? poles.slice(0, 1) : poles;
    const amps = Math.max(...watched);
    const astrayAmps = poles.length > 1 && isResidual(part) ? steady.residualAmps(part.id) : 0;
    const device = overcurrent ? deviceOf(part) : null;
    let band = device ? tripBand(device, amps) : NEVER;
    if (isResidual(part) && part.sensitivity !== undefined)
      band = sooner(
        band,
        rcdBand({ sensitivityA: part.sensitivity, ...(part.delay && { delay: part.delay }) }, astrayAmps),
      );
    if (Number.isFinite(band.earliestS)) found.push({ part, amps, astrayAmps, ...band });
  }
  return found;
}

/** What the devices of a home lack to be reckoned with: "the curve of Q4". */
export function deviceLacks(graph: Graph): string[] {
  const lacks: string[] = [];
  for (const part of graph.parts.values()) {
    const say = (what: string) => lacks.push(`the ${what} of ${nameOf(graph.document, part)}`);
    if (isOvercurrent(part) && part.rating === undefined) say('rated current');
    else if (isOvercurrent(part) && part.kind !== 'fuse' && part.curve === undefined) say('curve');
    if (isResidual(part) && part.sensitivity === undefined) say('sensitivity');
  }
  return lacks;
}
