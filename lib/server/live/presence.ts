import 'server-only';
import { QueryTypes } from 'sequelize';
import { initialsOf } from '@/lib/server/actor';
import type { Subscriber } from '@/lib/server/live/hub';
import { sendNote } from '@/lib/server/live/notes';
import type { Peer } from '@/lib/shared/live';
import { Presence, sequelize } from '@/models';

/** s without a sign of life after which a stream counts as gone: its process was killed */
const STALE_S = 45;

type Stream = Pick<Subscriber, 'teamId' | 'drawingId' | 'personId' | 'streamId'>;

/** Writes that a window has the drawing open, and tells the others. */
export async function arrive({ teamId, drawingId, personId, streamId }: Stream): Promise<void> {
  await Presence.create({ teamId, drawingId, personId, streamId }, { returning: false });
  await sendNote({ team: teamId, drawing: drawingId });
}

export async function depart({ teamId, drawingId, streamId }: Stream): Promise<void> {
  await Presence.destroy({ where: { teamId, drawingId, streamId } });
  await sendNote({ team: teamId, drawing: drawingId });
}

/** Keeps a window fresh; sweeps those of the same drawing whose process is gone. */
export async function stay({ teamId, drawingId, streamId }: Stream): Promise<void> {
  await sequelize.query(
    'update presences set seen_at = now() where team_id = $1 and drawing_id = $2 and stream_id = $3',
    { bind: [teamId, drawingId, streamId] },
  );
  const gone = await sequelize.query(
    `delete from presences where team_id = $1 and drawing_id = $2 and seen_at < now() - make_interval(secs => $3)
     returning stream_id`,
    { bind: [teamId, drawingId, STALE_S], type: QueryTypes.SELECT },
  );
  if (gone.length > 0) await sendNote({ team: teamId, drawing: drawingId });
}

/** Takes out what killed processes left behind in drawings that nobody has opened since. */
export async function sweepPresences(): Promise<void> {
  await sequelize.query('delete from presences where seen_at < now() - make_interval(secs => $1)', { bind: [STALE_S] });
}

/** Everybody who has the drawing open, each once, by name. */
export async function whoIsHere(teamId: string, drawingId: string): Promise<Peer[]> {
  const rows = await sequelize.query<{ id: string; name: string }>(
    `select p.id, p.name from presences s join people p on p.team_id = s.team_id and p.id = s.person_id
      where s.team_id = $1 and s.drawing_id = $2 and s.seen_at > now() - make_interval(secs => $3)
      group by p.id, p.name order by p.name, p.id`,
    { bind: [teamId, drawingId, STALE_S], type: QueryTypes.SELECT },
  );
  return rows.map((row) => ({ ...row, initials: initialsOf(row.name) }));
}
