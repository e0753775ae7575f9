import { BODY, SMALL, textDescent, textWidth } from './lettering';
import type { Box } from './route-grid';
import type { Point, SceneText } from './scene';

/** The label placer: every text of a face finds a place where it lies on no other text, part, wire or frame. */

export interface Span {
  text: string;
  bold?: boolean;
  tone?: 'ink' | 'grey';
}

/** A few lines that belong together, and where they may stand: the best place first. */
export interface Label {
  /** whose label it is: labels are placed in this order, so that the result does not depend on the order of parts */
  owner: string;
  lines: readonly (readonly Span[])[];
  size: number;
  places: readonly Anchor[];
  /** letters set apart, as in the names of rooms */
  spaced?: boolean;
  /** left out where none of its places is free: it is written elsewhere too */
  optional?: boolean;
  /** 1/100 mm kept free round it; a single sign needs less than a line of words */
  clear?: number;
}

/** A place: a point of the block's edge, and which point of the block stands there. */
export interface Anchor extends Point {
  horizontal: 'start' | 'middle' | 'end';
  /** which edge of the block lies at y */
  vertical: 'top' | 'middle' | 'bottom';
}

/** Line pitch as a share of the capitals' height. */
const LEADING = 1.6;
/** 1/100 mm kept free round a text. */
const CLEAR = 80;
const CELL = 2000;
/** How far a label may stray when all its places are taken, in steps of a line. */
const STRAYS = [1, 2, 3, 4, 6, 8] as const;

const lineWidth = (spans: readonly Span[], size: number, spaced = false): number =>
  textWidth(spans.map((span) => span.text).join(' '), size, spaced);

export interface Block extends Box {
  label: Label;
  horizontal: Anchor['horizontal'];
}

/** The block of a label at a place. */
export function blockAt(label: Label, at: Anchor): Block {
  const width = Math.max(...label.lines.map((spans) => lineWidth(spans, label.size, label.spaced)));
  const height = Math.round(label.size * (1 + LEADING * (label.lines.length - 1))) + textDescent(label.size);
  const x = at.horizontal === 'start' ? at.x : at.horizontal === 'end' ? at.x - width : Math.round(at.x - width / 2);
  const y = at.vertical === 'top' ? at.y : at.vertical === 'bottom' ? at.y - height : Math.round(at.y - height / 2);
  return { x, y, width, height, label, horizontal: at.horizontal };
}

interface Taken extends Box {
  owner: string | undefined;
  /** number of the last question that met it */
  asked: number;
}

/** What stands on the sheet already, found by place. */
export class Ground {
  private readonly cells = new Map<number, Taken[]>();
  private question = 0;

  /** @param owner by which it can be left out of a question */
  add(box: Box, owner?: string): void {
    const taken: Taken = { x: box.x, y: box.y, width: box.width, height: box.height, owner, asked: 0 };
    const [left, right, top, bottom] = cellsOf(box.x, box.y, box.x + box.width, box.y + box.height);
    for (let column = left; column <= right; column++)
      for (let row = top; row <= bottom; row++) {
        const key = column * ROWS + row;
        const list = this.cells.get(key);
        if (list) list.push(taken);
        else this.cells.set(key, [taken]);
      }
  }

  /** Adds the stretches of a polyline, as thin boxes. */
  addPath(points: readonly Point[], half = 30, owner?: string): void {
    for (let i = 0; i + 1 < points.length; i++) {
      const [a, b] = [points[i]!, points[i + 1]!];
      this.add(
        {
          x: Math.min(a.x, b.x) - half,
          y: Math.min(a.y, b.y) - half,
          width: Math.abs(a.x - b.x) + 2 * half,
          height: Math.abs(a.y - b.y) + 2 * half,
        },
        owner,
      );
    }
  }

  /** Area of what lies under a box, kept clear all round; 0 where it is free. `except` is left out. */
  overlap(box: Box, clear = CLEAR, except?: string): number {
    const [x0, y0, x1, y1] = [box.x - clear, box.y - clear, box.x + box.width + clear, box.y + box.height + clear];
    const question = ++this.question;
    const [left, right, top, bottom] = cellsOf(x0, y0, x1, y1);
    let area = 0;
    for (let column = left; column <= right; column++)
      for (let row = top; row <= bottom; row++)
        for (const other of this.cells.get(column * ROWS + row) ?? []) {
          if (other.asked === question || (except !== undefined && other.owner === except)) continue;
          other.asked = question;
          const w = Math.min(x1, other.x + other.width) - Math.max(x0, other.x);
          const h = Math.min(y1, other.y + other.height) - Math.max(y0, other.y);
          if (w > 0 && h > 0) area += w * h;
        }
    return area;
  }
}

/** More than the rows of cells that positions can span. */
const ROWS = 1 << 20;
const cellsOf = (x0: number, y0: number, x1: number, y1: number): [number, number, number, number] => [
  Math.floor(x0 / CELL),
  Math.floor(x1 / CELL),
  Math.floor(y0 / CELL),
  Math.floor(y1 / CELL),
];

/** The texts of a block, ready to draw. */
export function blockTexts(block: Block): SceneText[] {
  const { label } = block;
  return label.lines.flatMap((spans, i) => {
    const width = lineWidth(spans, label.size, label.spaced);
    const free = block.width - width;
    let x = block.x + (block.horizontal === 'start' ? 0 : block.horizontal === 'end' ? free : Math.round(free / 2));
    const y = block.y + label.size + Math.round(label.size * LEADING * i);
    return spans.map((span): SceneText => {
      const at = x;
      x += textWidth(`${span.text} `, label.size, label.spaced);
      return {
        text: span.text,
        x: at,
        y,
        size: label.size,
        ...(span.bold && { bold: true }),
        ...(span.tone === 'grey' && { tone: 'grey' as const }),
        ...(label.spaced && { spaced: true }),
      };
    });
  });
}

/** Places a little further off than the given ones, nearest first. */
function* strays(places: readonly Anchor[], step: number): Generator<Anchor> {
  for (const far of STRAYS)
    for (const place of places)
      for (const [dx, dy] of [
        [0, -1],
        [0, 1],
        [1, 0],
        [-1, 0],
        [1, -1],
        [1, 1],
        [-1, -1],
        [-1, 1],
      ] as const)
        yield { ...place, x: place.x + dx * far * step, y: place.y + dy * far * step };
}

/**
 * Finds the first free place of a label and takes it.
 * @returns the block, or null where nothing near is free, even for the first line in small lettering
 */
export function placeLabel(ground: Ground, label: Label): Block | null {
  const lines = label.lines.filter((spans) => spans.some((span) => span.text !== ''));
  if (lines.length === 0) return null;
  const whole: Label = { ...label, lines };
  const tries: Label[] = [whole];
  if (label.size > SMALL) tries.push({ ...whole, size: SMALL });
  if (lines.length > 1) tries.push({ ...whole, size: Math.min(label.size, SMALL), lines: [lines[0]!] });
  for (const candidate of label.places) {
    const block = blockAt(whole, candidate);
    if (ground.overlap(block, label.clear) === 0) return take(ground, block);
  }
  if (label.optional) return null;
  for (const variant of tries)
    for (const candidate of strays(label.places, Math.round(BODY * 0.8))) {
      const block = blockAt(variant, candidate);
      if (ground.overlap(block, label.clear) === 0) return take(ground, block);
    }
  return null;
}

/** Places the first of several forms of a label that finds room; the last one may stray. */
export function placeOneOf(ground: Ground, labels: readonly Label[]): Block | null {
  for (const [i, label] of labels.entries()) {
    const block = placeLabel(ground, i < labels.length - 1 ? { ...label, optional: true } : label);
    if (block) return block;
  }
  return null;
}

function take(ground: Ground, block: Block): Block {
  ground.add(block);
  return block;
}
