import { openStream } from '@/lib/server/live/open-stream';
import { route } from '@/lib/server/route';
import { DrawingParams } from '@/lib/shared/drawings';

/** GET /api/drawings/:drawingId/events streams what is saved and who is here, as server-sent events. */
export const GET = route({ params: DrawingParams }, ({ actor, params }) => openStream(actor, params.drawingId));
