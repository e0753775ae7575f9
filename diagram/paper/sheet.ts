import type { Installation } from '../document/schema';
import { buildScene } from '../layout/build-scene';
import { connectionPages } from '../layout/connections-page';
import type { Scene } from '../layout/scene';
import { light } from '../symbols/palette';
import { sceneGroups } from './draw-scene';
import { borderMarks, frameOf, paperSize, type Area, type PaperSize } from './iso-sheet';
import { legendMarks } from './legend';
import type { Group, Mark, Page } from './primitives';
import { contentOf, crossingsAt, cuts } from './split';
import { TITLE_HEIGHT, TITLE_WIDTH, clipped, titleBlockMarks, type SheetTitle } from './title-block';

/** The paper sheets of a drawing: true ISO size, border, title block, legend, findings, check line, and the drawing itself. */

export interface SheetFinding {
  severity: 'danger' | 'defect' | 'advice';
  heading: string;
}

export interface SheetOptions {
  paper: PaperSize;
  title: SheetTitle;
  /** `all`: the overview and every page of the connections; the overview where left out */
  face?: 'overview' | 'connections' | 'all';
  /** id of the place, for one page of the connections */
  place?: string;
  findings?: readonly SheetFinding[];
}

/** Drawing scales, full size first; at the smaller one the small lettering is still 1.8 mm high. */
const SCALES = [
  { factor: 1, name: '1:1' },
  { factor: 0.8, name: '1:1.25' },
] as const;
/** Between the frame and the drawing. */
const PAD = 200;
/** The line above the title block: check line and findings. */
const LINE = 700;

interface Sheet {
  kind: string;
  scene: Scene;
  window: Area;
  factor: number;
  scale: string;
  /** edges at which the drawing goes on: index of the sheet it goes on to, within the drawing */
  joins: { edge: 'left' | 'right' | 'top' | 'bottom'; to: number }[];
}

function drawingArea(paper: PaperSize): Area {
  const frame = frameOf(paper);
  return {
    x: frame.x + PAD,
    y: frame.y + PAD,
    width: frame.width - 2 * PAD,
    height: frame.height - TITLE_HEIGHT - LINE - 2 * PAD,
  };
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

/** A line of exactly 100 mm, so that whoever prints can see whether the print was scaled. */
export const CHECK_LINE = 10_000;

function checkLine(x: number, y: number): Mark[] {
  return [
    {
      kind: 'path',
      d: `M${x} ${y}H${x + CHECK_LINE}M${x} ${y - 150}V${y + 150}M${x + CHECK_LINE} ${y - 150}V${y + 150}M${x + CHECK_LINE / 2} ${y - 90}V${y + 90}`,
      stroke: light.ink,
      width: 25,
      cap: 'butt',
    },
    {
      kind: 'text',
      x: x + CHECK_LINE + 250,
      y: y + 90,
      text: '100 mm: if not, the print was scaled',
      size: 180,
      colour: light.grey,
    },
  ];
}

const counted = (n: number, one: string, many: string): string => `${n} ${n === 1 ? one : many}`;

/** "3 findings: 1 danger, 2 advice", and the first headings. */
export function findingsText(findings: readonly SheetFinding[] | undefined): string {
  if (!findings) return 'not examined';
  if (findings.length === 0) return 'no finding';
  const of = (severity: SheetFinding['severity']) => findings.filter((finding) => finding.severity === severity).length;
  const parts = [
    of('danger') > 0 && counted(of('danger'), 'danger', 'dangers'),
    of('defect') > 0 && counted(of('defect'), 'defect', 'defects'),
    of('advice') > 0 && `${of('advice')} advice`,
  ].filter(Boolean);
  return `${counted(findings.length, 'finding', 'findings')}: ${parts.join(', ')}`;
}

const rank = { danger: 0, defect: 1, advice: 2 } as const;

/** The strip left of the title block: findings, then the legend. */
function strip(options: SheetOptions, scenes: readonly Scene[], frame: Area, hasLegendSheet: boolean): Group[] {
  const area = {
    x: frame.x + PAD,
    y: frame.y + frame.height - TITLE_HEIGHT + 150,
    width: frame.width - TITLE_WIDTH - 2 * PAD,
    height: TITLE_HEIGHT - 200,
  };
  const marks: Mark[] = [];
  const findings = [...(options.findings ?? [])].sort((a, b) => rank[a.severity] - rank[b.severity]);
  const y = frame.y + frame.height - TITLE_HEIGHT - LINE / 2 + 90;
  const x = frame.x + PAD + CHECK_LINE + 6400;
  const room = frame.x + frame.width - PAD - x;
  const headings = findings.slice(0, 3).map((finding) => finding.heading);
  const words = [findingsText(options.findings), ...headings].join('. ');
  marks.push({
    kind: 'text',
    x,
    y,
    text: clipped(words, 180, room),
    size: 180,
    colour: light.ink,
    bold: findings.some((f) => f.severity !== 'advice'),
  });
  const rows = hasLegendSheet ? { ...area, height: area.height - 600 } : area;
  const legend = legendMarks(scenes, rows);
  if (legend.left > 0)
    marks.push({
      kind: 'text',
      x: area.x,
      y: area.y + area.height - 120,
      text: `${legend.left} more on the last sheet`,
      size: 180,
      colour: light.grey,
    });
  return [...legend.groups, { x: 0, y: 0, scale: 1, marks }];
}

/** True where the strip cannot hold the whole legend of these scenes. */
function needsLegendSheet(scenes: readonly Scene[], frame: Area): boolean {
  return (
    legendMarks(scenes, { x: 0, y: 0, width: frame.width - TITLE_WIDTH - 2 * PAD, height: TITLE_HEIGHT - 200 }).left > 0
  );
}

/** All sheets, in order. Pure: the same drawing and options give the same pages. */
export function sheetPages(doc: Installation, options: SheetOptions): Page[] {
  const frame = frameOf(options.paper);
  const area = drawingArea(options.paper);
  const drawings = scenesOf(doc, options).map(({ kind, scene }) => sheetsOf(kind, scene, area));
  const all = drawings.flat();
  const scenes = [...new Set(all.map((sheet) => sheet.scene))];
  const legendSheet = needsLegendSheet(scenes, frame) || (options.findings?.length ?? 0) > 3;
  const sheets = all.length + (legendSheet ? 1 : 0);
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
          ...strip(options, [sheet.scene], frame, legendSheet),
        ],
      };
    });
  });
  return legendSheet ? [...pages, lastSheet(doc, options, scenes, sheets)] : pages;
}

/** The whole legend, and every finding in full. */
function lastSheet(doc: Installation, options: SheetOptions, scenes: readonly Scene[], sheets: number): Page {
  const frame = frameOf(options.paper);
  const area = drawingArea(options.paper);
  const half = Math.floor((area.width - 1000) / 2);
  const marks: Mark[] = [
    { kind: 'text', x: area.x, y: area.y + 350, text: 'SYMBOLS', size: 250, colour: light.grey, spaced: true },
    {
      kind: 'text',
      x: area.x + half + 1000,
      y: area.y + 350,
      text: 'FINDINGS',
      size: 250,
      colour: light.grey,
      spaced: true,
    },
  ];
  const findings = [...(options.findings ?? [])].sort((a, b) => rank[a.severity] - rank[b.severity]);
  const most = Math.floor((area.height - 1500) / 420);
  marks.push({
    kind: 'text',
    x: area.x + half + 1000,
    y: area.y + 950,
    text: findingsText(options.findings),
    size: 250,
    colour: light.ink,
    bold: true,
  });
  findings
    .slice(0, most)
    .forEach((finding, i) =>
      marks.push({
        kind: 'text',
        x: area.x + half + 1000,
        y: area.y + 1450 + 420 * i,
        text: clipped(`${finding.severity.padEnd(7)} ${finding.heading}`, 225, half),
        size: 225,
        colour: light.ink,
      }),
    );
  if (findings.length > most)
    marks.push({
      kind: 'text',
      x: area.x + half + 1000,
      y: area.y + 1450 + 420 * most,
      text: `and ${findings.length - most} more`,
      size: 225,
      colour: light.grey,
    });
  const place = { kind: 'Legend and findings', sheet: sheets, sheets, scale: '-' };
  const legend = legendMarks(scenes, { x: area.x, y: area.y + 700, width: half, height: area.height - 800 });
  return {
    ...paperSize(options.paper),
    groups: [
      { x: 0, y: 0, scale: 1, marks: borderMarks(options.paper) },
      ...legend.groups,
      {
        x: 0,
        y: 0,
        scale: 1,
        marks: [
          ...marks,
          ...checkLine(frame.x + PAD, frame.y + frame.height - TITLE_HEIGHT - LINE / 2),
          ...titleBlockMarks(doc, options.title, place, frame),
        ],
      },
    ],
  };
}
