import { paperSvg } from '@/diagram/paper/svg';
import { fileAnswer, fileName } from '@/lib/server/drawings/file-answer';
import { sheetToPrint } from '@/lib/server/drawings/sheet-to-print';
import { svgFonts } from '@/lib/server/drawings/svg-fonts';
import { glyphs } from '@/lib/server/pdf/glyphs';
import { route } from '@/lib/server/route';
import { DrawingParams, SheetQuerySchema } from '@/lib/shared/drawings';

/** GET /api/drawings/:drawingId/svg?face=&paper=&place=&sheet=&lettering= answers one sheet, its lettering carried in the file. */
export const GET = route(
  { params: DrawingParams, query: SheetQuerySchema, costly: true },
  async ({ actor, params, query }) => {
    const { document, titleBlock, options } = await sheetToPrint(actor, params.drawingId, query);
    const lettering = query.lettering === 'outlines' ? { glyphs } : { fonts: await svgFonts() };
    const svg = paperSvg(document, { ...options, sheet: query.sheet, ...lettering });
    return fileAnswer(svg, 'image/svg+xml', fileName(titleBlock, 'svg'));
  },
);
