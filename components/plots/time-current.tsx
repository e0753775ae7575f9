'use client';

import dynamic from 'next/dynamic';
import { amps, seconds } from '@/diagram/schedules/figure';
import { timeCurrentWords } from '@/diagram/schedules/plot-words';
import { tripBand } from '@/diagram/calculations/trip-curve';
import { withstandS } from '@/diagram/calculations/adiabatic';
import type { WayPlot } from '@/diagram/schedules/way-plot';
import { PlotFrame, type PlotFigures } from './plot-frame';
import { PlotWaits } from './plot-waits';

const TimeCurrentChart = dynamic(() => import('./time-current-chart'), { ssr: false, loading: PlotWaits });

const time = (value: number): string => (Number.isFinite(value) ? seconds(value) : 'may hold');

/** The band and the copper at currents a person would ask for, and at each fault. */
function figuresOf(plot: WayPlot): PlotFigures {
  const { device, conductors } = plot;
  const at = (name: string, currentA: number): string[] => {
    const band = device ? tripBand(device, currentA) : { earliestS: Infinity, latestS: Infinity };
    return [
      name,
      amps(currentA),
      time(band.earliestS),
      time(band.latestS),
      ...conductors.map(({ csaMm2, k }) => time(withstandS({ csaMm2, k, currentA }))),
    ];
  };
  const inA = plot.inA ?? 0;
  return {
    head: ['At', 'A', 'opens at the earliest', 'at the latest', ...conductors.map(({ name }) => `${name} stands`)],
    rows: [
      ...(inA > 0 ? [1.45, 2.55, 3, 5, 10, 20].map((multiple) => at(`${multiple} × In`, multiple * inA)) : []),
      ...plot.faults.map((fault) => at(fault.name, fault.amps)),
    ],
  };
}

/** Time against current of a way. */
export const TimeCurrentPlot = ({ plot }: { plot: WayPlot }) => (
  <PlotFrame
    title={`Way ${plot.number}: time against current`}
    aside="log, log"
    words={timeCurrentWords(plot)}
    figures={figuresOf(plot)}
  >
    <TimeCurrentChart plot={plot} />
    <p className="text-small text-grey">
      band: {plot.deviceName}
      {plot.conductors.map(({ name }, i) => (
        <span key={name}>
          {'; '}
          {i === 0 ? 'heavy' : 'dash and dot'}: what {name} stands
        </span>
      ))}
      ; beyond 5 s dashed, on the safe side
    </p>
  </PlotFrame>
);
