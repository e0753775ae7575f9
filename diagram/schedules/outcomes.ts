import { applyPatch } from '../document/patch';
import type { Installation } from '../document/schema';
import { buildContext } from '../rules/context';
import { remediesFor } from '../rules/remedies-for';
import { wayResults } from '../rules/results/way-results';
import type { Finding, Remedy } from '../rules/types';

/** What a way comes to, in the figures that remedies change. */
export interface Outcome {
  ib: number | null;
  in: number | null;
  iz: number | null;
  dropPercent: number | null;
  zs: number | null;
}

export interface TriedRemedy extends Remedy {
  /** of the way, once it is done; null where the way is no more */
  gives: Outcome | null;
}

function outcomeOf(doc: Installation, way: string): Outcome | null {
  const result = wayResults(buildContext(doc)).find(({ part }) => part === way);
  return result
    ? { ib: result.ib, in: result.in, iz: result.iz, dropPercent: result.dropPercent, zs: result.zs }
    : null;
}

/** The edits that put a finding right, each with what the way would come to. Every one of them was tried. */
export const triedRemedies = (doc: Installation, finding: Finding, way: string | null): TriedRemedy[] =>
  remediesFor(doc, finding).map((remedy) => ({
    ...remedy,
    gives: way === null ? null : outcomeOf(applyPatch(doc, remedy.patch), way),
  }));
