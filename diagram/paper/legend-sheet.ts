import type { Installation } from '../document/schema';
import type { Scene } from '../layout/scene';
import { light } from '../symbols/palette';
import { borderMarks, frameOf, paperSize } from './iso-sheet';
import { legendMarks } from './legend';
import type { Mark, Page } from './primitives';
import { LINE, PAD, drawingArea, type SheetOptions } from './sheet-options';
import { checkLine, findingsText, rank } from './sheet-strip';
import { TITLE_HEIGHT, clipped, titleBlockMarks } from './title-block';

/** The whole legend, and every finding in full. */
export function legendSheet(doc: Installation, options: SheetOptions, scenes: readonly Scene[], sheets: number): Page {
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
  findings.slice(0, most).forEach((finding, i) =>
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
