import 'server-only';
import type { Transaction } from 'sequelize';
import { AuditEntry } from '@/models';

type Detail = Record<string, string | number | boolean | null | string[]>;

/**
 * Writes who did what. Inside the transaction of the deed where there is one, so that neither stands without the other.
 * Never a secret, and of a person no more than the id.
 */
export async function audit(
  who: { teamId: string; personId: string | null },
  action: string,
  subjectId: string | null,
  detail: Detail = {},
  transaction?: Transaction,
): Promise<void> {
  await AuditEntry.create(
    { teamId: who.teamId, personId: who.personId, action, subjectId, detail },
    { transaction, returning: false },
  );
}
