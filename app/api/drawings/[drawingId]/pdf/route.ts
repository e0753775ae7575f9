import { fileAnswer, fileName } from '@/lib/server/drawings/file-answer';
import { plansToPrint } from '@/lib/server/drawings/plans-to-print';
import { sheetToPrint } from '@/lib/server/drawings/sheet-to-print';
import { planPdf, sheetPdf } from '@/lib/server/pdf/sheet-pdf';
import { route } from '@/lib/server/route';
import { DrawingParams, PdfQuerySchema } from '@/lib/shared/drawings';

/**
 * GET /api/drawings/:drawingId/pdf?face=&paper=&place=&storey=&lettering= answers the sheets of a face, or the plans of
 * the storeys, at true paper size.
 */
export const GET = route(
  { params: DrawingParams, query: PdfQuerySchema, costly: true },
  async ({ actor, params, query: { face, ...query } }) => {
    const outlines = query.lettering === 'outlines';
    if (face === 'plan') {
      const { titleBlock, ...plans } = await plansToPrint(actor, params.drawingId, query);
      const pdf = await planPdf({ ...plans, outlines });
      return fileAnswer(new Uint8Array(pdf), 'application/pdf', fileName(titleBlock, 'pdf', 'plan'));
    }
    const { document, titleBlock, options } = await sheetToPrint(actor, params.drawingId, { ...query, face });
    const pdf = await sheetPdf({ document, ...options, outlines });
    return fileAnswer(new Uint8Array(pdf), 'application/pdf', fileName(titleBlock, 'pdf'));
  },
);
