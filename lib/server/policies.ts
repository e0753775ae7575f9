import 'server-only';
import type { Actor } from '@/lib/server/actor';
import { AppError, missing } from '@/lib/server/errors';
import type { PersonRole } from '@/lib/shared/people';

/** What a decision about a job or its drawing leans on. */
export interface JobFacts {
  teamId: string;
  /** given to whoever asks */
  given: boolean;
  /** given to an apprentice of the team */
  taught: boolean;
  archived: boolean;
  drawing: 'open' | 'submitted' | 'issued';
}

type Rule = true | ((job: JobFacts) => boolean);
const given: Rule = (job) => job.given;
const taught: Rule = (job) => job.taught;

/**
 * Role × action: who may, and in which jobs. A person with several roles may what any of them may. Reading comes first:
 * whoever may not read a thing is told that it is not there.
 */
const MATRIX = {
  'job.list': { apprentice: true, electrician: true, trainer: true, admin: true },
  'job.read': { apprentice: given, electrician: true, trainer: taught, admin: true },
  'job.create': { electrician: true },
  'job.edit': { electrician: true },
  'client.read': { electrician: true, admin: true },
  'drawing.read': { apprentice: given, electrician: true, trainer: taught, admin: true },
  'drawing.edit': { apprentice: given, electrician: true },
  'drawing.record': { apprentice: given, electrician: true },
  'picture.read': { apprentice: given, electrician: true, trainer: taught, admin: true },
  'picture.edit': { apprentice: given, electrician: true },
  'people.read': { electrician: true, trainer: true, admin: true },
  'people.manage': { admin: true },
} as const satisfies Record<string, Partial<Record<PersonRole, Rule>>>;

export type Action = keyof typeof MATRIX;
export const ACTIONS = Object.keys(MATRIX) as Action[];

/** State × action: what a job or drawing refuses whoever asks, and why. */
function closedBecause(action: Action, job: JobFacts): string | null {
  if (action === 'picture.edit' && job.archived) return 'This job is archived. Take it out of the archive to add to it.';
  const changes = action === 'drawing.edit' || action === 'drawing.record';
  if (!changes) return null;
  if (job.archived) return 'This job is archived. Take it out of the archive to draw in it.';
  if (job.drawing === 'submitted') return 'This drawing is being reviewed. It can be changed when it comes back.';
  if (job.drawing === 'issued') return 'This drawing is issued. A change begins the next revision.';
  return null;
}

const holds = (actor: Actor, action: Action, job?: JobFacts): boolean =>
  actor.roles.some((role) => {
    const rule: Rule | undefined = (MATRIX[action] as Partial<Record<PersonRole, Rule>>)[role];
    return rule === true || (rule !== undefined && job !== undefined && rule(job));
  });

/** True when the actor may do it: to the job where one is given, at all where none is. */
export function may(actor: Actor, action: Action, job?: JobFacts): boolean {
  if (job && job.teamId !== actor.teamId) return false;
  return holds(actor, action, job) && !(job && closedBecause(action, job));
}

/**
 * Lets the actor pass or throws: `missing` where they may not even see the job (or there is none), `forbidden` where
 * they may only see it, `conflict` where its state refuses everybody.
 */
export function authorize(actor: Actor, action: Action, job?: JobFacts | null): void {
  if (job === null || (job && (job.teamId !== actor.teamId || !holds(actor, 'job.read', job)))) throw missing('job');
  if (!holds(actor, action, job)) throw new AppError('forbidden', 'Your roles in the team do not include this.');
  const closed = job && closedBecause(action, job);
  if (closed) throw new AppError('conflict', closed);
}
