import 'server-only';
import { examine } from '@/diagram/rules/examine';
import { loadState } from '@/lib/server/drawings/load-state';
import { writeSnapshot } from '@/lib/server/drawings/write-snapshot';
import { describeFault, log } from '@/lib/server/log';
import { Drawing, Examination, sequelize } from '@/models';

/**
 * What follows a save without holding up its answer. Examining a home takes tens of milliseconds of the one thread that
 * also answers everybody else, so it is done once the drawing has been left alone for a moment, not once a save. What a
 * killed process leaves undone is caught up when the register is read (the count is older than the drawing) or at the
 * next save (the snapshot).
 */
export const SNAPSHOT_EVERY = 200;
const QUIET_MS = 1_500;

const waiting = new Map<string, NodeJS.Timeout>();
const running = new Set<Promise<void>>();

/** Counts the findings of the drawing as it stands and keeps the numbers for the register. */
export async function examineDrawing(teamId: string, drawingId: string): Promise<void> {
  const { rev, document } = await loadState(teamId, drawingId);
  const counts = { danger: 0, defect: 0, advice: 0 };
  for (const finding of examine(document).findings) if (!finding.silenced) counts[finding.severity] += 1;
  await Examination.upsert({ teamId, drawingId, rev, ...counts, at: new Date() }, { returning: false });
}

/** Freezes the drawing as it stands when enough changes lie after its newest snapshot. */
export async function snapshotIfDue(teamId: string, drawingId: string, every = SNAPSHOT_EVERY): Promise<void> {
  const head = await Drawing.findOne({ where: { teamId, id: drawingId } });
  if (!head || head.rev - head.snapshotRev < every) return;
  const state = await loadState(teamId, drawingId);
  await sequelize.transaction((transaction) => writeSnapshot(teamId, drawingId, state, transaction));
}

async function catchUp(teamId: string, drawingId: string): Promise<void> {
  for (const work of [snapshotIfDue, examineDrawing])
    await work(teamId, drawingId).catch((error) => log('background.failed', { drawingId, ...describeFault(error) }));
}

function start(teamId: string, drawingId: string): void {
  const done = catchUp(teamId, drawingId).finally(() => running.delete(done));
  running.add(done);
}

/** Asks for the findings to be counted again, soon; asking again meanwhile puts it off. */
export function examineSoon(teamId: string, drawingId: string): void {
  clearTimeout(waiting.get(drawingId));
  const timer = setTimeout(() => {
    waiting.delete(drawingId);
    start(teamId, drawingId);
  }, QUIET_MS);
  timer.unref();
  waiting.set(drawingId, timer);
}

export function afterSave(teamId: string, drawingId: string, rev: number): void {
  examineSoon(teamId, drawingId);
  // A sheet on which somebody draws without a pause is never left alone for a moment.
  if (rev % SNAPSHOT_EVERY === 0) start(teamId, drawingId);
}

/** Lets what is running end and drops what only waits: it is caught up with later. */
export async function stopBackground(): Promise<void> {
  for (const timer of waiting.values()) clearTimeout(timer);
  waiting.clear();
  await Promise.all(running);
}
