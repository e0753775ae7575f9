import 'server-only';
import { randomUUID } from 'node:crypto';
import type { Transaction } from 'sequelize';
import { diff, isEmptyPatch } from '@/diagram/document/patch';
import type { Actor } from '@/lib/server/actor';
import { audit } from '@/lib/server/audit';
import { appendChange } from '@/lib/server/drawings/append-change';
import { afterSave } from '@/lib/server/drawings/background';
import { loadState } from '@/lib/server/drawings/load-state';
import { AppError } from '@/lib/server/errors';
import { findOrMakeClient } from '@/lib/server/jobs/find-client';
import { findJob, type FoundJob } from '@/lib/server/jobs/find-job';
import { giveJob } from '@/lib/server/jobs/give-job';
import { readJob } from '@/lib/server/jobs/read-job';
import { authorize } from '@/lib/server/policies';
import type { JobPatch, JobView } from '@/lib/shared/jobs';
import { Client, Job, sequelize } from '@/models';

const changedMeanwhile = () =>
  new AppError('conflict', 'Somebody else changed this job meanwhile. Look at it again; nothing of yours was saved.');

/** Edits a job on the version that the person saw. Practice, supply and title go into the drawing as a saved change. */
export async function changeJob(actor: Actor, jobId: string, patch: JobPatch): Promise<JobView> {
  const job = await findJob(actor, { jobId });
  authorize(actor, 'job.edit', job);
  const rev = await sequelize.transaction(async (transaction) => {
    await changeRow(actor, jobId, patch, transaction);
    if (patch.given) await giveJob(actor, jobId, patch.given, transaction);
    const fields = Object.keys(patch).filter((field) => field !== 'version');
    await audit(actor, 'job.edit', jobId, { fields }, transaction);
    return changeDrawing(actor, job!, patch, transaction);
  });
  if (rev !== null) afterSave(actor.teamId, job!.drawingId, rev);
  return readJob(actor, jobId);
}

async function changeRow(actor: Actor, jobId: string, patch: JobPatch, transaction: Transaction): Promise<void> {
  const { title, address, hoursWanted, due, archived, version } = patch;
  const { teamId } = actor;
  const clientId = await clientAfter(actor, jobId, patch, transaction);
  const changes = {
    ...(title !== undefined && { title }),
    ...(address !== undefined && { address }),
    ...(hoursWanted !== undefined && { hoursWanted }),
    ...(due !== undefined && { due }),
    ...(archived !== undefined && { archivedAt: archived ? new Date() : null }),
    ...(clientId !== undefined && { clientId }),
  };
  const [changed] = await Job.update(
    { ...changes, version: version + 1, updatedAt: new Date() },
    { where: { teamId, id: jobId, version }, transaction },
  );
  if (changed === 0) throw changedMeanwhile();
}

/** The client that the job is for after the edit; undefined when the edit says nothing of a client. */
async function clientAfter(
  actor: Actor,
  jobId: string,
  patch: JobPatch,
  transaction: Transaction,
): Promise<string | undefined> {
  const { client, clientPhone, clientEmail } = patch;
  if (client === undefined && clientPhone === undefined && clientEmail === undefined) return undefined;
  const { teamId } = actor;
  const name =
    client ??
    (await Job.findOne({
      where: { teamId, id: jobId },
      include: [{ model: Client, as: 'client', where: { teamId } }],
      transaction,
    }))!.client!.name;
  return findOrMakeClient(actor, { client: name, clientPhone, clientEmail }, transaction);
}

async function changeDrawing(
  actor: Actor,
  { drawingId }: FoundJob,
  { title, practice, supply }: JobPatch,
  transaction: Transaction,
): Promise<number | null> {
  const state = await loadState(actor.teamId, drawingId);
  const { document } = state;
  const patch = diff(document, {
    ...document,
    title: title ?? document.title,
    practice: practice ?? document.practice,
    supply: supply ?? document.supply,
  });
  if (isEmptyPatch(patch)) return null;
  authorize(actor, 'drawing.edit', await findJob(actor, { drawingId }, transaction));
  const next = await appendChange(
    actor,
    drawingId,
    state,
    { saveId: randomUUID(), label: 'Change the job', patch },
    transaction,
  );
  if (!next) throw changedMeanwhile();
  return next.rev;
}
