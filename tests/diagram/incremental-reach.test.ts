import { describe, expect, it } from 'vitest';
import type { Installation } from '@/diagram/document/schema';
import { rules } from '@/diagram/rules';
import { buildContext } from '@/diagram/rules/context';
import { examineContext } from '@/diagram/rules/examine';
import { Beyond } from '@/diagram/rules/incremental/beyond';
import { contextAfter } from '@/diagram/rules/incremental/examine-part';
import { excerptOf } from '@/diagram/rules/incremental/excerpt';
import { split, type Place } from '@/diagram/rules/incremental/merged-findings';
import { OF_A_BRANCH } from '@/diagram/rules/incremental/rule-reach';
import { shapeOf } from '@/diagram/rules/incremental/shape';
import { touchedBy } from '@/diagram/rules/incremental/touched';
import { runRules } from '@/diagram/rules/run';
import type { Finding, Rule } from '@/diagram/rules/types';
import { plantedMistakes } from './planted';

/**
 * That a rule looks at one branch and what that hangs on is not taken on trust: every branch of many homes, right ones and
 * ones with a mistake in them, is cut out, and the rule must say the same of it as it says in the whole home.
 */

/** What a rule says of some branches alone; null where it gathers more, which the examiner sees and examines the whole. */
function ownOf(findings: readonly Finding[], rule: Rule, place: Place): string | null {
  try {
    return JSON.stringify(split(findings.filter((finding) => finding.rule === rule.meta.id), place).own);
  } catch (error) {
    if (error instanceof Beyond) return null;
    throw error;
  }
}

interface Seen {
  /** rules that said something of a branch, and those that said something else of it in the whole home */
  speaking: Set<string>;
  differing: Map<string, string>;
  branches: number;
}

function lookAt(doc: Installation, seen: Seen): void {
  const context = buildContext(doc);
  const { findings } = examineContext(context);
  const shape = shapeOf(context, findings);
  if (!shape) return;
  // Branches that something is said of, and the first of those that are right.
  const named = new Set(findings.flatMap(({ parts }) => parts.map((id) => shape.branchOf.get(id))));
  const firsts = new Map([...shape.branchOf].map(([id, key]) => [key, id]));
  const quiet = [...firsts.keys()].find((key) => !named.has(key));
  for (const [key, id] of firsts) {
    if (!named.has(key) && key !== quiet) continue;
    const touched = touchedBy(doc, doc, { parts: [id], wires: [], cables: [], common: false }, shape);
    const excerpt = excerptOf(shape, doc, doc, touched);
    const alone = contextAfter(doc.practice, shape, excerpt, touched);
    const place = { doc, trunk: shape.trunk, parts: touched.before };
    seen.branches++;
    for (const rule of rules) {
      const cut = ownOf(runRules(alone, [rule], rules), rule, place);
      if (cut === null) continue;
      const whole = ownOf(findings, rule, place);
      if (whole !== null && whole !== '[]') seen.speaking.add(rule.meta.id);
      if (whole !== cut) seen.differing.set(rule.meta.id, `${doc.title}, ${id}: ${cut} is ${whole} in the whole home`);
    }
  }
}

describe('the reach of the rules', () => {
  it('is as declared: a rule of one branch says the same of it alone as in the whole home', () => {
    const seen: Seen = { speaking: new Set(), differing: new Map(), branches: 0 };
    for (const { wrong } of plantedMistakes(1)) lookAt(wrong, seen);
    const wider = [...seen.differing].filter(([rule]) => OF_A_BRANCH.has(rule));
    expect(wider).toEqual([]);
    // That it sees a rule which reads farther is shown by those that do.
    expect([...seen.differing.keys()]).toEqual(expect.arrayContaining(['duplicate-ref', 'unnamed-way']));
  }, 120_000);
});
