import { canonical, type Installation, type PracticeId } from '../../document/schema';
import { evaluate } from '../../circuit/evaluate';
import { buildGraph } from '../../terminals/graph';
import { buildContext, type Context } from '../context';
import type { Examination } from '../examination';
import { examineContext } from '../examine';
import { backupResults } from '../results/backup-results';
import { loadVolts, rowsOf } from '../results/load-results';
import { supplyResult } from '../results/supply-result';
import { compareFindings } from '../run';
import type { Finding } from '../types';
import { Beyond } from './beyond';
import { branchesOf, carriers, findBranches, type Branches } from './branches';
import { differenceOf, type Difference } from './difference';
import { branchFindings, homeFindings, isGathered, isOfBranch } from './merged-findings';
import { mergeContexts } from './merged-context';
import { mergedWays, voltsOf } from './merged-results';
import { isQuiet } from './quiet';
import { isRegular, leaning } from './regular';
import { excerptOf, touchedBy, type Touched } from './touched';

/** What is kept of the last examination. */
interface Known {
  doc: Installation;
  context: Context;
  result: Examination;
  /** null where the drawing does not fall into trunk and branches; undefined until it is asked for */
  shape?: Shape | null;
}

interface Shape extends Branches {
  /** points that draw over a cable of the trunk */
  leaning: ReadonlySet<string>;
  /** how many positions of the two-way and cross switches were looked at */
  positions: number;
  branchFindings: readonly Finding[];
}

export interface Examiner {
  /** The same as `examine`, byte for byte; after an edit of some ways only those are looked at again. */
  examine(doc: Installation): Examination;
  /** Examinations so far: of a whole home, and of what an edit touched alone. */
  readonly count: { whole: number; part: number };
}

function shapeOf({ context, result }: Known): Shape | null {
  const branches = findBranches(context.graph);
  if (!isRegular(context, branches.trunk) || result.findings.some(isGathered)) return null;
  return {
    ...branches,
    leaning: leaning(context, branches.trunk),
    positions: context.evaluation.positions.count,
    branchFindings: result.findings.filter(isOfBranch),
  };
}

/** The trunk with the touched branches after an edit, examined. @throws Beyond where it is no longer that */
function excerptAfter(doc: Installation, practice: PracticeId, shape: Shape, { before, after }: Touched): Context {
  const { trunk } = shape;
  // With the parts that are gone: a wire that still leads to one is loose, and shows.
  const now = buildContext(excerptOf(doc, trunk, new Set([...before, ...after])), practice);
  if (carriers(now.graph, trunk).length > 0) throw new Beyond('what a branch carries');
  const { sets, count } = now.evaluation.positions;
  if (sets.length > 0 && count !== shape.positions) throw new Beyond('the positions of the switches');
  if (!isRegular(now, trunk) || leaning(now, trunk).size > 0) throw new Beyond('what a branch is joined to');
  return now;
}

/** V at every load: as before where the edit moves no current, else of the whole net. */
function voltsAfter(doc: Installation, known: Known, difference: Difference) {
  if (isQuiet(known.doc, doc, difference)) return voltsOf(known.result.loads);
  const graph = buildGraph(doc);
  return new Map(evaluate(graph).evaluated.map((each) => [each.condition.name, loadVolts({ graph }, each)] as const));
}

/** Examines what an edit touched and puts the home together again. @throws Beyond where that does not tell all */
function examinePart(doc: Installation, practice: PracticeId, known: Known, difference: Difference): Known {
  if (known.shape === undefined) known.shape = shapeOf(known);
  const { shape } = known;
  if (!shape) throw new Beyond('how the drawing falls into branches');
  const { trunk } = shape;
  const touched = touchedBy(known.doc, doc, difference, shape);
  for (const id of touched.before) if (shape.leaning.has(id)) throw new Beyond('what flows in the trunk');
  const now = excerptAfter(doc, practice, shape, touched);
  const context = mergeContexts(doc, known.context, now, touched, trunk);
  const ofBranches = branchFindings({
    known: shape.branchFindings,
    before: {
      doc: known.doc,
      parts: touched.before,
      excerpt: () => buildContext(excerptOf(known.doc, trunk, touched.before), practice),
    },
    after: { doc, parts: touched.after, excerpt: now },
    trunk,
  });
  const result: Examination = {
    schema: 1,
    title: doc.title,
    findings: [...ofBranches, ...homeFindings(context)].sort(compareFindings),
    ways: mergedWays(context, now, known.result.ways, touched.after, trunk),
    supply: supplyResult(context),
    backup: backupResults(context),
    loads: rowsOf(context, voltsAfter(doc, known, difference)),
  };
  const branchOf = new Map([...shape.branchOf].filter(([id]) => !touched.before.has(id)));
  for (const [id, key] of branchesOf(now.graph, trunk)) branchOf.set(id, key);
  return { doc, context, result, shape: { ...shape, branchOf, branchFindings: ofBranches } };
}

/**
 * Remembers what it worked out for the last document and examines only what the difference can affect: the trunk and the
 * branches that an edit touches, put together with what is known of the others. Where a drawing is irregular, or an edit
 * touches the trunk, the home is examined from scratch.
 * @param practice judges by this practice instead of the document's own
 */
export function createExaminer(practice?: PracticeId): Examiner {
  let known: Known | undefined;
  const count = { whole: 0, part: 0 };

  function whole(doc: Installation): Known {
    count.whole++;
    const context = buildContext(doc, practice ?? doc.practice);
    return { doc, context, result: examineContext(context) };
  }

  function next(doc: Installation): Known {
    if (!known) return whole(doc);
    const difference = differenceOf(known.doc, doc);
    const { parts, wires, cables, common } = difference;
    if (!common && parts.length + wires.length + cables.length === 0)
      return { ...known, doc, result: { ...known.result, title: doc.title } };
    try {
      const part = examinePart(doc, practice ?? doc.practice, known, difference);
      count.part++;
      return part;
    } catch (error) {
      if (error instanceof Beyond) return whole(doc);
      throw error;
    }
  }

  return {
    count,
    examine(doc) {
      known = next(canonical(doc));
      return known.result;
    },
  };
}
