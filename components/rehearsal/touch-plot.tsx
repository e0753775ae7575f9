'use client';

import { CartesianGrid, Line, LineChart, ReferenceLine, XAxis, YAxis } from 'recharts';
import type { Walk } from '@/diagram/rehearsal/walk';
import { timeText, voltText } from '@/diagram/rehearsal/words';
import { decades, endOf, touchCurve } from './time-scale';

const WIDTH = 268;
const HEIGHT = 178;
const INK = { fill: 'var(--ink)', fontSize: 11 } as const;
const GREY = { fill: 'var(--grey)', fontSize: 11 } as const;

/** Touch volts against time, with the voltage that may stand and the time within which it must be off; its table behind it. */
export function TouchPlot({ walk, name, nominal }: { walk: Walk; name: string; nominal: number }) {
  const end = endOf(walk);
  const points = touchCurve(walk, end);
  const { seconds, source, volts } = walk.limit;
  const top = Math.max(nominal, ...points.map((point) => point.volts));
  return (
    <figure>
      <figcaption className="text-small text-grey">Touch voltage at {name}, V</figcaption>
      <div aria-hidden="true">
        <LineChart
          width={WIDTH}
          height={HEIGHT}
          data={points}
          margin={{ top: 18, right: 26, bottom: 0, left: 0 }}
          accessibilityLayer={false}
        >
          <CartesianGrid vertical={false} horizontal={false} />
          <XAxis
            dataKey="t"
            type="number"
            scale="log"
            domain={[0.001, end]}
            ticks={decades(end)}
            tickFormatter={timeText}
            tick={INK}
            stroke="var(--ink)"
            interval={0}
          />
          <YAxis
            domain={[0, Math.ceil(top)]}
            ticks={[0, volts, Math.round(nominal)]}
            tick={INK}
            stroke="var(--ink)"
            width={36}
            interval={0}
          />
          <ReferenceLine y={volts} stroke="var(--grey)" strokeDasharray="5 4" />
          <ReferenceLine
            x={seconds}
            stroke="var(--ink)"
            strokeDasharray="3 3"
            label={{ value: `${timeText(seconds)} limit`, position: 'top', ...GREY }}
          />
          <Line
            dataKey="volts"
            type="stepAfter"
            stroke="var(--red)"
            strokeWidth={2.4}
            dot={false}
            isAnimationActive={false}
          />
        </LineChart>
      </div>
      <p className="text-small text-grey">
        Dashed: {volts} V may stand. Limit: {source}.
      </p>
      <details className="mt-1">
        <summary className="cursor-pointer text-small text-grey">The same as a table</summary>
        <table className="mt-1 w-full text-left text-small">
          <caption className="sr-only">Touch voltage at {name} by time</caption>
          <thead>
            <tr>
              <th scope="col">from</th>
              <th scope="col">what</th>
              <th scope="col" className="text-right">
                volts
              </th>
            </tr>
          </thead>
          <tbody>
            {walk.stations.map((station, i) => (
              <tr key={i} className="align-top">
                <td className="whitespace-nowrap">{station.t === null ? 'before' : timeText(station.t)}</td>
                <td className="px-2">{station.heading}</td>
                <td className="text-right whitespace-nowrap">{voltText(station.touchVolts)}</td>
              </tr>
            ))}
          </tbody>
        </table>
      </details>
    </figure>
  );
}
