'use client';

import {
  CartesianGrid,
  ComposedChart,
  Line,
  ReferenceDot,
  ReferenceLine,
  ResponsiveContainer,
  XAxis,
  YAxis,
} from 'recharts';
import { autonomyCurve } from '@/diagram/calculations/autonomy';
import { hoursWithout, type BackupPlot } from '@/diagram/schedules/backup-plot';
import { hoursText } from '@/diagram/schedules/figure';
import { DASH, GREY_LETTERING, HAIR, HEIGHT, INK, LABEL, LETTERING, MARGIN, PAPER, axis, axisUnit } from './look';

interface HoursChartProps {
  plot: BackupPlot;
  /** ids of loads that are off for the sake of the question */
  off: ReadonlySet<string>;
}

/** Hours of backup against the load at once, with the load as it is and as it would be. */
export default function HoursChart({ plot, off }: HoursChartProps) {
  const all = hoursWithout(plot, new Set());
  const now = hoursWithout(plot, off);
  const along = axis(Math.max(100, all.watts * 1.5));
  const mostW = along.domain[1];
  const shown = [all.hours, now.hours].filter(Number.isFinite);
  const up = axis(Math.max(plot.hoursWanted ?? 0, ...shown, 2) * 1.3);
  const data = autonomyCurve({ bank: plot.bank, efficiency: plot.efficiency }, mostW / 100, mostW, 100).filter(
    ({ hours }) => hours <= up.domain[1],
  );
  const dot = (load: typeof all, hollow: boolean) =>
    Number.isFinite(load.hours) && (
      <ReferenceDot
        x={load.watts}
        y={load.hours}
        r={5}
        fill={hollow ? PAPER : INK}
        stroke={INK}
        strokeWidth={1.6}
        label={{
          value: `${Math.round(load.watts)} W, ${hoursText(load.hours)}`,
          position: 'right',
          offset: 8,
          dy: -10,
          fontWeight: 700,
          ...LABEL,
        }}
      />
    );
  return (
    <ResponsiveContainer width="100%" height={HEIGHT} initialDimension={{ width: 520, height: HEIGHT }}>
      <ComposedChart data={data} margin={MARGIN} accessibilityLayer={false}>
        <CartesianGrid stroke={HAIR} vertical={false} />
        <XAxis
          dataKey="watts"
          type="number"
          {...along}
          tick={LETTERING}
          stroke={INK}
          height={36}
          label={{ value: 'W at once', position: 'insideBottomRight', ...GREY_LETTERING }}
        />
        <YAxis type="number" {...up} tick={LETTERING} stroke={INK} tickLine={false} width={36} label={axisUnit('h')} />
        {plot.hoursWanted !== null && plot.hoursWanted > 0 && (
          <ReferenceLine
            y={plot.hoursWanted}
            stroke={INK}
            strokeWidth={1.4}
            strokeDasharray={DASH.wish}
            label={{ value: `${plot.hoursWanted} h wanted`, position: 'insideBottomRight', dy: -16, ...LABEL }}
          />
        )}
        <Line
          dataKey="hours"
          type="linear"
          stroke={INK}
          strokeWidth={2.4}
          dot={false}
          activeDot={false}
          isAnimationActive={false}
        />
        {dot(all, false)}
        {off.size > 0 && dot(now, true)}
      </ComposedChart>
    </ResponsiveContainer>
  );
}
