'use client';

import { Bar, BarChart, CartesianGrid, LabelList, ResponsiveContainer, XAxis, YAxis } from 'recharts';
import type { ConditionLoad } from '@/diagram/schedules/condition-loads';
import { GREY_LETTERING, HAIR, INK, LABEL, LETTERING, MARGIN, RED } from './look';

const BAR = 26;

interface Shape {
  x?: number;
  y?: number;
  width?: number;
  height?: number;
  payload?: { load: ConditionLoad; share: number };
}

/** Mains is one solid stroke, backup is cased, as on the drawing; what is beyond its limit is red. */
function LoadBar({ x = 0, y = 0, width = 0, height = 0, payload }: Shape) {
  const over = (payload?.share ?? 0) > 100;
  const ink = over ? RED : INK;
  const cased = payload?.load.source !== 'mains';
  return (
    <rect
      x={x + 0.8}
      y={y}
      width={Math.max(1.6, width - 1.6)}
      height={height}
      fill={cased ? 'var(--paper)' : ink}
      stroke={ink}
      strokeWidth={cased ? 3 : 1.6}
    />
  );
}

/** The load in each condition, as a share of what its source is rated for. */
export default function ConditionChart({ loads }: { loads: readonly ConditionLoad[] }) {
  const data = loads.map((load) => ({
    load,
    name: load.source === 'mains' ? load.condition : `${load.condition}, ${load.source}`,
    share: load.limitVa === null ? 0 : (100 * load.va) / load.limitVa,
    told:
      load.limitVa === null
        ? `${Math.round(load.va)} VA, no limit given`
        : `${Math.round(load.va)} of ${Math.round(load.limitVa)} VA`,
  }));
  const most = Math.max(100, Math.ceil(Math.max(...data.map(({ share }) => share)) / 25) * 25);
  const height = data.length * (BAR + 18) + 64;
  return (
    <ResponsiveContainer width="100%" height={height} initialDimension={{ width: 520, height }}>
      <BarChart data={data} layout="vertical" margin={{ ...MARGIN, right: 120 }} accessibilityLayer={false}>
        <CartesianGrid stroke={HAIR} horizontal={false} />
        <XAxis
          type="number"
          domain={[0, most]}
          ticks={[0, 25, 50, 75, 100, ...(most > 100 ? [most] : [])]}
          tick={LETTERING}
          stroke={INK}
          height={36}
          label={{ value: '% of its rating', position: 'insideBottomRight', ...GREY_LETTERING }}
        />
        <YAxis type="category" dataKey="name" width={120} tick={LETTERING} stroke={INK} tickLine={false} />
        <Bar
          dataKey="share"
          barSize={BAR}
          shape={LoadBar}
          isAnimationActive={false}
          background={{ fill: 'transparent', stroke: HAIR }}
        >
          <LabelList dataKey="told" position="right" {...LABEL} />
        </Bar>
      </BarChart>
    </ResponsiveContainer>
  );
}
