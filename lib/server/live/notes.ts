import 'server-only';
import { QueryTypes, type Transaction } from 'sequelize';
import { z } from 'zod';
import { sequelize } from '@/models';

/** The one channel of the database on which the processes of this app tell one another what happened to a drawing. */
export const CHANNEL = 'ohmstead_live';

export const NoteSchema = z.object({
  team: z.uuid(),
  drawing: z.uuid(),
  /** absent where only who is here has changed */
  rev: z.int().positive().optional(),
});
/** A note says that something happened, never what: whoever hears it asks the database, within their rights. */
export type Note = z.infer<typeof NoteSchema>;

/** Sends a note to all processes. Inside a transaction it goes out with the commit and not at all when that fails. */
export async function sendNote(note: Note, transaction?: Transaction): Promise<void> {
  await sequelize.query('select pg_notify($1, $2)', {
    bind: [CHANNEL, JSON.stringify(note)],
    type: QueryTypes.SELECT,
    transaction,
  });
}
