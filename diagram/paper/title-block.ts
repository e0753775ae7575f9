import { breakLines, textWidth } from '../layout/lettering';
import type { Installation } from '../document/schema';
import { supplyText } from '../layout/wording';
import { light } from '../symbols/palette';
import type { Area } from './iso-sheet';
import type { Mark } from './primitives';

/** The title block at the lower right, after ISO 7200 (from memory): who, what, which revision, and the cautions. */

export interface SheetTitle {
  number: string;
  title: string;
  client: string;
  address: string;
  team: string;
  drawnBy: string;
  /** ISO date */
  drawnOn: string;
  checkedBy: string | null;
  /** letter, or "-" */
  revision: string;
  /** "for review", "issued" */
  state: string;
}

export interface SheetPlace {
  /** "Overview, single line" */
  kind: string;
  /** of this sheet, from 1 */
  sheet: number;
  sheets: number;
  /** "1:1" */
  scale: string;
}

/** What every sheet of paper says, in the product's own words. */
export const CAUTIONS =
  'Design aid, not a permission. Isolate every source, lock off, prove dead before work. Work on fixed wiring only by a licensed person under local code. Battery terminals are never dead. A backup source keeps circuits live after the main switch is off. Values are to be verified by test.';

export const TITLE_WIDTH = 18000;
export const TITLE_HEIGHT = 3800;
const ROW = 900;
const LABEL = 180;
const VALUE = 250;

interface Cell {
  label: string;
  value: string;
  width: number;
  bold?: boolean;
}

/** A text cut to a width, with an ellipsis where something is left out. */
export function clipped(text: string, size: number, width: number): string {
  if (textWidth(text, size) <= width) return text;
  let cut = [...text];
  while (cut.length > 1 && textWidth(`${cut.join('')}…`, size) > width) cut = cut.slice(0, -1);
  return `${cut.join('').trimEnd()}…`;
}

const PRACTICE = { IEC: 'IEC', IN: 'IN (India)', GB: 'GB (United Kingdom)' } as const;

/** The marks of the block; its lower right corner is that of the frame. */
export function titleBlockMarks(doc: Installation, title: SheetTitle, place: SheetPlace, frame: Area): Mark[] {
  const x = frame.x + frame.width - TITLE_WIDTH;
  const y = frame.y + frame.height - TITLE_HEIGHT;
  const rows: Cell[][] = [
    [
      { label: place.kind, value: title.title, width: 8000, bold: true },
      { label: 'Number', value: title.number, width: 2800, bold: true },
      { label: 'Revision', value: title.revision, width: 2000, bold: true },
      { label: 'Sheet', value: `${place.sheet} / ${place.sheets}`, width: 2200, bold: true },
      { label: 'State', value: title.state, width: 3000, bold: true },
    ],
    [
      { label: 'Client', value: title.client, width: 5500 },
      { label: 'Address', value: title.address, width: 7500 },
      { label: 'Team', value: title.team, width: 5000 },
    ],
    [
      { label: 'Drawn', value: `${title.drawnBy} ${title.drawnOn}`, width: 5500 },
      { label: 'Checked', value: title.checkedBy ?? '-', width: 3000 },
      { label: `Practice ${PRACTICE[doc.practice]}`, value: supplyText(doc), width: 4500 },
      { label: 'Scale', value: place.scale, width: 2000 },
      { label: 'Drawn with', value: 'Ohmstead', width: 3000 },
    ],
  ];
  const marks: Mark[] = [
    {
      kind: 'path',
      d: `M${x} ${y}H${x + TITLE_WIDTH}V${y + TITLE_HEIGHT}H${x}Z`,
      stroke: light.ink,
      width: 50,
      fill: light.paper,
    },
  ];
  rows.forEach((cells, i) => {
    const top = y + ROW * i;
    let left = x;
    cells.forEach((cell, n) => {
      marks.push({
        kind: 'text',
        x: left + 150,
        y: top + 300,
        text: clipped(cell.label, LABEL, cell.width - 250),
        size: LABEL,
        colour: light.grey,
      });
      marks.push({
        kind: 'text',
        x: left + 150,
        y: top + 720,
        text: clipped(cell.value, VALUE, cell.width - 250),
        size: VALUE,
        colour: light.ink,
        ...(cell.bold && { bold: true }),
      });
      left += cell.width;
      if (n < cells.length - 1)
        marks.push({ kind: 'path', d: `M${left} ${top}V${top + ROW}`, stroke: light.ink, width: 18 });
    });
    marks.push({
      kind: 'path',
      d: `M${x} ${top + ROW}H${x + TITLE_WIDTH}`,
      stroke: light.ink,
      width: i === 0 ? 35 : 18,
    });
  });
  breakLines(CAUTIONS, LABEL, TITLE_WIDTH - 300).forEach((text, i) =>
    marks.push({ kind: 'text', x: x + 150, y: y + 3 * ROW + 310 + 295 * i, text, size: LABEL, colour: light.ink }),
  );
  return marks;
}
