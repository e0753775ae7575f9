import { withstandS } from '../calculations/adiabatic';
import { tripBand } from '../calculations/trip-curve';
import { amps, hoursText, seconds } from './figure';
import type { BackupPlot } from './backup-plot';
import { hoursWithout } from './backup-plot';
import type { ConditionLoad } from './condition-loads';
import type { WayPlot } from './way-plot';

/** What each picture says, in sentences: for whoever cannot see it, and for whoever would rather read. */

/** "opens Q8 C16 within 100 ms" */
function opening(plot: WayPlot, currentA: number): string {
  const latest = plot.device ? tripBand(plot.device, currentA).latestS : Infinity;
  return Number.isFinite(latest)
    ? `opens ${plot.deviceName} within ${seconds(latest)}`
    : `does not open ${plot.deviceName} for sure`;
}

/** The time-current picture of a way. */
export function timeCurrentWords(plot: WayPlot): string[] {
  const said: string[] = [];
  const fault = (id: string) => plot.faults.find((mark) => mark.id === id);
  const [thinnest] = plot.conductors;
  const short = fault('line-neutral');
  if (!plot.device) said.push('The band needs the rating and curve of the device.');
  if (short && plot.device) {
    const stands = thinnest && withstandS({ csaMm2: thinnest.csaMm2, k: thinnest.k, currentA: short.amps });
    said.push(
      `A short circuit at the end, ${amps(short.amps)} A, ${opening(plot, short.amps)}` +
        `${stands === undefined ? '' : `; ${thinnest!.name} stands it for ${seconds(stands)}`}.`,
    );
  }
  const earth = fault('line-earth');
  if (earth && plot.device) {
    const cleared =
      plot.clearedS === null
        ? 'nothing clears it'
        : `it is cleared in ${seconds(plot.clearedS)}${plot.rcdName ? `, with ${plot.rcdName}` : ''}`;
    said.push(
      `A fault to earth, ${amps(earth.amps)} A, ${opening(plot, earth.amps)}; ${cleared}, ${seconds(plot.withinS)} ${plot.withinS === 1 ? 'is' : 'are'} allowed.`,
    );
  }
  const battery = fault('battery');
  if (battery && plot.device)
    said.push(`On battery there is no more than ${amps(battery.amps)} A: it ${opening(plot, battery.amps)}.`);
  if (plot.izA !== null && plot.inA !== null && plot.needA !== null && plot.needA > plot.izA)
    said.push(
      `The trouble is overload: from ${amps(plot.izA)} A to ${amps(1.45 * plot.inA)} A the device may let it pass for an hour.`,
    );
  return said;
}

/** The volt drop along a way. */
export function dropWords({ drop }: WayPlot): string[] {
  if (!drop) return ['The drop needs the watts of every load and a cable all the way.'];
  const last = drop.stations.at(-1)!;
  const steps = drop.stations.map((station, i) => ({
    from: drop.stations[i - 1]?.name,
    to: station.name,
    percent: station.percent - (drop.stations[i - 1]?.percent ?? 0),
  }));
  const most = steps.reduce((a, b) => (b.percent > a.percent ? b : a));
  const over = last.percent > drop.limitPercent;
  return [
    `${last.percent.toFixed(2)} % is lost up to ${drop.end}, ${Number(last.metres.toFixed(1))} m from the meter; ` +
      `${over ? 'only ' : ''}${drop.limitPercent} % is allowed for ${drop.limitOf}.`,
    ...(most.from && most.percent > 0.005
      ? [`Most of it, ${most.percent.toFixed(2)} %, from ${most.from} to ${most.to}.`]
      : []),
  ];
}

/** The hours of a backup source, with what is off. */
export function hoursWords(plot: BackupPlot, off: ReadonlySet<string>): string[] {
  const all = hoursWithout(plot, new Set());
  const now = hoursWithout(plot, off);
  const wanted = plot.hoursWanted === null ? '' : `; ${hoursText(plot.hoursWanted)} wanted`;
  const first = `All that stays on, ${Math.round(all.watts)} W, lasts ${hoursText(all.hours)}${wanted}.`;
  if (off.size === 0) return [first];
  const names = plot.loads.filter(({ id }) => off.has(id)).map(({ name }) => name);
  const list = names.length > 4 ? `${names.slice(0, 3).join(', ')} and ${names.length - 3} more` : names.join(', ');
  return [first, `Without ${list}: ${Math.round(now.watts)} W, ${hoursText(now.hours)}.`];
}

export const conditionWords = (loads: readonly ConditionLoad[]): string[] =>
  loads.map(({ condition, source, va, limitVa, limitBy }) => {
    const limit =
      limitVa === null
        ? 'no limit is given'
        : `${Math.round((100 * va) / limitVa)} % of ${Math.round(limitVa)} VA (${limitBy})`;
    return `${condition}: ${source === 'mains' ? '' : `${source} carries `}${Math.round(va)} VA, ${limit}.`;
  });
