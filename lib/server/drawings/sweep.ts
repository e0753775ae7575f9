import 'server-only';
import { QueryTypes } from 'sequelize';
import { snapshotIfDue } from '@/lib/server/drawings/background';
import { describeFault, log } from '@/lib/server/log';
import { sweepUploads } from '@/lib/server/uploads/sweep-uploads';
import { sequelize } from '@/models';

const EVERY_MS = 5 * 60_000;
const IDLE_MINUTES = 15;
/** Fewer changes than this are read as fast as a snapshot. */
const WORTH = 20;

/** Freezes the drawings that were left alone with some changes after their newest snapshot, so that they open at once. */
export async function sweepIdleDrawings(): Promise<number> {
  const idle = await sequelize.query<{ teamId: string; id: string }>(
    `select d.team_id as "teamId", d.id from drawings d
       join drawing_changes c on c.team_id = d.team_id and c.drawing_id = d.id and c.rev = d.rev
      where d.rev - d.snapshot_rev >= $1 and c.at < now() - make_interval(mins => $2) limit 100`,
    { bind: [WORTH, IDLE_MINUTES], type: QueryTypes.SELECT },
  );
  for (const { teamId, id } of idle) await snapshotIfDue(teamId, id, WORTH);
  return idle.length;
}

/** Sweeps from time to time for as long as the process runs. */
export function startSweeping(): void {
  const sweep = async () => {
    for (const work of [sweepIdleDrawings, sweepUploads])
      await work().catch((error) => log('sweep.failed', describeFault(error)));
  };
  setInterval(() => void sweep(), EVERY_MS).unref();
}
