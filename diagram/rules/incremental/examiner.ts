import { canonical, type Installation, type Part, type PracticeId } from '../../document/schema';
import { buildContext } from '../context';
import type { Examination } from '../examination';
import { examineContext } from '../examine';
import { Beyond } from './beyond';
import { differenceOf, isNone, without, type Difference } from './difference';
import { examinePart, type Known } from './examine-part';
import { relabel, relabelled } from './labels';

/** A document with some of its parts as they were. */
const withParts = (doc: Installation, old: ReadonlyMap<string, Part>): Installation =>
  old.size === 0 ? doc : { ...doc, parts: doc.parts.map((part) => old.get(part.id) ?? part) };

export interface Examiner {
  /** The same as `examine`, byte for byte; after an edit of some ways only those are looked at again. */
  examine(doc: Installation): Examination;
  /** Examinations so far: of a whole home, of what an edit touched alone, and of an edit that touches no result. */
  readonly count: { whole: number; part: number; none: number };
}

/**
 * Remembers what it worked out for the last document and examines only what the difference can affect: the branches that an
 * edit touches with what they hang on, put together with what is known of the others. Where a drawing is irregular, or an
 * edit touches the trunk, the home is examined from scratch.
 * @param practice judges by this practice instead of the document's own
 */
export function createExaminer(practice?: PracticeId): Examiner {
  let known: Known | undefined;
  const count = { whole: 0, part: 0, none: 0 };

  function whole(doc: Installation): Known {
    count.whole++;
    const context = buildContext(doc, practice ?? doc.practice);
    return { doc, context, result: examineContext(context) };
  }

  /** @param difference of the document from the last one that was examined */
  function next(last: Known, doc: Installation, difference: Difference): Known {
    if (isNone(difference)) {
      count.none++;
      return { ...last, doc };
    }
    try {
      const part = examinePart(doc, practice ?? doc.practice, last, difference);
      count.part++;
      return part;
    } catch (error) {
      if (!(error instanceof Beyond)) throw error;
      return whole(doc);
    }
  }

  return {
    count,
    examine(input) {
      const doc = canonical(input);
      if (!known) {
        known = whole(doc);
        return known.result;
      }
      const difference = differenceOf(known.doc, doc);
      const old = relabelled(known.doc, doc, difference);
      known = next(known, withParts(doc, old), without(difference, old));
      const { result } = known;
      return { ...result, title: doc.title, ways: relabel(result.ways, doc, old) };
    },
  };
}
