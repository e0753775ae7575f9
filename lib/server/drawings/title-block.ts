import 'server-only';
import { QueryTypes } from 'sequelize';
import { initialsOf } from '@/lib/server/actor';
import type { RevisionView, TitleBlock } from '@/lib/shared/drawings';
import { sequelize } from '@/models';

interface Row extends Pick<TitleBlock, 'number' | 'title' | 'client' | 'address' | 'team' | 'drawnOn'> {
  drawnBy: string;
  letter: string | null;
  state: RevisionView['state'] | null;
}

/** What the title block of a drawing says: newest change, newest revision. */
export async function readTitleBlock(teamId: string, drawingId: string): Promise<TitleBlock> {
  const [row] = await sequelize.query<Row>(
    `select t.prefix || '-' || j.number as number, j.title, c.name as client, j.address, t.name as team, p.name as "drawnBy",
            to_char(coalesce(last.at, j.created_at) at time zone 'UTC', 'YYYY-MM-DD') as "drawnOn", r.letter, r.state
       from drawings d
       join jobs j on j.team_id = d.team_id and j.id = d.job_id
       join teams t on t.id = d.team_id
       join clients c on c.team_id = j.team_id and c.id = j.client_id
       left join drawing_changes last on last.team_id = d.team_id and last.drawing_id = d.id and last.rev = d.rev
       join people p on p.team_id = d.team_id and p.id = coalesce(last.person_id, j.created_by)
       left join lateral (select letter, state from revisions
                           where team_id = d.team_id and drawing_id = d.id order by rev desc limit 1) r on true
      where d.team_id = $1 and d.id = $2`,
    { bind: [teamId, drawingId], type: QueryTypes.SELECT },
  );
  const { letter, state, drawnBy, ...rest } = row!;
  return { ...rest, drawnBy: initialsOf(drawnBy), checkedBy: null, revision: letter ?? '-', state: state ?? 'draft' };
}
