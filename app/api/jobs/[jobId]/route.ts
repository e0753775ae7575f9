import { changeJob } from '@/lib/server/jobs/change-job';
import { readJob } from '@/lib/server/jobs/read-job';
import { route } from '@/lib/server/route';
import { JobParams, JobPatchSchema } from '@/lib/shared/jobs';

/** GET /api/jobs/:jobId */
export const GET = route({ params: JobParams }, ({ actor, params }) => readJob(actor, params.jobId));

/** PATCH /api/jobs/:jobId edits on a version; 409 when it is not the newest. */
export const PATCH = route({ params: JobParams, body: JobPatchSchema }, ({ actor, params, body }) =>
  changeJob(actor, params.jobId, body),
);
