import 'server-only';
import { QueryTypes, type Transaction } from 'sequelize';
import { sha256 } from '@/lib/server/drawings/hash';
import type { DrawingState } from '@/lib/server/drawings/state-cache';
import { sequelize } from '@/models';

/**
 * Freezes the document of a state; one that is frozen already stays as it is.
 * @returns sha256 of the frozen bytes
 */
export async function writeSnapshot(
  teamId: string,
  drawingId: string,
  { rev, document }: DrawingState,
  transaction: Transaction,
): Promise<string> {
  const body = JSON.stringify(document);
  const hash = sha256(body);
  await sequelize.query(
    `insert into drawing_snapshots (team_id, drawing_id, rev, body, sha256) values ($1, $2, $3, $4, $5)
     on conflict (team_id, drawing_id, rev) do nothing`,
    { bind: [teamId, drawingId, rev, body, hash], type: QueryTypes.INSERT, transaction },
  );
  await sequelize.query('update drawings set snapshot_rev = $3 where team_id = $1 and id = $2 and snapshot_rev < $3', {
    bind: [teamId, drawingId, rev],
    transaction,
  });
  return hash;
}
