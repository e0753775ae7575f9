import { letThroughA2s } from '../calculations/adiabatic';
import { maximumLoopOhm } from '../calculations/loop-impedance';
import { maximumElectrodeOhm, rcdBand } from '../calculations/rcd-time';
import { tripBand, type OvercurrentDevice } from '../calculations/trip-curve';
import type { Part, Supply } from '../document/schema';
import type { Practice } from '../practices/types';
import type { Graph } from '../terminals/graph';
import { isOvercurrent, isResidual } from '../terminals/roles-of-parts';
import type { Drawn } from './drawn';

/** An mcb, rcbo or fuse as its curve is reckoned; null where its rating, or the curve of an mcb, is not given. */
export function deviceOf(part: Part): OvercurrentDevice | null {
  if (!isOvercurrent(part) || part.rating === undefined) return null;
  if (part.kind === 'fuse') return { kind: 'gG', ratingA: part.rating };
  return part.curve === undefined ? null : { kind: 'mcb', ratingA: part.rating, curve: part.curve };
}

/** The external part of an earth fault loop, ohm: Ze, or on TT the electrode (the source's own counts as 0). */
export const externalOhm = ({ system, ze, ra }: Supply): number | undefined => (system === 'TT' ? ra : ze);

/** A fault from line to earth at the far end of a way, at the least current: hot conductors, voltage factor Cmin. */
export interface EarthFault {
  zs: number;
  faultA: number;
  /** s that the practice allows */
  withinS: number;
  /** ohm, the largest loop with which the way's device, or on TT the rcd before it, opens in time; null where not known */
  zsMax: number | null;
  /** s until overcurrent device or rcd has opened; null where neither does */
  clearedS: number | null;
  holds: boolean;
  /** A2 s let through until then; Infinity where nothing opens */
  energyA2s: number;
}

/** ohm, a loop below this is reckoned at it, so that a drawing without any resistance has a current at all */
const STIFFEST_OHM = 1e-3;

/** A hair: a loop equal to its limit is within it, whatever the last binary digit says. */
const HAIR = 1 + 1e-9;

/** s in which a fault must be cleared: the short time for final circuits up to the practice's ratings, else that of distribution. */
export function timeLimit(practice: Practice, supply: Supply, device: Part, drawn: readonly Drawn[]): number {
  const { disconnection } = practice;
  const tt = supply.system === 'TT';
  const rating = 'rating' in device ? (device.rating ?? 0) : 0;
  const points = drawn.filter(({ isPoint }) => isPoint);
  const sockets = points.some(({ part }) => part.kind === 'socket');
  const upTo = sockets ? disconnection.withSocketsUpToA.value : disconnection.fixedUpToA.value;
  const final = points.length > 0 && rating <= upTo;
  if (final) return (tt ? disconnection.finalTT : disconnection.finalTN).value;
  return (tt ? disconnection.distributionTT : disconnection.distributionTN).value;
}

/** Judges a loop of `zs` ohm behind the devices of `path`. */
export function earthFault(
  graph: Graph,
  practice: Practice,
  path: Pick<Drawn, 'way' | 'lineDevices'>,
  zs: number,
  withinS: number,
): EarthFault {
  const { voltage, system } = graph.document.supply;
  const loop = Math.max(zs, STIFFEST_OHM);
  const faultA = (practice.cMin.value * voltage) / loop;
  const way = path.way === null ? undefined : graph.parts.get(path.way);
  const device = way ? deviceOf(way) : null;
  const rcds = path.lineDevices
    .map((id) => graph.parts.get(id)!)
    .filter(isResidual)
    .flatMap(({ sensitivity, delay }) => (sensitivity === undefined ? [] : [{ sensitivityA: sensitivity, delay }]));
  const rcdS = Math.min(...rcds.map((rcd) => rcdBand(rcd, faultA).latestS), Infinity);
  const overcurrentS = device ? tripBand(device, faultA * HAIR).latestS : Infinity;
  const byDevice = device ? maximumLoopOhm({ device, voltage, withinS, cMin: practice.cMin.value }) : null;
  const byRcd =
    rcds.length > 0
      ? maximumElectrodeOhm(Math.min(...rcds.map(({ sensitivityA }) => sensitivityA)), practice.touchVolts.value)
      : null;
  const clearedS = Math.min(overcurrentS, rcdS);
  const overcurrentHolds = byDevice !== null && zs <= byDevice * HAIR;
  // Heat is reckoned at the nominal voltage, as published examples do; the rcd ends what the breaker leaves on.
  const heatA = voltage / loop;
  const energyA2s = Math.min(
    device ? letThroughA2s(device, heatA) : Infinity,
    Number.isFinite(rcdS) ? heatA ** 2 * rcdS : Infinity,
  );
  return {
    zs,
    faultA,
    withinS,
    zsMax: system === 'TT' && byRcd !== null ? byRcd : byDevice,
    clearedS: Number.isFinite(clearedS) ? clearedS : null,
    holds: overcurrentHolds || rcdS <= withinS,
    energyA2s,
  };
}
