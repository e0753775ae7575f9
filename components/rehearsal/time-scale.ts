import type { Walk } from '@/diagram/rehearsal/walk';

/** The logarithmic scale of time: from a millisecond, `before` at its left end. */

const FIRST_S = 0.001;

/** s at which the scale ends: a decade beyond the last event and the limit, at least a second. */
export function endOf(walk: Walk): number {
  const last = Math.max(walk.limit.seconds, ...walk.stations.map(({ t }) => t ?? 0));
  return Math.max(1, 10 ** Math.ceil(Math.log10(last) + 0.15));
}

/** The powers of ten from a millisecond to the end. */
export function decades(end: number): number[] {
  const count = Math.round(Math.log10(end / FIRST_S));
  const all = Array.from({ length: count + 1 }, (_, i) => Number((FIRST_S * 10 ** i).toPrecision(1)));
  // More than five names would run into each other.
  return all.length <= 5 ? all : all.filter((_, i) => (all.length - 1 - i) % 2 === 0);
}

/** Share of the scale's width at which a moment stands, 0 to 1. */
export const shareOf = (seconds: number, end: number): number =>
  Math.min(1, Math.max(0, Math.log10(Math.max(seconds, FIRST_S) / FIRST_S) / Math.log10(end / FIRST_S)));

/** The volts at the case as steps in time; what stands before the fault is not on a logarithmic axis. */
export function touchCurve(walk: Walk, end: number): { t: number; volts: number }[] {
  const points = walk.stations
    .filter(({ kind }) => kind === 'fault' || kind === 'opens' || kind === 'takes-over')
    .map(({ t, touchVolts }) => ({ t: Math.max(FIRST_S, t ?? 0), volts: touchVolts }));
  const last = points.at(-1);
  return last ? [...points, { t: end, volts: last.volts }] : [];
}

/**
 * Where the stations stand along a line, in px: each at its moment, none nearer to its neighbour than a finger is wide.
 * `before` stands at 0; what is at the same moment, or later without one, follows.
 */
export function stationPlaces(walk: Walk, end: number, left: number, width: number, apart: number): number[] {
  const places: number[] = [];
  walk.stations.forEach((station, i) => {
    const wanted =
      station.kind === 'before'
        ? 0
        : station.kind === 'still' || station.kind === 'holds'
          ? (places[i - 1] ?? 0) + apart
          : left + shareOf(station.t ?? 0, end) * width;
    places.push(i === 0 ? wanted : Math.max(wanted, places[i - 1]! + apart));
  });
  // What was pushed beyond the end comes back, its neighbours with it.
  for (let i = places.length - 1, most = left + width; i > 0; i--, most -= apart)
    places[i] = Math.min(places[i]!, most);
  return places;
}
