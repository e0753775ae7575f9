import 'server-only';
import { buildContext } from '@/diagram/rules/context';
import { tableOf } from '@/diagram/schedules';
import { csvRows } from '@/diagram/schedules/csv';
import type { TableId } from '@/diagram/schedules/types';
import type { Actor } from '@/lib/server/actor';
import { openDrawing } from '@/lib/server/drawings/open-drawing';
import { csvText } from '@/lib/shared/csv';
import type { TitleBlock } from '@/lib/shared/drawings';

/** A table of the saved drawing as a file, with revision, date, author, state and cautions in its head. */
export async function scheduleCsv(
  actor: Actor,
  drawingId: string,
  table: TableId,
): Promise<{ text: string; titleBlock: TitleBlock }> {
  const { document, titleBlock } = await openDrawing(actor, { drawingId });
  const rows = csvRows(document, tableOf(buildContext(document), table), {
    ...titleBlock,
    practice: document.practice,
  });
  return { text: csvText(rows), titleBlock };
}
