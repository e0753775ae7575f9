import { z } from 'zod';
import { PracticeIdSchema, SupplySchema } from '@/diagram/document/schema';

export const JobParams = z.object({ jobId: z.uuid() });

export const JOB_SORTS = ['number', 'title', 'client', 'state', 'due', 'updated'] as const;

export const JobQuerySchema = z.object({
  search: z.string().trim().max(80).default(''),
  sort: z.enum(JOB_SORTS).default('due'),
  direction: z.enum(['asc', 'desc']).default('asc'),
  page: z.coerce.number().int().min(1).max(10_000).default(1),
  filter: z.enum(['all', 'mine', 'due', 'archived']).default('all'),
});
export type JobQuery = z.infer<typeof JobQuerySchema>;

/** What a person types about a job. The client is named; one of that name in the team is used again, else made. */
export const JobInputSchema = z.strictObject({
  title: z.string().trim().min(1, 'Name the place: a street and number, or a house.').max(120),
  client: z.string().trim().min(1, 'Name the client.').max(120),
  clientPhone: z.string().trim().max(40).optional(),
  clientEmail: z.union([z.literal(''), z.email('This is not an e-mail address.').max(254)]).optional(),
  address: z.string().trim().max(300),
  practice: PracticeIdSchema,
  supply: SupplySchema,
  hoursWanted: z.number().min(0, 'Hours are 0 to 72.').max(72, 'Hours are 0 to 72.'),
  /** ISO date */
  due: z.iso.date().nullable(),
  /** ids of the people the job is given to: an apprentice sees and draws in these jobs only */
  given: z.array(z.uuid()).max(50).optional(),
});
export type JobInput = z.infer<typeof JobInputSchema>;

/** An edit names the version it was made on; an older one is refused, not written over. */
export const JobPatchSchema = JobInputSchema.partial().extend({
  version: z.int().nonnegative(),
  archived: z.boolean().optional(),
});
export type JobPatch = z.infer<typeof JobPatchSchema>;

export interface JobRow {
  id: string;
  number: string;
  title: string;
  client: string;
  drawnBy: string;
  checkedBy: string | null;
  revision: string;
  state: 'draft' | 'submitted' | 'returned' | 'approved' | 'issued';
  waits: string;
  due: string | null;
  findings: { danger: number; defect: number; advice: number } | null;
  drawingId: string;
  archived: boolean;
  updatedAt: string;
}

export interface JobPage {
  rows: JobRow[];
  total: number;
  page: number;
  pages: number;
  /** all jobs of the team that are not archived */
  all: number;
}

export interface JobView extends JobRow, JobInput {
  version: number;
  rights: { edit: boolean; draw: boolean };
}
