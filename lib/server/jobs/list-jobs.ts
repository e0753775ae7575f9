import 'server-only';
import { QueryTypes } from 'sequelize';
import type { Actor } from '@/lib/server/actor';
import { likeText } from '@/lib/server/clients/list-clients';
import { examineSoon } from '@/lib/server/drawings/background';
import { JOB_FROM, JOB_SELECT, SOMETHING_WAITS, presentRow, visibleTo, type JobRecord } from '@/lib/server/jobs/job-record';
import { authorize } from '@/lib/server/policies';
import type { JobPage, JobQuery } from '@/lib/shared/jobs';
import { sequelize } from '@/models';

const PAGE = 25;

/** What each heading sorts by: the only texts that ever reach the order of a query. */
const ORDER: Record<JobQuery['sort'], string> = {
  number: 'j.number',
  title: 'lower(j.title)',
  client: 'lower(c.name)',
  state: `coalesce(r.state, 'draft')`,
  due: 'j.due',
  updated: 'greatest(j.updated_at, last.at)',
};

const FILTER: Record<JobQuery['filter'], string> = {
  all: 'j.archived_at is null',
  mine: `j.archived_at is null and ${SOMETHING_WAITS} and (j.created_by = $2 or last.person_id = $2 or exists (
           select from job_people g where g.team_id = j.team_id and g.job_id = j.id and g.person_id = $2))`,
  due: `j.archived_at is null and j.due < current_date + 7`,
  archived: 'j.archived_at is not null',
};

/** A page of the register, of the jobs that the actor may see. */
export async function listJobs(actor: Actor, { search, sort, direction, page, filter }: JobQuery): Promise<JobPage> {
  authorize(actor, 'job.list');
  const seen = visibleTo(actor);
  // Naming $2 always: PostgreSQL refuses a value that no part of the query asks for.
  const mine = `j.team_id = $1 and $2::uuid is not null and ${seen}`;
  const where = `${mine} and ${FILTER[filter]}
    and ($3 = '' or concat_ws(' ', t.prefix || '-' || j.number, j.title, c.name, j.address) ilike $4)`;
  const bind = [actor.teamId, actor.personId, search, likeText(search)];
  const [counts, records] = await Promise.all([
    sequelize.query<{ total: number }>(`select count(*)::int as total ${JOB_FROM} where ${where}`, {
      bind,
      type: QueryTypes.SELECT,
    }),
    sequelize.query<JobRecord>(
      `${JOB_SELECT} ${JOB_FROM} where ${where}
        order by ${ORDER[sort]} ${direction === 'desc' ? 'desc' : 'asc'} nulls last, j.number desc limit $5 offset $6`,
      { bind: [...bind, PAGE, (page - 1) * PAGE], type: QueryTypes.SELECT },
    ),
  ]);
  const [inAll] = await sequelize.query<{ all: number }>(
    `select count(*)::int as "all" from jobs j where ${mine} and j.archived_at is null`,
    { bind: [actor.teamId, actor.personId], type: QueryTypes.SELECT },
  );
  for (const record of records) if (record.examinedRev !== record.rev) examineSoon(actor.teamId, record.drawingId);
  const total = counts[0]!.total;
  return { rows: records.map(presentRow), total, page, pages: Math.max(1, Math.ceil(total / PAGE)), all: inAll!.all };
}
