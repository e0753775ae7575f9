import { SymbolGlyph } from '@/components/frame/symbol-glyph';
import type { Part } from '@/diagram/document/schema';
import { symbolById } from '@/diagram/symbols';

export const EDGE_WIDTH = 98;
const BAR = 8;
const RING = { x: 70, r: 10 };
/** 1/100 mm to px: the breaker stands as large as on the overview */
const SCALE = 0.028;

interface WayEdgeProps {
  part: Part | undefined;
  number: number;
  backup: boolean;
  first: boolean;
  last: boolean;
  height: number;
}

/** A stroke of mains, or of backup: cased, an outline with a light core. */
function Conductor({ d, cased, strong }: { d: string; cased: boolean; strong?: boolean }) {
  if (!cased) return <path d={d} className="stroke-ink" strokeWidth={strong ? 5 : 1.4} fill="none" />;
  return (
    <>
      <path d={d} className="stroke-ink" strokeWidth={strong ? 7 : 5} fill="none" />
      <path d={d} className="stroke-paper" strokeWidth={strong ? 4.2 : 2.4} fill="none" />
    </>
  );
}

/** A way as it runs from its bar through its breaker into its row: the board, turned on its side. */
export function WayEdge({ part, number, backup, first, last, height }: WayEdgeProps) {
  const middle = height / 2;
  const symbol = part && symbolById(part.kind);
  const half = symbol ? (symbol.height * SCALE) / 2 : 0;
  const centre = 34;
  return (
    <svg
      width={EDGE_WIDTH}
      height={height}
      viewBox={`0 0 ${EDGE_WIDTH} ${height}`}
      className="block"
      aria-hidden="true"
      fill="none"
    >
      <Conductor d={`M${BAR} ${first ? 3 : -1}V${last ? height - 3 : height + 1}`} cased={backup} strong />
      <Conductor d={`M${BAR} ${middle}H${centre - half}`} cased={backup} />
      <Conductor d={`M${centre + half} ${middle}H${RING.x - RING.r}M${RING.x + RING.r} ${middle}H${EDGE_WIDTH}`} cased={backup} />
      {symbol && (
        <g transform={`translate(${centre} ${middle}) rotate(-90) scale(${SCALE}) translate(${-symbol.width / 2} ${-symbol.height / 2})`}>
          <SymbolGlyph symbol={{ ...symbol, texts: undefined }} x={0} y={0} />
        </g>
      )}
      <circle cx={RING.x} cy={middle} r={RING.r} className="fill-paper stroke-ink" strokeWidth={1.4} />
      <text x={RING.x} y={middle + 4} textAnchor="middle" fontSize={number > 99 ? 9 : 11} className="fill-ink font-bold">
        {number}
      </text>
    </svg>
  );
}
