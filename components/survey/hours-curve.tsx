'use client';

import { autonomyCurve, autonomyHours, whatIfs } from '@/diagram/calculations/autonomy';
import { ASSUMED } from '@/diagram/calculations/battery-bank';
import type { SurveyTotals } from '@/diagram/survey/totals';
import type { SurveyRoom } from '@/diagram/document/schema';
import { hoursWords } from './words';

const WIDTH = 440;
const HEIGHT = 250;
const BOX = { left: 40, right: 432, top: 16, bottom: 210 };

type Backup = NonNullable<SurveyTotals['backup']>;

/** A round number at or above `value`, so that an axis has five even steps. */
function roundUp(value: number): number {
  const power = 10 ** Math.floor(Math.log10(value));
  return [1, 2, 2.5, 5, 10].map((step) => step * power).find((step) => step >= value)!;
}

/** What stays on by kind, to see what each is worth. */
function keptLoads(rooms: readonly SurveyRoom[]): { name: string; watts: number }[] {
  const sum = (of: (room: SurveyRoom) => number) => rooms.reduce((total, room) => total + of(room), 0);
  return [
    { name: 'outlets off', watts: sum((room) => room.keepOutletWatts) },
    { name: 'fans off', watts: sum((room) => room.keepFans * room.fanWatts) },
    { name: 'lamps off', watts: sum((room) => room.keepLamps * room.lampWatts) },
  ].filter((load) => load.watts > 0);
}

/** Hours of backup against the load at once, with what it would be worth to leave something off. */
export function HoursCurve({ backup, rooms }: { backup: Backup; rooms: readonly SurveyRoom[] }) {
  const { bank, efficiency, watts, hoursWanted } = backup;
  const hours = autonomyHours({ bank, efficiency, watts });
  const loads = keptLoads(rooms);
  const options = loads.length > 1 ? whatIfs({ bank, efficiency }, loads).filter((option) => option.watts > 0) : [];
  const without = options.find((option) => hours < hoursWanted && option.hours >= hoursWanted) ?? options[0];

  const maxWatts = roundUp(Math.max(100, watts * 1.6));
  const maxHours = roundUp(Math.max(hoursWanted, hours, 2) * 1.5);
  const x = (value: number) => BOX.left + ((BOX.right - BOX.left) * value) / maxWatts;
  const y = (value: number) => BOX.bottom - ((BOX.bottom - BOX.top) * value) / maxHours;
  const points = autonomyCurve({ bank, efficiency }, maxWatts / 100, maxWatts, 100).filter((point) => point.hours <= maxHours);
  const path = points.map((point) => `${x(point.watts).toFixed(1)} ${y(point.hours).toFixed(1)}`).join('L');
  const steps = [0, 1, 2, 3, 4, 5];
  const assumed = ASSUMED[bank.chemistry];
  const rows = [
    { name: 'all that stays on', watts, hours },
    ...options,
    ...steps.slice(1).map((step) => ({ name: 'any load', watts: (maxWatts * step) / 5, hours: autonomyHours({ bank, efficiency, watts: (maxWatts * step) / 5 }) })),
  ];
  // Its words stand where the curve is not: at the left while the curve is still high, else at the right.
  const wishLeft = autonomyHours({ bank, efficiency, watts: maxWatts * 0.45 }) > hoursWanted * 1.25;

  return (
    <section aria-labelledby="hours-curve" className="min-w-0">
      <h2 id="hours-curve" className="font-bold">
        Hours of backup against load
      </h2>
      <svg viewBox={`0 0 ${WIDTH} ${HEIGHT}`} className="mt-1 block w-full max-w-[520px] text-small" aria-hidden="true" fill="none">
        {steps.map((step) => (
          <g key={step}>
            {step > 0 && <path d={`M${BOX.left} ${y((maxHours * step) / 5)}H${BOX.right}`} className="stroke-hair" />}
            <text x={BOX.left - 8} y={y((maxHours * step) / 5) + 4} textAnchor="end" className="fill-ink">
              {(maxHours * step) / 5}
            </text>
            {step > 0 && (
              <>
                <path d={`M${x((maxWatts * step) / 5)} ${BOX.bottom}v4`} className="stroke-ink" />
                <text x={x((maxWatts * step) / 5)} y={BOX.bottom + 18} textAnchor={step === 5 ? 'end' : 'middle'} className="fill-ink">
                  {Math.round((maxWatts * step) / 5)}
                </text>
              </>
            )}
          </g>
        ))}
        <path d={`M${BOX.left} ${BOX.top}V${BOX.bottom}H${BOX.right}`} className="stroke-ink" strokeWidth="1.4" />
        <text x={BOX.left - 8} y={BOX.top - 6} textAnchor="end" className="fill-grey">
          h
        </text>
        <text x={BOX.right} y={BOX.bottom + 34} textAnchor="end" className="fill-grey">
          W at once
        </text>
        <path d={`M${BOX.left} ${y(hoursWanted)}H${BOX.right}`} className="stroke-ink" strokeWidth="1.4" strokeDasharray="5 4" />
        <text
          x={wishLeft ? BOX.left + 8 : BOX.right}
          y={y(hoursWanted) + (wishLeft ? 14 : -6)}
          textAnchor={wishLeft ? 'start' : 'end'}
          className="fill-ink"
        >
          {hoursWanted} h, the longest wish
        </text>
        {points.length > 1 && <path d={`M${path}`} className="stroke-ink" strokeWidth="2.4" strokeLinejoin="round" />}
        {without && without.hours <= maxHours && (
          <>
            <circle cx={x(without.watts)} cy={y(without.hours)} r="4" className="fill-paper stroke-ink" strokeWidth="1.4" />
            <path d={`M${x(without.watts) + 3} ${y(without.hours) - 3}l10 -14`} className="stroke-ink" />
            <text x={x(without.watts) + 16} y={y(without.hours) - 20} className="fill-ink">
              {Math.round(without.watts)} W, {without.name}: {hoursWords(without.hours)}
            </text>
          </>
        )}
        {hours <= maxHours && (
          <>
            <circle cx={x(watts)} cy={y(hours)} r="5" className="fill-ink" />
            <path d={`M${x(watts)} ${y(hours) + 5}V${BOX.bottom}`} className="stroke-ink" />
          </>
        )}
        <text x={x(watts) + 8} y={BOX.bottom - 10} className="fill-ink font-bold">
          {Math.round(watts)} W, {hoursWords(hours)}
        </text>
      </svg>
      <p className="mt-1 text-small text-grey">
        {backup.batteryText} at C{bank.hours}. Taken: {Math.round(assumed.dischargeDepth * 100)} % discharge, {Math.round(assumed.ageing * 100)} % left by age,
        exponent {assumed.peukert}, {Math.round(efficiency * 100)} % efficiency.
      </p>
      <details className="mt-1">
        <summary className="cursor-pointer text-small text-grey">The same as figures</summary>
        <table className="mt-1 border-collapse">
          <thead>
            <tr className="text-left text-small text-grey">
              <th className="pr-6 font-normal">Load</th>
              <th className="pr-6 text-right font-normal">W</th>
              <th className="text-right font-normal">Hours</th>
            </tr>
          </thead>
          <tbody className="tabular-nums">
            {rows.map((row) => (
              <tr key={`${row.name} ${row.watts}`}>
                <th scope="row" className="pr-6 text-left font-normal">
                  {row.name}
                </th>
                <td className="pr-6 text-right">{Math.round(row.watts)}</td>
                <td className="text-right">{hoursWords(row.hours)}</td>
              </tr>
            ))}
          </tbody>
        </table>
      </details>
    </section>
  );
}
