import { applyPatch } from '../document/patch';
import type { Installation, PracticeId } from '../document/schema';
import { buildContext, type Context } from './context';
import { rules } from './index';
import { runRules, toFinding, violationsOf } from './run';
import type { Finding, Remedy } from './types';

const meets = (a: Finding, b: Finding): boolean =>
  a.rule === b.rule &&
  (a.parts.some((id) => b.parts.includes(id)) ||
    a.wires.some((id) => b.wires.includes(id)) ||
    a.parts.length + a.wires.length + b.parts.length + b.wires.length === 0);

/** True when the edit loses the finding and brings none that was not there. */
function isSound(context: Context, before: readonly Finding[], finding: Finding, { patch }: Remedy): boolean {
  const after = runRules(buildContext(applyPatch(context.document, patch), context.practice), rules);
  const still = after.some((each) => meets(each, finding) && each.message === finding.message);
  const less =
    after.filter(({ rule }) => rule === finding.rule).length <
    before.filter(({ rule }) => rule === finding.rule).length;
  return !still && less && after.every((each) => before.some((known) => meets(known, each)));
}

/**
 * The edits that put a finding right. Each was tried: the home after it has lost the finding and gained none. Asked for one
 * finding at a time, as each trial examines the home once more.
 */
export function remediesFor(doc: Installation, finding: Finding, practice: PracticeId = doc.practice): Remedy[] {
  const context = buildContext(doc, practice);
  const rule = rules.find(({ meta }) => meta.id === finding.rule);
  if (!rule) return [];
  const violation = violationsOf(context, rule, rules).find((each) => {
    const { parts, wires, message } = toFinding(context, rule, each);
    return (
      message === finding.message && parts.join() === finding.parts.join() && wires.join() === finding.wires.join()
    );
  });
  const proposed = violation?.remedies ?? [];
  if (proposed.length === 0) return [];
  const before = runRules(context, rules);
  return proposed.filter((remedy) => isSound(context, before, finding, remedy));
}
