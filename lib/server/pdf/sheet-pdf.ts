import 'server-only';
import PDFDocument from 'pdfkit';
import type { Installation } from '@/diagram/document/schema';
import { outlinedPage } from '@/diagram/paper/outlines';
import { planPages } from '@/diagram/paper/plan-pages';
import type { Page } from '@/diagram/paper/primitives';
import { sheetPages, type SheetOptions } from '@/diagram/paper/sheet';
import type { SheetTitle } from '@/diagram/paper/title-block';
import { drawPage, type Pictures } from './draw-page';
import { registerFonts } from './fonts';
import { glyphs } from './glyphs';

/** The drawing as PDF at true ISO size: vector strokes and text in the shipped lettering, the same bytes for the same drawing. */

export interface SheetPdfInput extends SheetOptions {
  document: Installation;
  /** letters as shapes instead of text */
  outlines?: boolean;
}

/** Points to 1/100 mm. */
export const POINTS = 72 / 2540;

/** Noon of the day on which the drawing last changed: no clock is read, so that printing again gives the same file. */
function dated(drawnOn: string): Date {
  const date = new Date(`${drawnOn.slice(0, 10)}T12:00:00Z`);
  return Number.isNaN(date.getTime()) ? new Date('2000-01-01T12:00:00Z') : date;
}

/** All sheets of a drawing as one PDF. */
export const sheetPdf = ({ document, outlines = false, ...options }: SheetPdfInput): Promise<Buffer> =>
  pagesPdf(sheetPages(document, options), options.title, { outlines });

export interface PlanPdfInput extends SheetPdfInput {
  /** id of one plan; all storeys where left out */
  plan?: string;
  pictures: Pictures;
}

/** The plans of the storeys as one PDF, each over its picture. */
export const planPdf = ({ document, outlines = false, pictures, ...options }: PlanPdfInput): Promise<Buffer> =>
  pagesPdf(planPages(document, options), options.title, { outlines, pictures });

async function pagesPdf(
  pages: readonly Page[],
  title: SheetTitle,
  { outlines, pictures }: { outlines: boolean; pictures?: Pictures },
): Promise<Buffer> {
  const pdf = new PDFDocument({
    autoFirstPage: false,
    compress: true,
    info: {
      Title: `${title.number} ${title.title}`,
      Author: `${title.drawnBy}, ${title.team}`,
      Subject: `Revision ${title.revision}, ${title.state}`,
      Creator: 'Ohmstead',
      Producer: 'Ohmstead',
      CreationDate: dated(title.drawnOn),
      ModDate: dated(title.drawnOn),
    },
  });
  const chunks: Buffer[] = [];
  const done = new Promise<Buffer>((resolve, reject) => {
    pdf.on('data', (chunk: Buffer) => chunks.push(chunk));
    pdf.on('end', () => resolve(Buffer.concat(chunks)));
    pdf.on('error', reject);
  });
  registerFonts(pdf);
  for (const page of pages) {
    pdf.addPage({ size: [page.width * POINTS, page.height * POINTS], margin: 0 });
    pdf.save().scale(POINTS);
    drawPage(pdf, outlines ? outlinedPage(page, glyphs) : page, pictures);
    pdf.restore();
  }
  pdf.end();
  return done;
}
