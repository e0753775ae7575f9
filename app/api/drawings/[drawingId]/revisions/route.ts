import { listRevisions } from '@/lib/server/drawings/list-revisions';
import { recordRevision } from '@/lib/server/drawings/record-revision';
import { route } from '@/lib/server/route';
import { DrawingParams, RevisionSchema } from '@/lib/shared/drawings';

/** GET /api/drawings/:drawingId/revisions answers the recorded revisions, newest first. */
export const GET = route({ params: DrawingParams }, ({ actor, params }) => listRevisions(actor, params.drawingId));

/** POST /api/drawings/:drawingId/revisions freezes the drawing as it stands, under the next letter. */
export const POST = route({ params: DrawingParams, body: RevisionSchema, status: 201 }, ({ actor, params, body }) =>
  recordRevision(actor, params.drawingId, body.note),
);
