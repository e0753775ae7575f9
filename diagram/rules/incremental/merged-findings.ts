import { findById, type Installation } from '../../document/schema';
import type { Context } from '../context';
import { rules } from '../index';
import { runRules } from '../run';
import type { Finding } from '../types';
import { Beyond, mustBe } from './beyond';
import { OF_A_BRANCH } from './rule-reach';

const branchRules = rules.filter(({ meta }) => OF_A_BRANCH.has(meta.id));
const homeRules = rules.filter(({ meta }) => !OF_A_BRANCH.has(meta.id));

export const isOfBranch = ({ rule }: Finding): boolean => OF_A_BRANCH.has(rule);

/** Some branches of a drawing, in canonical order. */
export interface Place {
  doc: Installation;
  trunk: ReadonlySet<string>;
  parts: ReadonlySet<string>;
}

/** What a finding names: these branches, others, the trunk. */
function namedBy({ doc, trunk, parts }: Place, finding: Finding): { here: boolean; elsewhere: boolean; trunk: boolean } {
  const ends = finding.wires.map((id) => {
    const { from, to } = findById(doc.wires, id)!;
    return [from[0], to[0]].filter((end) => !trunk.has(end));
  });
  const named = [...finding.parts.filter((id) => !trunk.has(id)), ...ends.flat()];
  return {
    here: named.some((id) => parts.has(id)),
    elsewhere: named.some((id) => !parts.has(id)),
    trunk: finding.parts.some((id) => trunk.has(id)) || ends.some((list) => list.length === 0) || named.length === 0,
  };
}

const bytes = (findings: readonly Finding[]): string =>
  findings
    .map((finding) => JSON.stringify(finding))
    .sort()
    .join('\n');

/** The findings of some branches, those of the trunk that are seen beside them, and those of other branches. */
export function split(findings: readonly Finding[], place: Place): { own: Finding[]; trunk: Finding[]; others: Finding[] } {
  const found = { own: [] as Finding[], trunk: [] as Finding[], others: [] as Finding[] };
  for (const finding of findings) {
    const { here, elsewhere, trunk } = namedBy(place, finding);
    if (here && (elsewhere || trunk)) throw new Beyond(`what ${finding.rule} gathers`);
    (here ? found.own : elsewhere && !trunk ? found.others : found.trunk).push(finding);
  }
  return found;
}

const hasOne = (findings: readonly Finding[], ...ids: string[]): boolean => findings.some(({ rule }) => ids.includes(rule));
const hasLead = ({ parts }: Installation): boolean => parts.some((part) => part.kind === 'plug' && part.in === undefined);

/**
 * A terminal without its wire is told once with the stretch that lost it, wherever in the home that is: where the one may
 * lie in these branches and the other elsewhere, neither shows it alone. A lead that hangs loose is such a stretch, unsaid.
 */
function mustShowGaps(was: ReturnType<typeof split>, is: ReturnType<typeof split>, docs: readonly Installation[]): void {
  const lead = docs.some(hasLead);
  const isOpen = (findings: readonly Finding[]) => lead || hasOne(findings, 'open-line', 'open-neutral');
  const hasEnd = (findings: readonly Finding[]) => hasOne(findings, 'open-terminal');
  const others = [...was.others, ...was.trunk];
  const apart = isOpen(was.own) || (isOpen(is.own) && hasEnd(others)) || (isOpen(others) && hasEnd(is.own));
  mustBe(!apart, 'where a lost wire is told');
}

/** What the rules that look at one branch find in an excerpt. */
export const findingsOf = (excerpt: Context, of = branchRules): Finding[] => runRules(excerpt, of, rules);

export interface FindingsInput {
  /** findings before the edit by the rules that look at one branch */
  known: readonly Finding[];
  /** the touched branches before the edit and after it */
  before: Place;
  after: Place;
  /** the excerpt after the edit, and before it */
  now: Context;
  excerptBefore: () => Context;
}

/** Findings after an edit by the rules that look at one branch. @throws Beyond where they gather more than one */
export function branchFindings({ known, before, after, now, excerptBefore }: FindingsInput): Finding[] {
  const was = split(known, before);
  const is = split(findingsOf(now), after);
  mustShowGaps(was, is, [before.doc, after.doc]);
  if (was.trunk.length + is.trunk.length > 0) {
    // What is said of the trunk may come of any branch: it stands as long as these say the same of it as before.
    const then = split(findingsOf(excerptBefore()), before);
    if (bytes(then.trunk) !== bytes(is.trunk)) throw new Beyond('what is said of the trunk');
  }
  return [...was.others, ...was.trunk, ...is.own];
}

/** Findings of the rules that look at the whole home. @throws Beyond where one asks for more than is known */
export const homeFindings = (context: Context): Finding[] => runRules(context, homeRules, rules);
