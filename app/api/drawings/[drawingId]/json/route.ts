import { fileAnswer, fileName } from '@/lib/server/drawings/file-answer';
import { openDrawing } from '@/lib/server/drawings/open-drawing';
import { route } from '@/lib/server/route';
import { DrawingParams } from '@/lib/shared/drawings';

/** GET /api/drawings/:drawingId/json answers the document as the interchange file. */
export const GET = route({ params: DrawingParams, costly: true }, async ({ actor, params }) => {
  const { document, titleBlock } = await openDrawing(actor, params);
  return fileAnswer(`${JSON.stringify(document, null, 2)}\n`, 'application/json', fileName(titleBlock, 'json'));
});
