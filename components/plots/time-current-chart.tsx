'use client';

import {
  Area,
  ComposedChart,
  Line,
  ReferenceDot,
  ReferenceLine,
  ResponsiveContainer,
  XAxis,
  YAxis,
  CartesianGrid,
} from 'recharts';
import { INSTANT, type OvercurrentDevice } from '@/diagram/calculations/trip-curve';
import { amps } from '@/diagram/schedules/figure';
import { ADIABATIC_UP_TO_S, FASTEST_S, SLOWEST_S, bandFor, withstandLine } from '@/diagram/schedules/trip-points';
import type { FaultMark, WayPlot } from '@/diagram/schedules/way-plot';
import {
  DASH,
  GREY_LETTERING,
  HAIR,
  HEIGHT,
  INK,
  LABEL,
  LETTERING,
  MARGIN,
  RED,
  ROW,
  axisUnit,
  logRange,
  logTicks,
} from './look';

const SECONDS = [0.01, 0.1, 1, 10, 100, 1000, 10_000];
const TOLD: Record<FaultMark['id'], string> = {
  'line-earth': 'L-PE end',
  battery: 'battery',
  'line-neutral': 'L-N end',
  board: 'L-N board',
};

interface Point {
  currentA: number;
  band?: [number, number];
  [conductor: `stands${number}`]: number | undefined;
}

/** From a little below the smallest current that matters to a little above the largest. */
function range(plot: WayPlot): [number, number] {
  const values = [
    ...plot.faults.map(({ amps: current }) => current),
    ...(plot.izA === null ? [] : [plot.izA]),
    ...(plot.inA === null ? [] : [plot.inA, plot.inA * 20]),
  ].filter((value) => value > 0);
  return logRange(Math.min(...values, 10) * 0.8, Math.max(...values, 100) * 1.1);
}

/** Label of an upright line, at a height of its own so that neighbours do not collide, and on the side where there is room. */
const upright = (value: string, level: number, toTheLeft: boolean) => ({
  value,
  position: toTheLeft ? ('insideTopRight' as const) : ('insideTopLeft' as const),
  offset: 4,
  dy: level * 14,
  ...LABEL,
});

/** Where the band is wide enough for its name: beyond the surely instantaneous trip, below 0.1 s. */
const nameAt = (device: OvercurrentDevice): number =>
  device.ratingA * (device.kind === 'gG' ? 8 : INSTANT[device.curve ?? 'C'].trips) * 1.1;

/** Device band, what the copper stands, and the currents of faults, on two logarithmic axes. */
export default function TimeCurrentChart({ plot }: { plot: WayPlot }) {
  const [from, to] = range(plot);
  const band: Point[] = plot.device
    ? bandFor(plot.device, from, to).map(({ currentA, earliestS, latestS }) => ({
        currentA,
        band: [earliestS, latestS],
      }))
    : [];
  const stands = plot.conductors.map((conductor) => ({
    ...conductor,
    short: withstandLine(conductor, FASTEST_S, ADIABATIC_UP_TO_S),
    long: withstandLine(conductor, ADIABATIC_UP_TO_S, 200),
  }));
  const thin = plot.needA !== null && plot.izA !== null && plot.needA > plot.izA;
  const uprights = [...plot.faults].sort((a, b) => a.amps - b.amps);
  return (
    <ResponsiveContainer width="100%" height={HEIGHT} initialDimension={{ width: 520, height: HEIGHT }}>
      <ComposedChart data={band} margin={MARGIN} accessibilityLayer={false}>
        <CartesianGrid stroke={HAIR} />
        <XAxis
          dataKey="currentA"
          type="number"
          scale="log"
          domain={[from, to]}
          ticks={logTicks(from, to)}
          allowDataOverflow
          tick={LETTERING}
          stroke={INK}
          tickLine={false}
          height={36}
          label={{ value: 'A', position: 'insideBottomRight', ...GREY_LETTERING }}
        />
        <YAxis
          type="number"
          scale="log"
          domain={[FASTEST_S, SLOWEST_S]}
          ticks={SECONDS}
          allowDataOverflow
          tick={LETTERING}
          stroke={INK}
          tickLine={false}
          width={48}
          label={axisUnit('s')}
        />
        <Area
          dataKey="band"
          type="linear"
          stroke={INK}
          strokeWidth={1.4}
          fill={ROW}
          fillOpacity={1}
          isAnimationActive={false}
          activeDot={false}
        />
        {stands.flatMap(({ name, short, long }, i) => [
          <Line
            key={`${name} short`}
            data={short}
            dataKey="seconds"
            type="linear"
            stroke={INK}
            strokeWidth={2.2}
            strokeDasharray={i === 0 ? undefined : '8 3 2 3'}
            dot={false}
            activeDot={false}
            isAnimationActive={false}
          />,
          <Line
            key={`${name} long`}
            data={long}
            dataKey="seconds"
            type="linear"
            stroke={INK}
            strokeWidth={1.4}
            strokeDasharray={DASH.beyond}
            dot={false}
            activeDot={false}
            isAnimationActive={false}
          />,
        ])}
        {plot.izA !== null && (
          <ReferenceLine
            x={plot.izA}
            stroke={thin ? RED : INK}
            strokeWidth={thin ? 2 : 1.4}
            strokeDasharray={thin ? undefined : '10 3'}
            label={{
              value: `Iz ${amps(plot.izA)}`,
              position: 'insideBottomRight',
              ...LABEL,
              fill: thin ? RED : INK,
              fontWeight: thin ? 700 : 400,
            }}
          />
        )}
        {uprights.map(({ id, amps: current }, i) => (
          <ReferenceLine
            key={id}
            x={current}
            stroke={INK}
            strokeWidth={1.4}
            strokeDasharray={DASH.fault}
            label={upright(`${TOLD[id]} ${amps(current)}`, i % 3, current > from * (to / from) ** 0.72)}
          />
        ))}
        <ReferenceLine
          y={plot.withinS}
          stroke={INK}
          strokeDasharray={DASH.limit}
          label={{ value: `${plot.withinS} s allowed`, position: 'insideBottomLeft', ...LABEL }}
        />
        {plot.device && (
          <ReferenceDot
            x={nameAt(plot.device)}
            y={0.03}
            r={0}
            label={{ value: plot.deviceName, position: 'right', fontWeight: 700, ...LABEL }}
          />
        )}
      </ComposedChart>
    </ResponsiveContainer>
  );
}
