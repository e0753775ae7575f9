import type { Installation } from '@/diagram/document/schema';
import type { Finding } from '@/diagram/rules/types';
import { triedRemedies, type TriedRemedy } from '@/diagram/schedules/outcomes';
import { workOut, type Worked } from '@/diagram/schedules/work-out';

export type Task =
  | { kind: 'work-out'; document: Installation }
  | { kind: 'remedies'; document: Installation; finding: Finding; way: string | null };

export type Answer = Worked | TriedRemedy[];

const answer = (task: Task): Answer =>
  task.kind === 'work-out' ? workOut(task.document) : triedRemedies(task.document, task.finding, task.way);

/** Works beside the page, so that typing never waits. */
self.onmessage = ({ data }: MessageEvent<{ id: number; task: Task }>) => {
  const { id, task } = data;
  try {
    self.postMessage({ id, value: answer(task) });
  } catch (error) {
    self.postMessage({ id, failure: error instanceof Error ? error.message : String(error) });
  }
};
