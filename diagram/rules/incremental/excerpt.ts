import type { Installation } from '../../document/schema';
import type { Shape } from './shape';
import type { Touched } from './touched';

/** A part of the home that shows by itself what is wrong with some branches. */
export interface Excerpt {
  /** what of the trunk stands in it: the root, and the limbs that the branches hang on before the edit or after it */
  spine: ReadonlySet<string>;
  /** the same parts of a drawing, before the edit or after it */
  of(doc: Installation): Installation;
}

function take(doc: Installation, kept: ReadonlySet<string>): Installation {
  const wires = doc.wires.filter(({ from, to }) => kept.has(from[0]) && kept.has(to[0]));
  const cables = new Set(wires.map(({ cable }) => cable));
  const { sheet: _sheet, survey: _survey, ...rest } = doc;
  return {
    ...rest,
    parts: doc.parts.filter(({ id }) => kept.has(id)),
    wires,
    cables: doc.cables.filter(({ id }) => cables.has(id)),
  };
}

/** The touched branches with what they hang on. */
export function excerptOf(
  { trunk, limbOf }: Shape,
  before: Installation,
  after: Installation,
  touched: Touched,
): Excerpt {
  // With the parts that are gone: a wire that still leads to one is loose, and shows.
  const own = new Set([...touched.before, ...touched.after]);
  const limbs = new Set<string>();
  for (const { wires } of [before, after])
    for (const { from, to } of wires) {
      const [one, other] = [own.has(from[0]), own.has(to[0])];
      const met = one === other ? undefined : limbOf.get(one ? to[0] : from[0]);
      if (met !== undefined) limbs.add(met);
    }
  const spine = new Set<string>();
  for (const id of trunk) if (!limbOf.has(id) || limbs.has(limbOf.get(id)!)) spine.add(id);
  const kept = new Set([...spine, ...own]);
  return { spine, of: (doc) => take(doc, kept) };
}
