import 'server-only';
import { QueryTypes } from 'sequelize';
import type { Actor } from '@/lib/server/actor';
import { readableState } from '@/lib/server/drawings/readable-state';
import { findJob } from '@/lib/server/jobs/find-job';
import { JOB_FROM, JOB_SELECT, presentRow, type JobRecord } from '@/lib/server/jobs/job-record';
import { authorize, may } from '@/lib/server/policies';
import type { JobView } from '@/lib/shared/jobs';
import { JobPerson, sequelize } from '@/models';

type Record = JobRecord & { clientPhone: string; clientEmail: string };

/** A job with all that its form shows; practice and supply as they stand in its drawing. */
export async function readJob(actor: Actor, jobId: string): Promise<JobView> {
  const job = await findJob(actor, { jobId });
  authorize(actor, 'job.read', job);
  const { teamId } = actor;
  const [[record], people] = await Promise.all([
    sequelize.query<Record>(
      `${JOB_SELECT}, c.phone as "clientPhone", c.email as "clientEmail" ${JOB_FROM} where j.team_id = $1 and j.id = $2`,
      { bind: [teamId, jobId], type: QueryTypes.SELECT },
    ),
    JobPerson.findAll({ where: { teamId, jobId }, order: [['personId', 'ASC']] }),
  ]);
  const { document, problems } = await readableState(teamId, record!.drawingId);
  const draw = problems.length === 0 && may(actor, 'drawing.edit', job!);
  const reach = may(actor, 'client.read') && { clientPhone: record!.clientPhone, clientEmail: record!.clientEmail };
  return {
    ...presentRow(record!),
    ...reach,
    address: record!.address,
    practice: document.practice,
    supply: document.supply,
    hoursWanted: record!.hoursWanted,
    given: people.map(({ personId }) => personId),
    version: record!.version,
    rights: { edit: may(actor, 'job.edit', job!), draw },
  };
}
