'use client';

import {
  CartesianGrid,
  ComposedChart,
  LabelList,
  Line,
  ReferenceLine,
  ResponsiveContainer,
  XAxis,
  YAxis,
} from 'recharts';
import type { Station } from '@/diagram/schedules/drop-stations';
import type { WayPlot } from '@/diagram/schedules/way-plot';
import { DASH, GREY_LETTERING, HAIR, HEIGHT, INK, LABEL, LETTERING, MARGIN, PAPER, RED, axis, axisUnit } from './look';

/** px a letter, and px of the picture at its least */
const LETTER = 6.6;
const WIDE = 400;

/** Names end at their station; one stands where it reaches neither the name before it nor the one at the end. */
function named(stations: readonly Station[], mostM: number): (Station & { told: string })[] {
  const last = stations.at(-1)!;
  const end = `${last.name} ${last.percent.toFixed(2)} %`;
  const metresOf = (words: string) => ((words.length + 2) * LETTER * mostM) / WIDE;
  let taken = 0;
  return stations.map((station) => {
    if (station === last) return { ...station, told: end };
    const fits = station.metres - metresOf(station.name) > taken && station.metres < last.metres - metresOf(end);
    if (fits) taken = station.metres;
    return { ...station, told: fits ? station.name : '' };
  });
}

/** Volts lost along a way, station by station, against the limit. */
export default function DropChart({ drop }: { drop: NonNullable<WayPlot['drop']> }) {
  const { stations, limitPercent, limitOf } = drop;
  const last = stations.at(-1)!;
  const over = last.percent > limitPercent;
  const along = axis(Math.max(last.metres, 5));
  const up = axis(Math.max(limitPercent, last.percent) * 1.1);
  const data = named(stations, along.domain[1]);
  return (
    <ResponsiveContainer width="100%" height={HEIGHT} initialDimension={{ width: 520, height: HEIGHT }}>
      <ComposedChart data={data} margin={{ ...MARGIN, right: 24 }} accessibilityLayer={false}>
        <CartesianGrid stroke={HAIR} vertical={false} />
        <XAxis
          dataKey="metres"
          type="number"
          {...along}
          tick={LETTERING}
          stroke={INK}
          height={36}
          label={{ value: 'm from the meter', position: 'insideBottomRight', ...GREY_LETTERING }}
        />
        <YAxis type="number" {...up} tick={LETTERING} stroke={INK} tickLine={false} width={36} label={axisUnit('%')} />
        <ReferenceLine
          y={limitPercent}
          stroke={INK}
          strokeWidth={1.4}
          strokeDasharray={DASH.limit}
          label={{ value: `${limitPercent} % limit, ${limitOf}`, position: 'insideBottomRight', dy: -16, ...LABEL }}
        />
        <Line
          dataKey="percent"
          type="linear"
          stroke={over ? RED : INK}
          strokeWidth={2.4}
          dot={{ r: 4, fill: over ? RED : INK, stroke: PAPER, strokeWidth: 1 }}
          activeDot={false}
          isAnimationActive={false}
        >
          <LabelList dataKey="told" position="top" offset={8} textAnchor="end" {...LABEL} />
        </Line>
      </ComposedChart>
    </ResponsiveContainer>
  );
}
