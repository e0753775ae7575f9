import type { Installation, PracticeId } from '../../document/schema';
import { findBranches, type BranchOf } from '../../circuit/branches';
import { buildContext, type Context } from '../context';
import type { Examination } from '../examination';
import { branchesIn } from '../readings/branch-nets';
import { backupResults } from '../results/backup-results';
import { supplyResult } from '../results/supply-result';
import { compareFindings } from '../run';
import { Beyond } from './beyond';
import type { Difference } from './difference';
import { excerptOf, type Excerpt } from './excerpt';
import { membersOf } from './members';
import { mergeContexts } from './merged-context';
import { branchFindings, homeFindings } from './merged-findings';
import { mergedRows, netsAfter } from './merged-loads';
import { mergedWays } from './merged-ways';
import { isQuiet } from './quiet';
import { isRegular, leaning } from './regular';
import { shapeOf, type Shape } from './shape';
import { touchedBy, type Touched } from './touched';

/** What is kept of the last examination. */
export interface Known {
  doc: Installation;
  context: Context;
  result: Examination;
  /** null where the drawing does not fall into trunk and branches; undefined until it is asked for */
  shape?: Shape | null;
}

/** The touched branches after an edit, with what they hang on. @throws Beyond where they are no branches any more */
export function contextAfter(practice: PracticeId, shape: Shape, { spine, after }: Excerpt, { keys }: Touched): Context {
  const now = buildContext(after(), practice);
  const branches = findBranches(now.graph, spine);
  branchesIn.give(now, branches);
  if (branches.trunk.size > spine.size) throw new Beyond('what a branch carries');
  const { sets, count } = now.evaluation.positions;
  if (sets.length > 0 && count !== shape.positions) throw new Beyond('the positions of the switches');
  if (!isRegular(now, spine)) throw new Beyond('what a branch is joined to');
  const over = new Set([...leaning(now).values()].flatMap((wires) => [...wires]));
  for (const [key, wires] of shape.leaning)
    if (!keys.has(key) && [...wires].some((wire) => over.has(wire))) throw new Beyond('what flows in the trunk');
  return now;
}

/** The branches of parts after an edit; the same table where it divides no branch and joins none, as most edits do. */
function branchOfAfter(known: BranchOf, now: BranchOf, before: ReadonlySet<string>): BranchOf {
  if (now.size === before.size && [...now].every(([id, key]) => known.get(id) === key)) return known;
  const branchOf = new Map(known);
  for (const id of before) branchOf.delete(id);
  for (const [id, key] of now) branchOf.set(id, key);
  return branchOf;
}

/** The shape after an edit: what is new of the touched branches in the place of what was. */
function shapeAfter(shape: Shape, now: Context, { keys, before }: Touched): Omit<Shape, 'findings' | 'nets'> {
  const branches = branchesIn(now);
  const inPlace = <T>(known: ReadonlyMap<string, T>, anew: ReadonlyMap<string, T>) => {
    const merged = new Map(known);
    for (const key of keys) merged.delete(key);
    for (const [key, value] of anew) merged.set(key, value);
    return merged;
  };
  return {
    ...shape,
    branchOf: branchOfAfter(shape.branchOf, branches.branchOf, before),
    members: inPlace(shape.members, membersOf(now.document, branches).members),
    leaning: inPlace(shape.leaning, leaning(now)),
  };
}

/** Examines what an edit touched and puts the home together again. @throws Beyond where that does not tell all */
export function examinePart(doc: Installation, practice: PracticeId, known: Known, difference: Difference): Known {
  if (known.shape === undefined) known.shape = shapeOf(known.context, known.result.findings);
  const { shape } = known;
  if (!shape) throw new Beyond('how the drawing falls into branches');
  const touched = touchedBy(known.doc, doc, difference, shape);
  const excerpt = excerptOf(shape, known.doc, doc, touched);
  const now = contextAfter(practice, shape, excerpt, touched);
  const context = mergeContexts(doc, known.context, now, touched, excerpt.spine);
  const findings = branchFindings({
    known: shape.findings,
    before: { doc: known.doc, trunk: shape.trunk, parts: touched.before },
    after: { doc, trunk: shape.trunk, parts: touched.after },
    now,
    excerptBefore: () => buildContext(excerpt.before(), practice),
  });
  const quiet = isQuiet(known.doc, doc, difference);
  const nets = quiet ? shape.nets : netsAfter(shape.nets, now, touched);
  const result: Examination = {
    schema: 1,
    title: doc.title,
    findings: [...findings, ...homeFindings(context)].sort(compareFindings),
    ways: mergedWays(context, now, known.result.ways, touched.after, excerpt.spine),
    supply: supplyResult(context),
    backup: backupResults(context),
    loads: mergedRows(context, known.result.loads, touched, quiet ? null : nets),
  };
  return { doc, context, result, shape: { ...shapeAfter(shape, now, touched), findings, nets } };
}
