import 'server-only';
import type { Transaction } from 'sequelize';
import type { Actor } from '@/lib/server/actor';
import { AppError } from '@/lib/server/errors';
import { JobPerson, Person } from '@/models';

/** Gives a job to exactly these people of the team. */
export async function giveJob(
  { teamId }: Actor,
  jobId: string,
  given: readonly string[],
  transaction: Transaction,
): Promise<void> {
  const ids = [...new Set(given)];
  const known = await Person.count({ where: { teamId, id: ids }, transaction });
  if (known !== ids.length)
    throw new AppError('invalid', 'A job can be given to people of your team only.', {
      fields: { given: 'Choose people of the team.' },
    });
  await JobPerson.destroy({ where: { teamId, jobId }, transaction });
  await JobPerson.bulkCreate(
    ids.map((personId) => ({ teamId, jobId, personId })),
    { transaction },
  );
}
