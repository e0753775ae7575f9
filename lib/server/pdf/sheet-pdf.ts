import 'server-only';
import PDFDocument from 'pdfkit';
import type { Installation } from '@/diagram/document/schema';
import { outlinedPage } from '@/diagram/paper/outlines';
import { sheetPages, type SheetOptions } from '@/diagram/paper/sheet';
import { drawPage } from './draw-page';
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
export async function sheetPdf({ document, outlines = false, ...options }: SheetPdfInput): Promise<Buffer> {
  const pages = sheetPages(document, options);
  const { title } = options;
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
    drawPage(pdf, outlines ? outlinedPage(page, glyphs) : page);
    pdf.restore();
  }
  pdf.end();
  return done;
}
