import { fileAnswer, fileName } from '@/lib/server/drawings/file-answer';
import { scheduleCsv } from '@/lib/server/drawings/schedule-csv';
import { route } from '@/lib/server/route';
import { DrawingParams, TableQuerySchema } from '@/lib/shared/drawings';

/** GET /api/drawings/:drawingId/csv?table= answers one table of the schedules as RFC 4180 text. */
export const GET = route(
  { params: DrawingParams, query: TableQuerySchema, costly: true },
  async ({ actor, params, query }) => {
    const { text, titleBlock } = await scheduleCsv(actor, params.drawingId, query.table);
    return fileAnswer(text, 'text/csv; charset=utf-8', fileName(titleBlock, 'csv', query.table));
  },
);
