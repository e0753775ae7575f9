import 'server-only';
import { Op } from 'sequelize';
import { diff, type Patch } from '@/diagram/document/patch';
import { emptyDocument } from '@/diagram/document/schema';
import { initialsOf, type Actor } from '@/lib/server/actor';
import { loadState } from '@/lib/server/drawings/load-state';
import { missing } from '@/lib/server/errors';
import { findJob } from '@/lib/server/jobs/find-job';
import { authorize } from '@/lib/server/policies';
import type { SavedChange } from '@/lib/shared/drawings';
import { Drawing, DrawingChange, Person } from '@/models';

const AT_MOST = 500;

export interface ChangeList {
  /** the revision that the last of `changes` leads to; less than the drawing's when there were too many for one answer */
  rev: number;
  changes: SavedChange[];
}

const present = ({ rev, saveId, label, patch, person, personId, at }: DrawingChange): SavedChange => ({
  rev,
  saveId,
  label,
  patch: JSON.parse(patch) as Patch,
  person: { id: personId, name: person!.name, initials: initialsOf(person!.name) },
  at: at.toISOString(),
});

/**
 * Where single changes since then are thinned: the drawing as it stands, as one change by whoever drew last. Whatever the
 * window has drawn meanwhile then meets what is there, and is asked about where it differs.
 */
async function wholeSince(teamId: string, drawingId: string, newest: DrawingChange): Promise<ChangeList> {
  const { rev, document } = await loadState(teamId, drawingId);
  const { title, practice, supply } = document;
  const patch = diff(emptyDocument(title, practice, supply), document);
  return { rev, changes: [{ ...present(newest), rev, label: 'All changes of more than a month', patch }] };
}

/** The changes after `since`, oldest first, without asking who wants them. */
export async function changesSince(teamId: string, drawingId: string, since: number): Promise<ChangeList> {
  const head = await Drawing.findOne({ attributes: ['rev'], where: { teamId, id: drawingId } });
  if (!head) throw missing('drawing');
  const changes = await DrawingChange.findAll({
    where: { teamId, drawingId, rev: { [Op.gt]: since, [Op.lte]: head.rev } },
    include: [{ model: Person, as: 'person', where: { teamId }, attributes: ['name'] }],
    order: [['rev', 'ASC']],
    limit: AT_MOST,
  });
  if (changes[0] && changes[0].rev > since + 1) {
    const newest = await DrawingChange.findOne({
      where: { teamId, drawingId, rev: head.rev },
      include: [{ model: Person, as: 'person', where: { teamId }, attributes: ['name'] }],
    });
    return wholeSince(teamId, drawingId, newest ?? changes.at(-1)!);
  }
  return { rev: changes.at(-1)?.rev ?? head.rev, changes: changes.map(present) };
}

export async function listChanges(actor: Actor, drawingId: string, since: number): Promise<ChangeList> {
  authorize(actor, 'drawing.read', await findJob(actor, { drawingId }));
  return changesSince(actor.teamId, drawingId, since);
}
