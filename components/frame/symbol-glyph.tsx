import type { SymbolData } from '@/diagram/symbols/types';

const widths = { thin: 1, normal: 1.4, heavy: 2.6 } as const;
const dashes = { short: '3 2', long: '7 4' } as const;
const fills = { ink: 'fill-ink', paper: 'fill-paper', none: 'fill-none' } as const;

interface SymbolGlyphProps {
  symbol: SymbolData;
  /** of its upper left corner, 1/100 mm */
  x: number;
  y: number;
  /** degrees, clockwise about its middle */
  turn?: 0 | 90 | 180 | 270;
}

/** A symbol of the drawing office in ink, inside an svg whose unit is 1/100 mm. Strokes keep their width at any scale. */
export function SymbolGlyph({ symbol, x, y, turn = 0 }: SymbolGlyphProps) {
  const spin = turn === 0 ? '' : ` rotate(${turn} ${symbol.width / 2} ${symbol.height / 2})`;
  return (
    <g transform={`translate(${x} ${y})${spin}`}>
      {symbol.strokes.map((stroke) => (
        <path
          key={stroke.d}
          d={stroke.d}
          className={`stroke-ink ${fills[stroke.fill ?? 'none']}`}
          strokeWidth={widths[stroke.weight ?? 'normal']}
          strokeDasharray={stroke.dash && dashes[stroke.dash]}
          strokeLinecap="round"
          strokeLinejoin="round"
          vectorEffect="non-scaling-stroke"
        />
      ))}
      {symbol.texts?.map((text) => (
        <text key={text.text} x={text.x} y={text.y} fontSize={text.size} textAnchor={text.anchor} className="fill-ink">
          {text.text}
        </text>
      ))}
    </g>
  );
}
