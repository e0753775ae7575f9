import { JobQuerySchema, type JobQuery } from '@/lib/shared/jobs';

const defaults = JobQuerySchema.parse({});

/** The query as an address writes it: only what differs from the register as it opens. */
export function queryString(query: JobQuery): string {
  const params = new URLSearchParams();
  for (const [name, value] of Object.entries(query))
    if (value !== defaults[name as keyof JobQuery]) params.set(name, String(value));
  return params.toString();
}
