import { memo } from 'react';
import type { EdgeProps } from 'reactflow';
import type { RunEdge } from './flow-items';
import { pathOf } from './run-shape';
import { PX } from './units';

/** px about a run within which a pointer takes it */
const REACH = 14;

/** What a pointer meets of a run. Its ink is drawn in one layer with all others, so that branches run into each other. */
export const RunEdgeView = memo(function RunEdgeView({ data }: EdgeProps<RunEdge>) {
  if (!data) return null;
  return (
    <g transform={`scale(${PX})`}>
      <path
        className="react-flow__edge-interaction"
        d={pathOf(data.run)}
        fill="none"
        stroke="transparent"
        strokeWidth={REACH / PX}
      />
    </g>
  );
});
