import { fileAnswer, fileName } from '@/lib/server/drawings/file-answer';
import { readFile } from '@/lib/server/drawings/open-drawing';
import { route } from '@/lib/server/route';
import { DrawingParams } from '@/lib/shared/drawings';

/**
 * GET /api/drawings/:drawingId/json answers the document as the interchange file; of one that cannot be read whole, what
 * is stored of it.
 */
export const GET = route({ params: DrawingParams, costly: true }, async ({ actor, params }) => {
  const { text, titleBlock } = await readFile(actor, params);
  return fileAnswer(text, 'application/json', fileName(titleBlock, 'json'));
});
