import 'server-only';
import { QueryTypes } from 'sequelize';
import { snapshotIfDue } from '@/lib/server/drawings/background';
import { checkHashes } from '@/lib/server/drawings/check-hashes';
import { thinChanges } from '@/lib/server/drawings/thin-changes';
import { describeFault, log } from '@/lib/server/log';
import { sweepPresences } from '@/lib/server/live/presence';
import { sweepUploads } from '@/lib/server/uploads/sweep-uploads';
import { sequelize } from '@/models';

const EVERY_MS = 5 * 60_000;
const NIGHTLY_MS = 24 * 3_600_000;
/** any number that nothing else locks by */
const NIGHT_LOCK = 713_001;
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

/** What one process of all does once a day: thins the log and reads every drawing against its sums. */
export async function doNightWork(): Promise<void> {
  await sequelize.transaction(async (transaction) => {
    const [lock] = await sequelize.query<{ got: boolean }>('select pg_try_advisory_xact_lock($1) as got', {
      bind: [NIGHT_LOCK],
      type: QueryTypes.SELECT,
      transaction,
    });
    if (!lock!.got) return;
    await thinChanges();
    await checkHashes();
  });
}

/** Sweeps from time to time for as long as the process runs. */
export function startSweeping(): void {
  const sweep = async () => {
    for (const work of [sweepIdleDrawings, sweepUploads, sweepPresences])
      await work().catch((error) => log('sweep.failed', describeFault(error)));
  };
  setInterval(() => void sweep(), EVERY_MS).unref();
  const night = () => void doNightWork().catch((error) => log('sweep.failed', describeFault(error)));
  setInterval(night, NIGHTLY_MS).unref();
}
