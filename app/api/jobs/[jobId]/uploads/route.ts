import { route } from '@/lib/server/route';
import { addUpload } from '@/lib/server/uploads/add-upload';
import { listUploads } from '@/lib/server/uploads/list-uploads';
import { JobParams } from '@/lib/shared/jobs';
import { MOST_PICTURE_BYTES, UploadQuerySchema } from '@/lib/shared/uploads';

/** GET /api/jobs/:jobId/uploads */
export const GET = route({ params: JobParams }, ({ actor, params }) => listUploads(actor, params.jobId));

/** POST /api/jobs/:jobId/uploads?id=&subject=&place=&caption= takes one picture, which is the body. */
export const POST = route(
  { params: JobParams, query: UploadQuerySchema, file: true, maxBytes: MOST_PICTURE_BYTES, status: 201, costly: true },
  ({ actor, params, query, file }) => addUpload(actor, params.jobId, query, file.bytes, file.type),
);
