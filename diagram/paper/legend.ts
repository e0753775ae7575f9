import type { Scene } from '../layout/scene';
import type { Kind } from '../document/schema';
import { legend } from '../symbols';
import { light } from '../symbols/palette';
import { CASED, CORE_DASH, strokeMark } from './draw-scene';
import type { Area } from './iso-sheet';
import type { Group, Mark } from './primitives';

/** What the symbols and lines of a sheet mean: only those that stand on it. */

const CELL = { width: 4650, height: 590 } as const;
const SIZE = 180;
/** Symbols are drawn at half their size here. */
const SCALE = 0.5;

interface Entry {
  name: string;
  draw: (x: number, y: number) => Group;
}

const line =
  (marks: (x: number) => Mark[]): Entry['draw'] =>
  (x, y) => ({ x, y: y + CELL.height / 2, scale: 1, marks: marks(0) });
const stroke = (d: string, width: number, extra: Partial<Extract<Mark, { kind: 'path' }>> = {}): Mark => ({
  kind: 'path',
  d,
  stroke: light.ink,
  width,
  cap: 'butt',
  ...extra,
});

const LINES: Record<'mains' | 'backup' | 'N' | 'E' | 'hop' | 'ticks', Entry> = {
  mains: { name: 'fed by the mains', draw: line(() => [stroke('M0 0H900', 50)]) },
  backup: {
    name: 'fed in an outage too',
    draw: line(() => [stroke('M0 0H900', CASED.outer), stroke('M0 0H900', CASED.inner, { stroke: light.paper })]),
  },
  N: { name: 'neutral', draw: line(() => [stroke('M0 0H900', 50, { dash: CORE_DASH.N })]) },
  E: { name: 'protective earth', draw: line(() => [stroke('M0 0H900', 50, { dash: CORE_DASH.E })]) },
  hop: {
    name: 'crossing, not joined',
    draw: line(() => [stroke('M0 0H260A190 190 0 0 1 640 0H900M450 250V-300', 25)]),
  },
  ticks: {
    name: 'cores: L, N, PE',
    draw: line(() => [
      stroke('M0 0H900', 50),
      stroke('M180 130L330 -130M380 130L530 -130M580 130L730 -130M650 -165L790 -85', 25),
      { kind: 'path', d: 'M472 -130A58 58 0 1 0 588 -130A58 58 0 1 0 472 -130Z', fill: light.ink },
    ]),
  },
};

/** Entries for a set of scenes: their symbols in the order of current, then the lines. */
function entries(scenes: readonly Scene[]): Entry[] {
  const kinds = new Set<Kind>(scenes.flatMap((scene) => scene.parts.map((part) => part.kind)));
  // bars carry their name on the sheet
  const symbols = legend(kinds)
    .filter((symbol) => !symbol.id.endsWith('-bar'))
    .map((symbol): Entry => {
      const scale = Math.min(SCALE, 560 / symbol.height, 900 / symbol.width);
      return {
        name: symbol.name,
        draw: (x, y) => ({
          x: Math.round(x + 450 - (symbol.width * scale) / 2),
          y: Math.round(y + CELL.height / 2 - (symbol.height * scale) / 2),
          scale,
          marks: [
            ...symbol.strokes.map((s) => strokeMark(s, light.ink)),
            ...(symbol.texts ?? []).map((t): Mark => ({
              kind: 'text',
              x: t.x,
              y: t.y,
              text: t.text,
              size: t.size,
              colour: light.ink,
              anchor: t.anchor ?? 'start',
            })),
          ],
        }),
      };
    });
  const backup = scenes.some((scene) => scene.runs.some((run) => run.feed === 'backup'));
  const face = scenes[0]?.face;
  return [
    ...symbols,
    LINES.mains,
    ...(backup ? [LINES.backup] : []),
    ...(face === 'connections' ? [LINES.N, LINES.E] : [LINES.ticks]),
    LINES.hop,
  ];
}

export interface LegendMarks {
  groups: Group[];
  /** entries that found no room */
  left: number;
}

/** Fills an area with the legend, column by column. */
export function legendMarks(scenes: readonly Scene[], area: Area): LegendMarks {
  const all = entries(scenes);
  const columns = Math.max(1, Math.floor(area.width / CELL.width));
  const rows = Math.max(1, Math.floor(area.height / CELL.height));
  const shown = all.slice(0, columns * rows);
  const groups = shown.flatMap((entry, i): Group[] => {
    const x = area.x + Math.floor(i / rows) * CELL.width;
    const y = area.y + (i % rows) * CELL.height;
    const name: Mark = {
      kind: 'text',
      x: x + 1150,
      y: y + CELL.height / 2 + 80,
      text: entry.name,
      size: SIZE,
      colour: light.ink,
    };
    return [entry.draw(x, y), { x: 0, y: 0, scale: 1, marks: [name] }];
  });
  return { groups, left: all.length - shown.length };
}
