import { walkFaults } from '@/diagram/circuit/fault-walk';
import { FaultError } from '@/diagram/circuit/fault-types';
import type { Installation } from '@/diagram/document/schema';
import { buildContext } from '@/diagram/rules/context';
import { examine } from '@/diagram/rules/examine';
import { remediesFor } from '@/diagram/rules/remedies-for';
import { showFault } from '@/diagram/rules/show-fault';
import type { Finding } from '@/diagram/rules/types';
import type { Proof, Task } from './examiner';

/** What puts a finding right, and the fault that shows it. */
function prove(document: Installation, finding: Finding): Proof {
  const context = buildContext(document);
  const shown = showFault(context, finding);
  const remedies = remediesFor(document, finding);
  if (!shown) return { remedies, walk: null, cannot: null };
  try {
    return {
      remedies,
      walk: walkFaults(context.graph, context.evaluation, shown.faults, shown.condition),
      cannot: null,
    };
  } catch (error) {
    // A value that is missing is the person's to give; anything else is ours.
    if (error instanceof FaultError) return { remedies, walk: null, cannot: error.message };
    throw error;
  }
}

/** Examines beside the page, so that drawing never waits for it. */
self.onmessage = ({ data }: MessageEvent<{ id: number; task: Task }>) => {
  const { id, task } = data;
  const started = performance.now();
  try {
    const value = task.kind === 'examine' ? examine(task.document) : prove(task.document, task.finding);
    self.postMessage({ id, value, ms: performance.now() - started });
  } catch (error) {
    self.postMessage({ id, failure: error instanceof Error ? error.message : String(error) });
  }
};
