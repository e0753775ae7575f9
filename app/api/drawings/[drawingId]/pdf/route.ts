import { fileAnswer, fileName } from '@/lib/server/drawings/file-answer';
import { sheetToPrint } from '@/lib/server/drawings/sheet-to-print';
import { sheetPdf } from '@/lib/server/pdf/sheet-pdf';
import { route } from '@/lib/server/route';
import { DrawingParams, SheetQuerySchema } from '@/lib/shared/drawings';

/** GET /api/drawings/:drawingId/pdf?face=&paper=&place=&lettering= answers the sheets of a face at true paper size. */
export const GET = route(
  { params: DrawingParams, query: SheetQuerySchema, costly: true },
  async ({ actor, params, query }) => {
    const { document, titleBlock, options } = await sheetToPrint(actor, params.drawingId, query);
    const pdf = await sheetPdf({ document, ...options, outlines: query.lettering === 'outlines' });
    return fileAnswer(new Uint8Array(pdf), 'application/pdf', fileName(titleBlock, 'pdf'));
  },
);
