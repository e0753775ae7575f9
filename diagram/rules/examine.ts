import type { Installation, PracticeId } from '../document/schema';
import { buildContext, type Context } from './context';
import type { Examination } from './examination';
import { rules } from './index';
import { backupResults } from './results/backup-results';
import { loadResults } from './results/load-results';
import { supplyResult } from './results/supply-result';
import { wayResults } from './results/way-results';
import { runRules } from './run';

/**
 * Examines a home: what is wrong with it and what it comes to. Pure: the same document gives the same answer, byte for byte.
 * @param practice judged by this practice instead of the document's own
 */
export function examine(doc: Installation, practice: PracticeId = doc.practice): Examination {
  return examineContext(buildContext(doc, practice));
}

/** Examines a home of which the context is worked out already. */
export function examineContext(context: Context): Examination {
  return {
    schema: 1,
    title: context.document.title,
    findings: runRules(context, rules),
    ways: wayResults(context),
    supply: supplyResult(context),
    backup: backupResults(context),
    loads: loadResults(context),
  };
}
