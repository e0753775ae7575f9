'use client';

import dynamic from 'next/dynamic';
import { dropWords } from '@/diagram/schedules/plot-words';
import type { WayPlot } from '@/diagram/schedules/way-plot';
import { PlotFrame } from './plot-frame';
import { PlotWaits } from './plot-waits';

const DropChart = dynamic(() => import('./drop-chart'), { ssr: false, loading: PlotWaits });

/** Volt drop along a way, up to its worst point. */
export const DropPlot = ({ plot }: { plot: WayPlot }) => (
  <PlotFrame
    title={`Way ${plot.number}: volt drop along the run`}
    words={dropWords(plot)}
    figures={{
      head: ['Place', 'm', '% lost'],
      rows: (plot.drop?.stations ?? []).map(({ name, metres, percent }) => [
        name,
        String(Number(metres.toFixed(1))),
        percent.toFixed(2),
      ]),
    }}
  >
    {plot.drop && <DropChart drop={plot.drop} />}
  </PlotFrame>
);
