'use client';

import dynamic from 'next/dynamic';
import type { ConditionLoad } from '@/diagram/schedules/condition-loads';
import { conditionWords } from '@/diagram/schedules/plot-words';
import { PlotFrame } from './plot-frame';
import { PlotWaits } from './plot-waits';

const ConditionChart = dynamic(() => import('./condition-chart'), { ssr: false, loading: PlotWaits });

/** What each source carries in each condition, against what it is rated for. */
export const ConditionPlot = ({ loads }: { loads: readonly ConditionLoad[] }) => (
  <PlotFrame
    title="Load by condition"
    aside="mains after diversity"
    words={conditionWords(loads)}
    figures={{
      head: ['Condition', 'from', 'W', 'VA', 'limit, VA'],
      rows: loads.map(({ condition, source, watts, va, limitVa }) => [
        condition,
        source,
        String(Math.round(watts)),
        String(Math.round(va)),
        limitVa === null ? 'not given' : String(Math.round(limitVa)),
      ]),
    }}
  >
    <ConditionChart loads={loads} />
  </PlotFrame>
);
