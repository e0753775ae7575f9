import { z } from 'zod';
import { listChanges } from '@/lib/server/drawings/list-changes';
import { saveChange } from '@/lib/server/drawings/save-change';
import { route } from '@/lib/server/route';
import { ChangeSchema, DrawingParams } from '@/lib/shared/drawings';

const Query = z.object({ since: z.coerce.number().int().min(0).default(0) });

/** GET /api/drawings/:drawingId/changes?since=REV answers what was saved after that revision, oldest first. */
export const GET = route({ params: DrawingParams, query: Query }, ({ actor, params, query }) =>
  listChanges(actor, params.drawingId, query.since),
);

/** POST /api/drawings/:drawingId/changes saves one command; 409 with the changes since, when its base is not the newest. */
export const POST = route(
  { params: DrawingParams, body: ChangeSchema, maxBytes: 640 * 1024 },
  ({ actor, params, body }) => saveChange(actor, params.drawingId, body),
);
