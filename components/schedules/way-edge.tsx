import { SymbolGlyph } from '@/components/frame/symbol-glyph';
import type { Part } from '@/diagram/document/schema';
import { symbolById } from '@/diagram/symbols';

export const EDGE_WIDTH = 98;
const HEIGHT = 28;
const BAR = 8;
const CENTRE = 34;
const RING = { x: 70, r: 10 };
/** 1/100 mm to px: the breaker stands as large as on the overview */
const SCALE = 0.028;

interface WayEdgeProps {
  part: Part | undefined;
  number: number;
  backup: boolean;
  first: boolean;
  last: boolean;
}

/** A conductor of mains, or of backup: cased, an outline with a light core. */
function Conductor({ d, cased }: { d: string; cased: boolean }) {
  if (!cased) return <path d={d} className="stroke-ink" strokeWidth={1.4} />;
  return (
    <>
      <path d={d} className="stroke-ink" strokeWidth={5} />
      <path d={d} className="stroke-paper" strokeWidth={2.4} />
    </>
  );
}

/** A way as it runs from its bar through its breaker into its row: the board, turned on its side. */
export function WayEdge({ part, number, backup, first, last }: WayEdgeProps) {
  const middle = HEIGHT / 2;
  const symbol = part && symbolById(part.kind);
  const half = symbol ? (symbol.height * SCALE) / 2 : 0;
  const bar = backup ? 'w-[7px] border-x-[1.4px] border-ink bg-paper' : 'w-[5px] bg-ink';
  const ends = `${first ? 'top-[3px]' : 'top-0'} ${last ? 'bottom-[3px]' : 'bottom-0'}`;
  return (
    <span className="relative flex h-full items-center" style={{ width: EDGE_WIDTH }} aria-hidden="true">
      <span
        className={`absolute ${bar} ${ends} ${backup && first ? 'border-t-[1.4px]' : ''} ${backup && last ? 'border-b-[1.4px]' : ''}`}
        style={{ left: BAR - 3 }}
      />
      <svg
        width={EDGE_WIDTH}
        height={HEIGHT}
        viewBox={`0 0 ${EDGE_WIDTH} ${HEIGHT}`}
        className="relative block"
        fill="none"
      >
        <Conductor d={`M${BAR + 2} ${middle}H${CENTRE - half}`} cased={backup} />
        <Conductor d={`M${CENTRE + half} ${middle}H${RING.x - RING.r}`} cased={backup} />
        <Conductor d={`M${RING.x + RING.r} ${middle}H${EDGE_WIDTH}`} cased={backup} />
        {symbol && (
          <g
            transform={`translate(${CENTRE} ${middle}) rotate(-90) scale(${SCALE}) translate(${-symbol.width / 2} ${-symbol.height / 2})`}
          >
            <SymbolGlyph symbol={{ ...symbol, texts: undefined }} x={0} y={0} />
          </g>
        )}
        <circle cx={RING.x} cy={middle} r={RING.r} className="fill-paper stroke-ink" strokeWidth={1.4} />
        <text x={RING.x} y={middle + 4} textAnchor="middle" fontSize={number > 99 ? 9 : 11} className="fill-ink">
          {number}
        </text>
      </svg>
    </span>
  );
}
