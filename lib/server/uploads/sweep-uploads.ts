import 'server-only';
import { QueryTypes } from 'sequelize';
import { storage } from '@/lib/server/storage/driver';
import { keyOf } from '@/lib/server/uploads/keys';
import { Upload, sequelize } from '@/models';

const KEPT_DAYS = 30;

/**
 * Takes away for good what was removed a month ago and what never arrived whole: first the bytes, then the row, so that
 * no bytes are left without one.
 */
export async function sweepUploads(): Promise<number> {
  const rows = await sequelize.query<{ teamId: string; id: string; jobId: string }>(
    `select team_id as "teamId", id, job_id as "jobId" from uploads
      where (stored_at is null and at < now() - interval '1 day') or removed_at < now() - make_interval(days => $1) limit 200`,
    { bind: [KEPT_DAYS], type: QueryTypes.SELECT },
  );
  for (const row of rows) {
    await storage().remove(keyOf(row, 'large'));
    await storage().remove(keyOf(row, 'small'));
    await Upload.destroy({ where: { teamId: row.teamId, id: row.id } });
  }
  return rows.length;
}
