'use client';

import { CartesianGrid, ComposedChart, LabelList, Line, ReferenceLine, ResponsiveContainer, XAxis, YAxis } from 'recharts';
import type { WayPlot } from '@/diagram/schedules/way-plot';
import { DASH, GREY_LETTERING, HAIR, HEIGHT, INK, LETTERING, MARGIN, PAPER, RED, fifths, roundUp } from './look';

/** Volts lost along a way, station by station, against the limit. */
export default function DropChart({ drop }: { drop: NonNullable<WayPlot['drop']> }) {
  const { stations, limitPercent, limitOf } = drop;
  const last = stations.at(-1)!;
  const over = last.percent > limitPercent;
  const mostM = roundUp(Math.max(last.metres, 5));
  const most = roundUp(Math.max(limitPercent, last.percent) * 1.15);
  const data = stations.map((station, i) => ({
    ...station,
    // Names stand where there is room: the ends, and stations an eighth of the picture away from the one before.
    told:
      i === stations.length - 1
        ? `${station.name} ${station.percent.toFixed(2)} %`
        : i > 0 && station.metres - stations[i - 1]!.metres > mostM / 7 && last.metres - station.metres > mostM / 7
          ? station.name
          : '',
  }));
  return (
    <ResponsiveContainer width="100%" height={HEIGHT + 30} initialDimension={{ width: 520, height: HEIGHT + 30 }}>
      <ComposedChart data={data} margin={{ ...MARGIN, right: 24 }} accessibilityLayer={false}>
        <CartesianGrid stroke={HAIR} vertical={false} />
        <XAxis
          dataKey="metres"
          type="number"
          domain={[0, mostM]}
          ticks={fifths(mostM)}
          tick={LETTERING}
          stroke={INK}
          height={36}
          label={{ value: 'm from the meter', position: 'insideBottomRight', ...GREY_LETTERING }}
        />
        <YAxis
          type="number"
          domain={[0, most]}
          ticks={fifths(most)}
          tick={LETTERING}
          stroke={INK}
          tickLine={false}
          width={36}
          label={{ value: '%', position: 'insideTopLeft', dy: -16, ...GREY_LETTERING }}
        />
        <ReferenceLine
          y={limitPercent}
          stroke={INK}
          strokeWidth={1.4}
          strokeDasharray={DASH.limit}
          label={{ value: `${limitPercent} % limit, ${limitOf}`, position: 'insideBottomRight', dy: -16, ...LETTERING }}
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
          <LabelList dataKey="told" position="top" offset={8} textAnchor="end" {...LETTERING} />
        </Line>
      </ComposedChart>
    </ResponsiveContainer>
  );
}
