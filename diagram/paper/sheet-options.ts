import { frameOf, type Area, type PaperSize } from './iso-sheet';
import { TITLE_HEIGHT, type SheetTitle } from './title-block';

/** What is asked of the paper sheets, and how a sheet is divided. */

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

/** Between the frame and the drawing. */
export const PAD = 200;
/** The line above the title block: check line and findings. */
export const LINE = 700;

/** What the drawing itself may fill. */
export function drawingArea(paper: PaperSize): Area {
  const frame = frameOf(paper);
  return {
    x: frame.x + PAD,
    y: frame.y + PAD,
    width: frame.width - 2 * PAD,
    height: frame.height - TITLE_HEIGHT - LINE - 2 * PAD,
  };
}
