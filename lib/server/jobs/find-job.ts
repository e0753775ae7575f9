import 'server-only';
import { QueryTypes, type Transaction } from 'sequelize';
import type { Actor } from '@/lib/server/actor';
import type { JobFacts } from '@/lib/server/policies';
import { sequelize } from '@/models';

export interface FoundJob extends JobFacts {
  jobId: string;
  drawingId: string;
}

/**
 * What is needed to decide about a job, looked up by its own id or by that of its drawing, in the actor's team only.
 * @returns null where the team has none of that id
 */
export async function findJob(
  actor: Actor,
  by: { jobId: string } | { drawingId: string },
  transaction?: Transaction,
): Promise<FoundJob | null> {
  const column = 'jobId' in by ? 'j.id' : 'd.id';
  const [row] = await sequelize.query<FoundJob>(
    `select j.team_id as "teamId", j.id as "jobId", d.id as "drawingId", j.archived_at is not null as archived, d.state as drawing,
            exists (select from job_people g where g.team_id = j.team_id and g.job_id = j.id and g.person_id = $3) as given,
            exists (select from job_people g join memberships m on m.team_id = g.team_id and m.person_id = g.person_id
                     where g.team_id = j.team_id and g.job_id = j.id and m.role = 'apprentice') as taught
       from jobs j join drawings d on d.team_id = j.team_id and d.job_id = j.id
      where j.team_id = $1 and ${column} = $2`,
    {
      bind: [actor.teamId, 'jobId' in by ? by.jobId : by.drawingId, actor.personId],
      type: QueryTypes.SELECT,
      transaction,
    },
  );
  return row ?? null;
}
