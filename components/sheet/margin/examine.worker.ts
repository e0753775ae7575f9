import { walkFaults } from '@/diagram/circuit/fault-walk';
import { FaultError } from '@/diagram/circuit/fault-types';
import { applyPatch } from '@/diagram/document/patch';
import type { Installation } from '@/diagram/document/schema';
import type { Examination } from '@/diagram/rules/examination';
import { buildContext } from '@/diagram/rules/context';
import { createExaminer } from '@/diagram/rules/incremental/examiner';
import { remediesFor } from '@/diagram/rules/remedies-for';
import { showFault } from '@/diagram/rules/show-fault';
import type { Finding } from '@/diagram/rules/types';
import type { Proof, Told } from './examiner';

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

/** A worker serves one drawing: it keeps the document, and of it what the next edit leaves as it was. */
const examiner = createExaminer();
let document: Installation | undefined;

function answer(task: Told): Examination | Proof {
  if ('document' in task) document = task.document;
  else if (document) document = applyPatch(document, task.patch);
  else throw new Error('A change came before the document it changes.');
  return 'finding' in task ? prove(document, task.finding) : examiner.examine(document);
}

/** Examines beside the page, so that drawing never waits for it. */
self.onmessage = ({ data }: MessageEvent<{ id: number; task: Told }>) => {
  const { id, task } = data;
  const started = performance.now();
  try {
    self.postMessage({ id, value: answer(task), ms: performance.now() - started });
  } catch (error) {
    self.postMessage({ id, failure: error instanceof Error ? error.message : String(error) });
  }
};
