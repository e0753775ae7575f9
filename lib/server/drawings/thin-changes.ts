import 'server-only';
import { QueryTypes } from 'sequelize';
import { sequelize } from '@/models';

/** days for which every single change is kept */
export const KEPT_DAYS = 30;
const BATCH = 500;
const MOST_BATCHES = 40;

/**
 * Takes out of the log what is older than a month and lies under a snapshot. Snapshots stay, and with them every recorded
 * revision; so does the newest change of a drawing, which says who drew last and when. In small batches, so that nobody
 * who draws meanwhile waits.
 * @returns how many changes went
 */
export async function thinChanges(keptDays = KEPT_DAYS): Promise<number> {
  let gone = 0;
  for (let n = 0; n < MOST_BATCHES; n++) {
    const rows = await sequelize.query(
      `delete from drawing_changes c using (
         select o.team_id, o.drawing_id, o.rev from drawing_changes o
           join drawings d on d.team_id = o.team_id and d.id = o.drawing_id
          where o.at < now() - make_interval(days => $1) and o.rev <= d.snapshot_rev and o.rev < d.rev
          order by o.team_id, o.drawing_id, o.rev limit $2) old
        where c.team_id = old.team_id and c.drawing_id = old.drawing_id and c.rev = old.rev returning c.rev`,
      { bind: [keptDays, BATCH], type: QueryTypes.SELECT },
    );
    gone += rows.length;
    if (rows.length < BATCH) break;
  }
  return gone;
}
