import { route } from '@/lib/server/route';
import { changeUpload } from '@/lib/server/uploads/change-upload';
import { readUpload } from '@/lib/server/uploads/read-upload';
import { UploadParams, UploadPatchSchema, UploadSizeSchema } from '@/lib/shared/uploads';

/** GET /api/uploads/:uploadId?size= answers the bytes of a picture. */
export const GET = route({ params: UploadParams, query: UploadSizeSchema }, ({ actor, params, query }) =>
  readUpload(actor, params.uploadId, query.size),
);

/** PATCH /api/uploads/:uploadId captions it, says what it shows, removes it or brings it back. */
export const PATCH = route({ params: UploadParams, body: UploadPatchSchema }, ({ actor, params, body }) =>
  changeUpload(actor, params.uploadId, body),
);
