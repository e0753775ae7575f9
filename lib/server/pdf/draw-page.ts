import 'server-only';
import type PDFDocument from 'pdfkit';
import { fontSizeOf, letterSpacing, type Group, type Mark, type Page, type TextMark } from '@/diagram/paper/primitives';
import { ADVANCE } from '@/diagram/layout/lettering';
import { fontName, isJoined, runsFromRight, runsOf, type Run } from './fonts';

type Pdf = InstanceType<typeof PDFDocument>;

/** JPEGs by the name that a page calls them. */
export type Pictures = ReadonlyMap<string, Buffer>;
const NO_PICTURES: Pictures = new Map();

/** Draws the marks of a page. The unit of the PDF is 1/100 mm here; widths of strokes do not shrink with a group. */
export function drawPage(pdf: Pdf, page: Page, pictures: Pictures = NO_PICTURES): void {
  for (const group of page.groups) drawGroup(pdf, group, 1, pictures);
}

function drawGroup(pdf: Pdf, group: Group, outer: number, pictures: Pictures): void {
  const scale = outer * group.scale;
  pdf.save();
  pdf.translate(group.x, group.y);
  if (group.scale !== 1) pdf.scale(group.scale);
  if (group.turn) pdf.rotate(90 * group.turn);
  if (group.clip) pdf.rect(group.clip.x, group.clip.y, group.clip.width, group.clip.height).clip();
  const picture = group.picture && pictures.get(group.picture.name);
  if (picture) pdf.image(picture, 0, 0, { width: group.picture!.width, height: group.picture!.height });
  for (const mark of group.marks) drawMark(pdf, mark, scale);
  for (const child of group.groups ?? []) drawGroup(pdf, child, scale, pictures);
  pdf.restore();
}

function drawMark(pdf: Pdf, mark: Mark, scale: number): void {
  if (mark.kind === 'text') return drawText(pdf, mark);
  pdf.path(mark.d);
  if (mark.stroke) {
    pdf
      .lineWidth((mark.width ?? 25) / scale)
      .lineCap(mark.cap ?? 'round')
      .lineJoin('round')
      .strokeColor(mark.stroke);
    if (mark.dash) pdf.dash(mark.dash[0] / scale, { space: mark.dash[1] / scale });
    else pdf.undash();
  }
  if (mark.fill) pdf.fillColor(mark.fill);
  if (mark.fill && mark.stroke) pdf.fillAndStroke();
  else if (mark.fill) pdf.fill();
  else if (mark.stroke) pdf.stroke();
}

/** Ligatures off: `!=` and `->` stay two signs, as on the screen. The type of the package knows only the list form, which cannot switch off. */
const PLAIN = { calt: false, liga: false, clig: false } as unknown as PDFKit.Mixins.TextOptions['features'];

const SET = { lineBreak: false, baseline: 'alphabetic', features: PLAIN } as const;

/** A run that is set whole: narrowed where it is wider than its room, and from the side from which it is read. */
function drawJoined(pdf: Pdf, run: Run, at: number, room: number): void {
  const width = pdf.widthOfString(run.text, { features: PLAIN });
  const narrowed = Math.min(1, room / width);
  const x = runsFromRight(run.script) ? at + room - width * narrowed : at;
  // The package knows how to narrow a text, its types do not.
  pdf.text(run.text, x, 0, { ...SET, horizontalScaling: 100 * narrowed } as PDFKit.Mixins.TextOptions);
}

/** Text by its own metric, in runs of one script. */
function drawText(pdf: Pdf, mark: TextMark): void {
  const spacing = letterSpacing(mark);
  const size = fontSizeOf(mark);
  const advance = ADVANCE * size + spacing;
  const runs = runsOf(mark.text);
  const width = [...mark.text].length * advance;
  const left = mark.anchor === 'middle' ? -width / 2 : mark.anchor === 'end' ? -width : 0;
  pdf.save();
  pdf.translate(mark.x, mark.y);
  if (mark.turn) pdf.rotate(90 * mark.turn);
  pdf.fontSize(size).fillColor(mark.colour);
  for (const run of runs) {
    pdf.font(fontName(run.script, mark.bold ?? false));
    const at = left + run.offset * advance;
    if (isJoined(run.script)) drawJoined(pdf, run, at, [...run.text].length * advance);
    else pdf.text(run.text, at, 0, { ...SET, characterSpacing: spacing });
  }
  pdf.restore();
}
