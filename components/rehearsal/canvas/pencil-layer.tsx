import { memo, useMemo } from 'react';
import { Layer } from '@/components/sheet/canvas/layer';
import { fontSize } from '@/diagram/layout/lettering';
import type { FaultKind } from '@/diagram/circuit/fault-types';
import type { Scene } from '@/diagram/layout/scene';
import { ampText, voltText } from '@/diagram/rehearsal/words';
import type { Station } from '@/diagram/rehearsal/walk';
import { calloutPlace } from './callout-place';
import { arrowOf, pencilStrokes, type PencilStroke } from './pencil';

const HEAD = 'M-160 -110L0 0L-160 110';

function Stroke({ stroke }: { stroke: PencilStroke }) {
  const arrow = arrowOf(stroke);
  return (
    <g fill="none" stroke="var(--red)" strokeWidth={58} strokeLinejoin="round">
      <path
        d={`M${stroke.points.map(({ x, y }) => `${x} ${y}`).join('L')}`}
        strokeDasharray={stroke.out ? undefined : '210 110'}
      />
      {arrow && (
        <path
          d={HEAD}
          transform={`translate(${arrow.at.x} ${arrow.at.y}) rotate(${arrow.turn})`}
          strokeLinecap="round"
        />
      )}
    </g>
  );
}

interface RedProps {
  x: number;
  y: number;
  children: string;
  size?: number;
  anchor?: 'start' | 'middle' | 'end';
}

function Red({ x, y, children, size = 250, anchor = 'start' }: RedProps) {
  return (
    <text
      x={x}
      y={y}
      fontSize={fontSize(size)}
      fontWeight={700}
      textAnchor={anchor}
      fill="var(--red)"
      stroke="var(--paper)"
      strokeWidth={120}
      strokeLinejoin="round"
      style={{ paintOrder: 'stroke' }}
    >
      {children}
    </text>
  );
}

interface PencilProps {
  scene: Scene;
  station: Station;
  /** id of the faulted part, and what its case is called */
  at: string;
  name: string;
  kind: FaultKind;
  /** id of each wire's cable */
  cableOf: ReadonlyMap<string, string>;
}

/** What is called out at the faulted part: the case's volts, of a short circuit its amperes; nothing where there is neither. */
function calloutOf(station: Station, kind: FaultKind, at: string, name: string) {
  if (station.kind === 'before') return null;
  if (kind === 'line-to-neutral') return { figure: ampText(station.faultAmps), words: `L to N at ${name}` };
  if (station.figures.parts[at]?.caseVolts === undefined) return null;
  return { figure: voltText(station.touchVolts), words: `${name} case to earth` };
}

/** The fault in red pencil: its path beside the wires it takes, the ring at its place, what stands at the case. */
export const PencilLayer = memo(function PencilLayer({ scene, station, at, name, kind, cableOf }: PencilProps) {
  const strokes = useMemo(() => pencilStrokes(scene, station.path, cableOf), [scene, station.path, cableOf]);
  const part = scene.parts.find(({ id }) => id === at);
  const callout = calloutOf(station, kind, at, name);
  const words = callout?.words ?? '';
  const width = Math.max(2600, words.length * 218 + 500);
  const box = useMemo(() => part && calloutPlace(scene, part, width, 1350), [scene, part, width]);
  const shown = part && box && callout;
  const middle = part && { x: part.x + part.width / 2, y: part.y + part.height / 2 };
  const radius = part ? Math.max(part.width, part.height) / 2 + 260 : 0;
  const bars = scene.parts.filter(
    ({ kind, id }) => kind === 'earth-bar' && (station.figures.parts[id]?.caseVolts ?? 0) > 1,
  );
  const electrode = station.path.find(({ from, to }) =>
    [from[0], to[0]].some((id) => scene.parts.find((each) => each.id === id)?.kind === 'electrode'),
  );
  const electrodes = scene.parts.filter(({ kind }) => kind === 'electrode');
  const supply = scene.parts.find(({ kind }) => kind === 'supply');
  const home = station.path.find(
    ({ out, from, to }) => !out && [from, to].some(([id, mark]) => id === supply?.id && mark === 'N'),
  );
  return (
    <Layer scene={scene} level={3} name="pencil">
      {strokes.map((stroke) => (
        <Stroke key={stroke.key} stroke={stroke} />
      ))}
      {bars.map((bar) => (
        <Red key={bar.id} x={bar.x + bar.width + 620} y={bar.y + bar.height / 2 + 120}>
          {voltText(station.figures.parts[bar.id]!.caseVolts!)}
        </Red>
      ))}
      {electrode &&
        electrodes.slice(0, 1).map((each) => (
          <Red key={each.id} x={each.x + each.width / 2} y={each.y + each.height + 420} anchor="middle" size={220}>
            {`${ampText(electrode.amps)} into the ground`}
          </Red>
        ))}
      {home && supply && (
        <Red x={supply.x + supply.width + 1000} y={supply.y - 60} size={220}>
          {`${ampText(home.amps)} back by the neutral`}
        </Red>
      )}
      {middle && (
        <circle
          cx={middle.x}
          cy={middle.y}
          r={radius}
          fill="none"
          stroke="var(--red)"
          strokeWidth={65}
          strokeDasharray={station.kind === 'before' ? '120 90' : undefined}
        />
      )}
      {shown && middle && (
        <g data-callout="">
          <path
            d={`M${middle.x} ${middle.y + (box.y > middle.y ? radius : -radius)}L${Math.min(box.x + width - 200, Math.max(box.x + 200, middle.x))} ${box.y > middle.y ? box.y : box.y + box.height}`}
            stroke="var(--red)"
            strokeWidth={36}
          />
          <rect {...box} fill="var(--paper)" stroke="var(--red)" strokeWidth={58} />
          <Red x={box.x + 220} y={box.y + 640} size={420}>
            {callout.figure}
          </Red>
          <text x={box.x + 220} y={box.y + 1110} fontSize={fontSize(250)} fill="var(--ink)">
            {words}
          </text>
        </g>
      )}
    </Layer>
  );
});
