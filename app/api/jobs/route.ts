import { createJob } from '@/lib/server/jobs/create-job';
import { listJobs } from '@/lib/server/jobs/list-jobs';
import { route } from '@/lib/server/route';
import { JobInputSchema, JobQuerySchema } from '@/lib/shared/jobs';

/** GET /api/jobs?search=&sort=&direction=&page=&filter= answers a page of the register. */
export const GET = route({ query: JobQuerySchema }, ({ actor, query }) => listJobs(actor, query));

/** POST /api/jobs makes a job with an empty drawing. */
export const POST = route({ body: JobInputSchema, status: 201 }, ({ actor, body }) => createJob(actor, body));
