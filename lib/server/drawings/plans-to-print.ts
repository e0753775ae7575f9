import 'server-only';
import type { SheetQuery } from '@/lib/shared/drawings';
import type { Actor } from '@/lib/server/actor';
import { sheetToPrint } from '@/lib/server/drawings/sheet-to-print';
import { missing } from '@/lib/server/errors';
import { findJob } from '@/lib/server/jobs/find-job';
import type { PlanPdfInput } from '@/lib/server/pdf/sheet-pdf';
import { storage } from '@/lib/server/storage/driver';
import { keyOf } from '@/lib/server/uploads/keys';
import { asJpeg } from '@/lib/server/uploads/picture';
import { Upload } from '@/models';

/** The plans of a drawing with the pictures behind them. A picture that is gone leaves its plan standing without one. */
export async function plansToPrint(
  actor: Actor,
  drawingId: string,
  { paper, storey }: Pick<SheetQuery, 'paper'> & { storey?: string | undefined },
): Promise<PlanPdfInput & Pick<Awaited<ReturnType<typeof sheetToPrint>>, 'titleBlock'>> {
  const { document, titleBlock, options } = await sheetToPrint(actor, drawingId, { face: 'overview', paper, sheet: 1, lettering: 'text' });
  const plans = (document.plans ?? []).filter(({ id }) => storey === undefined || id === storey);
  if (plans.length === 0) throw missing('plan');
  const job = await findJob(actor, { drawingId });
  const pictures = new Map<string, Buffer>();
  for (const { picture } of plans) {
    // Whatever a drawing names, only pictures of its own job are printed with it.
    const upload = await Upload.findOne({ where: { teamId: actor.teamId, jobId: job!.jobId, id: picture } });
    const bytes = upload?.storedAt ? await storage().get(keyOf(upload, 'large')) : null;
    if (bytes) pictures.set(picture, await asJpeg(bytes));
  }
  return { ...options, document, titleBlock, pictures, ...(storey !== undefined && { plan: storey }) };
}
