import type { Installation } from '../document/schema';
import { buildScene } from '../layout/build-scene';
import { connectionPages } from '../layout/connections-page';
import type { Scene } from '../layout/scene';
import { light } from '../symbols/palette';
import { sceneGroups } from './draw-scene';
import { borderMarks, frameOf, paperSize, type Area } from './iso-sheet';
import { legendSheet } from './legend-sheet';
import type { Mark, Page } from './primitives';
import { LINE, PAD, drawingArea, type SheetOptions } from './sheet-options';
import { checkLine, needsLegendSheet, strip } from './sheet-strip';
import { contentOf, crossingsAt, cuts } from './split';
import { TITLE_HEIGHT, titleBlockMarks } from './title-block';

/** The paper sheets of a drawing: true ISO size, border, title block, legend, findings, check line, and the drawing itself. */

export type { SheetFinding, SheetOptions } from './sheet-options';
export { CHECK_LINE, findingsText } from './sheet-strip';

/** Drawing scales, full size first; at the smaller one the small lettering is still 1.8 mm high. */
const SCALES = [
  { factor: 1, name: '1:1' },
  { factor: 0.8, name: '1:1.25' },
] as const;
interface Sheet {
  kind: string;
  scene: Scene;
  window: Area;
  factor: number;
  scale: string;
  /** edges at which the drawing goes on: index of the sheet it goes on to, within the drawing */
  joins: { edge: 'left' | 'right' | 'top' | 'bottom'; to: number }[];
}

function scenesOf(doc: Installation, { face = 'overview', place }: SheetOptions): { kind: string; scene: Scene }[] {
  const pages = connectionPages(doc).filter((page) => place === undefined || page.place === place);
  const connections = pages.map((page) => ({
    kind: `Connections, ${page.name}`,
    scene: buildScene(doc, 'connections', { place: page.place }),
  }));
  const overview = { kind: 'Overview, single line', scene: buildScene(doc, 'overview') };
  if (face === 'overview') return [overview];
  if (face === 'all') return [overview, ...connections];
  return connections.length > 0 ? connections : [{ kind: 'Connections', scene: buildScene(doc, 'connections') }];
}

/** The sheets one drawing takes: whole where a named scale allows it, else cut. */
function sheetsOf(kind: string, scene: Scene, area: Area): Sheet[] {
  const drawn = contentOf(scene);
  const fits = SCALES.find(({ factor }) => drawn.width * factor <= area.width && drawn.height * factor <= area.height);
  const { factor, name } = fits ?? SCALES.at(-1)!;
  const xs = cuts(scene, 'x', drawn.x, drawn.x + drawn.width, area.width / factor);
  const ys = cuts(scene, 'y', drawn.y, drawn.y + drawn.height, area.height / factor);
  const columns = xs.length - 1;
  const rows = ys.length - 1;
  return Array.from({ length: rows * columns }, (_, i): Sheet => {
    const column = i % columns;
    const row = Math.floor(i / columns);
    return {
      kind,
      scene,
      factor,
      scale: name,
      window: { x: xs[column]!, y: ys[row]!, width: xs[column + 1]! - xs[column]!, height: ys[row + 1]! - ys[row]! },
      joins: [
        ...(column > 0 ? [{ edge: 'left' as const, to: i - 1 }] : []),
        ...(column < columns - 1 ? [{ edge: 'right' as const, to: i + 1 }] : []),
        ...(row > 0 ? [{ edge: 'top' as const, to: i - columns }] : []),
        ...(row < rows - 1 ? [{ edge: 'bottom' as const, to: i + columns }] : []),
      ],
    };
  });
}

/** Match marks: the edge at which the drawing goes on, the sheet it goes on to, a mark at each run that passes. */
function matchMarks(sheet: Sheet, origin: { x: number; y: number }, numberOf: (to: number) => number): Mark[] {
  const { window: w, factor, scene } = sheet;
  const toPaper = (x: number, y: number) => ({
    x: Math.round(origin.x + (x - w.x) * factor),
    y: Math.round(origin.y + (y - w.y) * factor),
  });
  return sheet.joins.flatMap(({ edge, to }): Mark[] => {
    const upright = edge === 'left' || edge === 'right';
    const at = edge === 'left' ? w.x : edge === 'right' ? w.x + w.width : edge === 'top' ? w.y : w.y + w.height;
    const [a, b] = upright
      ? [toPaper(at, w.y), toPaper(at, w.y + w.height)]
      : [toPaper(w.x, at), toPaper(w.x + w.width, at)];
    const inside = (p: { x: number; y: number }) =>
      upright ? p.y > w.y && p.y < w.y + w.height : p.x > w.x && p.x < w.x + w.width;
    const ticks = crossingsAt(scene, upright ? 'x' : 'y', at)
      .filter(inside)
      .map((p) => toPaper(p.x, p.y));
    const words = `match line, goes on at sheet ${numberOf(to)}`;
    const middle = { x: (a.x + b.x) / 2, y: (a.y + b.y) / 2 };
    return [
      { kind: 'path', d: `M${a.x} ${a.y}L${b.x} ${b.y}`, stroke: light.grey, width: 25, dash: [400, 150], cap: 'butt' },
      ...ticks.map((p): Mark => ({
        kind: 'path',
        d: `M${p.x - 90} ${p.y - 90}L${p.x + 90} ${p.y + 90}M${p.x + 90} ${p.y - 90}L${p.x - 90} ${p.y + 90}`,
        stroke: light.grey,
        width: 25,
      })),
      upright
        ? {
            kind: 'text',
            x: middle.x + (edge === 'left' ? -90 : 270),
            y: middle.y,
            text: words,
            size: 180,
            colour: light.grey,
            anchor: 'middle',
            turn: 3,
          }
        : {
            kind: 'text',
            x: middle.x,
            y: middle.y + (edge === 'top' ? -90 : 270),
            text: words,
            size: 180,
            colour: light.grey,
            anchor: 'middle',
          },
    ];
  });
}

/** All sheets, in order. Pure: the same drawing and options give the same pages. */
export function sheetPages(doc: Installation, options: SheetOptions): Page[] {
  const frame = frameOf(options.paper);
  const area = drawingArea(options.paper);
  const drawings = scenesOf(doc, options).map(({ kind, scene }) => sheetsOf(kind, scene, area));
  const all = drawings.flat();
  const scenes = [...new Set(all.map((sheet) => sheet.scene))];
  const withLegend = needsLegendSheet(scenes, frame) || (options.findings?.length ?? 0) > 3;
  const sheets = all.length + (withLegend ? 1 : 0);
  const size = paperSize(options.paper);
  let before = 0;
  const pages = drawings.flatMap((list) => {
    const first = before + 1;
    before += list.length;
    return list.map((sheet, i): Page => {
      const { window: w, factor } = sheet;
      const origin = {
        x: Math.round(area.x + (area.width - w.width * factor) / 2),
        y: Math.round(area.y + (area.height - w.height * factor) / 2),
      };
      const place = { kind: sheet.kind, sheet: first + i, sheets, scale: sheet.scale };
      return {
        ...size,
        groups: [
          { x: 0, y: 0, scale: 1, marks: borderMarks(options.paper) },
          {
            x: Math.round(origin.x - w.x * factor),
            y: Math.round(origin.y - w.y * factor),
            scale: factor,
            clip: w,
            marks: [],
            groups: sceneGroups(sheet.scene),
          },
          { x: 0, y: 0, scale: 1, marks: matchMarks(sheet, origin, (to) => first + to) },
          {
            x: 0,
            y: 0,
            scale: 1,
            marks: [
              ...checkLine(frame.x + PAD, frame.y + frame.height - TITLE_HEIGHT - LINE / 2),
              ...titleBlockMarks(doc, options.title, place, frame),
            ],
          },
          ...strip(options, [sheet.scene], frame, withLegend),
        ],
      };
    });
  });
  return withLegend ? [...pages, legendSheet(doc, options, scenes, sheets)] : pages;
}
