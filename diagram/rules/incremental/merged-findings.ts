import type { Installation } from '../../document/schema';
import type { Context } from '../context';
import { rules } from '../index';
import { runRules } from '../run';
import type { Finding } from '../types';
import { Beyond } from './beyond';
import { GATHERING, OF_A_BRANCH } from './rule-reach';

const branchRules = rules.filter(({ meta }) => OF_A_BRANCH.has(meta.id));
const gatheringRules = rules.filter(({ meta }) => GATHERING.has(meta.id));
const homeRules = rules.filter(({ meta }) => !OF_A_BRANCH.has(meta.id) && !GATHERING.has(meta.id));

export const isOfBranch = ({ rule }: Finding): boolean => OF_A_BRANCH.has(rule);
export const isGathered = ({ rule }: Finding): boolean => GATHERING.has(rule);

/** Parts and wires of some branches in a drawing. */
class Place {
  private readonly wires: ReadonlyMap<string, readonly [string, string]>;

  constructor(
    doc: Installation,
    private readonly trunk: ReadonlySet<string>,
    private readonly parts: ReadonlySet<string>,
  ) {
    this.wires = new Map(doc.wires.map(({ id, from, to }) => [id, [from[0], to[0]]]));
  }

  /** What a finding names: these branches, others, the trunk. */
  of({ parts, wires }: Finding): { here: boolean; elsewhere: boolean; trunk: boolean } {
    const ends = wires.map((id) => this.wires.get(id)!.filter((end) => !this.trunk.has(end)));
    const named = [...parts.filter((id) => !this.trunk.has(id)), ...ends.flat()];
    return {
      here: named.some((id) => this.parts.has(id)),
      elsewhere: named.some((id) => !this.parts.has(id)),
      trunk: parts.some((id) => this.trunk.has(id)) || ends.some((list) => list.length === 0) || named.length === 0,
    };
  }
}

const bytes = (findings: readonly Finding[]): string =>
  findings
    .map((finding) => JSON.stringify(finding))
    .sort()
    .join('\n');

/** The findings of some branches, and those of the trunk that are seen beside them. */
function split(findings: readonly Finding[], place: Place): { own: Finding[]; trunk: Finding[]; others: Finding[] } {
  const found = { own: [] as Finding[], trunk: [] as Finding[], others: [] as Finding[] };
  for (const finding of findings) {
    const { here, elsewhere, trunk } = place.of(finding);
    if (here && (elsewhere || trunk)) throw new Beyond(`what ${finding.rule} gathers`);
    (here ? found.own : elsewhere && !trunk ? found.others : found.trunk).push(finding);
  }
  return found;
}

export interface FindingsInput {
  /** findings before the edit by the rules that look at one branch */
  known: readonly Finding[];
  before: { doc: Installation; parts: ReadonlySet<string>; excerpt: () => Context };
  after: { doc: Installation; parts: ReadonlySet<string>; excerpt: Context };
  trunk: ReadonlySet<string>;
}

/** Findings after an edit by the rules that look at one branch. @throws Beyond where they gather more than one */
export function branchFindings({ known, before, after, trunk }: FindingsInput): Finding[] {
  if (runRules(after.excerpt, gatheringRules, rules).length > 0) throw new Beyond('what the neutrals gather');
  const was = split(known, new Place(before.doc, trunk, before.parts));
  const place = new Place(after.doc, trunk, after.parts);
  const is = split(runRules(after.excerpt, branchRules, rules), place);
  if (was.trunk.length + is.trunk.length > 0) {
    // What is said of the trunk may come of any branch: it stands as long as these say the same of it as before.
    const then = split(
      runRules(before.excerpt(), branchRules, rules),
      new Place(before.doc, trunk, before.parts),
    );
    if (bytes(then.trunk) !== bytes(is.trunk)) throw new Beyond('what is said of the trunk');
  }
  return [...was.others, ...was.trunk, ...is.own];
}

/** Findings of the rules that look at the whole home. @throws Beyond where one asks for more than is known */
export const homeFindings = (context: Context): Finding[] => runRules(context, homeRules, rules);
