'use client';

import dynamic from 'next/dynamic';
import type { ReactNode } from 'react';
import { hoursWithout, type BackupPlot } from '@/diagram/schedules/backup-plot';
import { hoursText } from '@/diagram/schedules/figure';
import { hoursWords } from '@/diagram/schedules/plot-words';
import { PlotFrame } from './plot-frame';
import { PlotWaits } from './plot-waits';

const HoursChart = dynamic(() => import('./hours-chart'), { ssr: false, loading: PlotWaits });

interface HoursPlotProps {
  plot: BackupPlot;
  off: ReadonlySet<string>;
  controls?: ReactNode;
}

/** Hours of backup against load: as it is, and without what is switched off for the question. */
export function HoursPlot({ plot, off, controls }: HoursPlotProps) {
  const row = (name: string, without: ReadonlySet<string>) => {
    const { watts, hours } = hoursWithout(plot, without);
    return [name, String(Math.round(watts)), hoursText(hours)];
  };
  return (
    <PlotFrame
      title={`${plot.name}: hours of backup against load`}
      words={[...hoursWords(plot, off), plot.assumed]}
      figures={{
        head: ['Load', 'W', 'lasts'],
        rows: [
          row('all that stays on', new Set()),
          ...plot.loads.map(({ id, name }) => row(`without ${name}`, new Set([id]))),
        ],
      }}
      controls={controls}
    >
      <HoursChart plot={plot} off={off} />
    </PlotFrame>
  );
}
