import { openDrawing } from '@/lib/server/drawings/open-drawing';
import { route } from '@/lib/server/route';
import { DrawingParams } from '@/lib/shared/drawings';

/** GET /api/drawings/:drawingId answers the document as it stands, with rights and title block. */
export const GET = route({ params: DrawingParams }, ({ actor, params }) => openDrawing(actor, params));
