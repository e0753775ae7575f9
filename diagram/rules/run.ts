import { byCode } from '../document/schema';
import type { Context } from './context';
import type { Finding, Rule, Severity, Violation } from './types';

const RANK: Record<Severity, number> = { danger: 0, defect: 1, advice: 2 };

const sorted = (ids: Iterable<string>): string[] => [...new Set(ids)].sort(byCode);

/** A violation with what its rule knows; all conditions where it names none. */
export function toFinding(context: Context, rule: Rule, violation: Violation): Finding {
  const all = context.evaluated.map(({ condition }) => condition.name);
  const { meta } = rule;
  const conditions = violation.conditions ? all.filter((name) => violation.conditions!.includes(name)) : all;
  return {
    rule: meta.id,
    severity: violation.severity ?? meta.severity,
    heading: violation.heading,
    message: violation.message,
    parts: [...new Set(violation.parts)],
    wires: sorted(violation.wires ?? []),
    conditions,
    ...(meta.clauses.length > 0 && { clause: meta.clauses.map(({ document, clause }) => `${document}, ${clause}`) }),
  };
}

const placeOf = (finding: Finding): string => `${finding.parts.join(' ')} ${finding.wires.join(' ')}`;

/** Dangers first, then by rule, then by place: the same home gives the same list, byte for byte. */
export function compareFindings(a: Finding, b: Finding): number {
  return (
    RANK[a.severity] - RANK[b.severity] ||
    byCode(a.rule, b.rule) ||
    byCode(placeOf(a), placeOf(b)) ||
    byCode(a.message, b.message)
  );
}

/** Marks the findings that somebody answers for in the file; they stay in the list. */
function silence(context: Context, finding: Finding): Finding {
  const answer = context.document.silenced?.find(
    ({ rule, at }) => rule === finding.rule && (finding.parts.includes(at) || finding.wires.includes(at)),
  );
  return answer ? { ...finding, silenced: { reason: answer.reason, by: answer.by } } : finding;
}

/** What a rule says about a home. @param all every rule of the run */
export function violationsOf(context: Context, rule: Rule, all: readonly Rule[]): Violation[] {
  if (rule.meta.practices && !rule.meta.practices.includes(context.practice)) return [];
  return [...rule.check(context, all)];
}

/** Runs rules over a home. @param all every rule of the catalogue, where only some of them are run */
export function runRules(context: Context, rules: readonly Rule[], all: readonly Rule[] = rules): Finding[] {
  return rules
    .flatMap((rule) => violationsOf(context, rule, all).map((violation) => toFinding(context, rule, violation)))
    .map((finding) => silence(context, finding))
    .sort(compareFindings);
}
