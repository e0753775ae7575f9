import 'server-only';
import { randomUUID } from 'node:crypto';
import { QueryTypes } from 'sequelize';
import { emptyDocument } from '@/diagram/document/schema';
import type { Actor } from '@/lib/server/actor';
import { audit } from '@/lib/server/audit';
import { sha256 } from '@/lib/server/drawings/hash';
import { findOrMakeClient } from '@/lib/server/jobs/find-client';
import { giveJob } from '@/lib/server/jobs/give-job';
import { readJob } from '@/lib/server/jobs/read-job';
import { authorize } from '@/lib/server/policies';
import type { JobInput, JobView } from '@/lib/shared/jobs';
import { Drawing, DrawingSnapshot, Job, sequelize } from '@/models';

/** A new job with the next number of the team, and its drawing: an empty home. */
export async function createJob(actor: Actor, input: JobInput): Promise<JobView> {
  authorize(actor, 'job.create');
  const { teamId } = actor;
  const body = JSON.stringify(emptyDocument(input.title, input.practice, input.supply));
  const hash = sha256(body);
  const jobId = await sequelize.transaction(async (transaction) => {
    const clientId = await findOrMakeClient(actor, input, transaction);
    const [counter] = await sequelize.query<{ number: number }>(
      'update teams set next_job = next_job + 1 where id = $1 returning next_job - 1 as number',
      { bind: [teamId], type: QueryTypes.SELECT, transaction },
    );
    const { title, address, hoursWanted, due } = input;
    const job = await Job.create(
      {
        teamId,
        id: randomUUID(),
        number: counter!.number,
        title,
        clientId,
        address,
        hoursWanted,
        due,
        createdBy: actor.personId,
      },
      { transaction },
    );
    if (input.given) await giveJob(actor, job.id, input.given, transaction);
    const drawing = await Drawing.create({ teamId, jobId: job.id, headHash: hash }, { transaction });
    await DrawingSnapshot.create({ teamId, drawingId: drawing.id, rev: 0, body, sha256: hash }, { transaction });
    await audit(actor, 'job.create', job.id, { number: job.number }, transaction);
    return job.id;
  });
  return readJob(actor, jobId);
}
