import { light } from '../symbols/palette';
import type { Mark } from './primitives';

/** Sheets of ISO 216 in landscape, with the border, filing margin, grid and centring marks of ISO 5457 (from memory). */

export type PaperSize = 'A4' | 'A3' | 'A2' | 'A1';
export const PAPER_SIZES: readonly PaperSize[] = ['A4', 'A3', 'A2', 'A1'];

/** 1/100 mm, landscape */
const SIZES: Record<PaperSize, { width: number; height: number; columns: number; rows: number }> = {
  A4: { width: 29700, height: 21000, columns: 6, rows: 4 },
  A3: { width: 42000, height: 29700, columns: 8, rows: 6 },
  A2: { width: 59400, height: 42000, columns: 12, rows: 8 },
  A1: { width: 84100, height: 59400, columns: 16, rows: 12 },
};

/** Left for filing, and all round. */
const FILING = 2000;
const MARGIN = 1000;
/** Width of the strip with the grid's letters. */
const GRID = 500;
/** Grid letters leave out I and O, which read as figures. */
const LETTERS = 'ABCDEFGHJKLMNPQRSTUVWXYZ';

export interface Area {
  x: number;
  y: number;
  width: number;
  height: number;
}

export const paperSize = (paper: PaperSize): { width: number; height: number } => ({
  width: SIZES[paper].width,
  height: SIZES[paper].height,
});

/** Inside the frame. */
export function frameOf(paper: PaperSize): Area {
  const { width, height } = SIZES[paper];
  return { x: FILING, y: MARGIN, width: width - FILING - MARGIN, height: height - 2 * MARGIN };
}

const rect = ({ x, y, width, height }: Area): string => `M${x} ${y}H${x + width}V${y + height}H${x}Z`;

/** Frame, grid with its letters, and the four centring marks. */
export function borderMarks(paper: PaperSize): Mark[] {
  const { width, height, columns, rows } = SIZES[paper];
  const frame = frameOf(paper);
  const outer = {
    x: frame.x - GRID,
    y: frame.y - GRID,
    width: frame.width + 2 * GRID,
    height: frame.height + 2 * GRID,
  };
  const marks: Mark[] = [
    { kind: 'path', d: rect(outer), stroke: light.rule, width: 18 },
    { kind: 'path', d: rect(frame), stroke: light.ink, width: 70 },
  ];
  const label = (x: number, y: number, text: string) =>
    marks.push({ kind: 'text', x, y: y + 125, text, size: 250, colour: light.grey, anchor: 'middle' });
  const line = (d: string) => marks.push({ kind: 'path', d, stroke: light.rule, width: 18 });
  for (let i = 0; i < columns; i++) {
    const x = frame.x + (frame.width * (i + 0.5)) / columns;
    label(x, frame.y - GRID / 2, String(i + 1));
    label(x, frame.y + frame.height + GRID / 2, String(i + 1));
    const edge = Math.round(frame.x + (frame.width * i) / columns);
    if (i > 0) line(`M${edge} ${outer.y}V${frame.y}M${edge} ${frame.y + frame.height}V${outer.y + outer.height}`);
  }
  for (let i = 0; i < rows; i++) {
    const y = frame.y + (frame.height * (i + 0.5)) / rows;
    label(frame.x - GRID / 2, y, LETTERS[i]!);
    label(frame.x + frame.width + GRID / 2, y, LETTERS[i]!);
    const edge = Math.round(frame.y + (frame.height * i) / rows);
    if (i > 0) line(`M${outer.x} ${edge}H${frame.x}M${frame.x + frame.width} ${edge}H${outer.x + outer.width}`);
  }
  const middle = { x: frame.x + frame.width / 2, y: frame.y + frame.height / 2 };
  const centring = `M${middle.x} ${frame.y - GRID}V${frame.y + 500}M${middle.x} ${frame.y + frame.height + GRID}V${frame.y + frame.height - 500}M${frame.x - GRID} ${middle.y}H${frame.x + 500}M${frame.x + frame.width + GRID} ${middle.y}H${frame.x + frame.width - 500}`;
  marks.push({ kind: 'path', d: centring, stroke: light.ink, width: 70, cap: 'butt' });
  return [{ kind: 'path', d: rect({ x: 0, y: 0, width, height }), fill: light.paper }, ...marks];
}
