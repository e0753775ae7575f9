import 'server-only';
import type { Installation } from '@/diagram/document/schema';
import type { SheetOptions } from '@/diagram/paper/sheet';
import { examine } from '@/diagram/rules/examine';
import type { Actor } from '@/lib/server/actor';
import { openDrawing } from '@/lib/server/drawings/open-drawing';
import { missing } from '@/lib/server/errors';
import type { SheetQuery, TitleBlock } from '@/lib/shared/drawings';

export interface SheetToPrint {
  document: Installation;
  titleBlock: TitleBlock;
  options: SheetOptions;
}

/** A sheet as it is asked for, with what every print carries: title block, revision, and what was found. */
export async function sheetToPrint(
  actor: Actor,
  drawingId: string,
  { face, paper, place }: SheetQuery,
): Promise<SheetToPrint> {
  const { document, titleBlock } = await openDrawing(actor, { drawingId });
  if (place !== undefined && !document.places.some(({ id }) => id === place)) throw missing('room');
  const findings = examine(document).findings.filter(({ silenced }) => !silenced);
  return { document, titleBlock, options: { face, paper, place, title: titleBlock, findings } };
}
