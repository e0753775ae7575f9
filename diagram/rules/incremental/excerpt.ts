import { findById, type Installation, type Wire } from '../../document/schema';
import type { Shape } from './shape';
import type { Touched } from './touched';

/** A part of the home that shows by itself what is wrong with some branches. */
export interface Excerpt {
  /** what of the trunk stands in it: the root, and the limbs that the branches hang on before the edit or after it */
  spine: ReadonlySet<string>;
  /** the same parts of the drawing before the edit, and after it */
  before(): Installation;
  after(): Installation;
}

/** Some parts of a drawing and the wires among them. */
function take(doc: Installation, parts: Iterable<string>, wires: readonly Wire[]): Installation {
  const cables = new Set(wires.flatMap(({ cable }) => cable ?? []));
  const pick = <T extends { id: string }>(list: readonly T[], ids: Iterable<string>) =>
    [...ids].flatMap((id) => findById(list, id) ?? []);
  const { sheet: _sheet, survey: _survey, ...rest } = doc;
  return { ...rest, parts: pick(doc.parts, parts), wires: [...wires], cables: pick(doc.cables, cables) };
}

/** The touched branches with what they hang on. */
export function excerptOf(
  { trunk, trunkWires, limbOf }: Shape,
  before: Installation,
  after: Installation,
  touched: Touched,
): Excerpt {
  const limbs = new Set<string>();
  for (const wires of [touched.wires.before, touched.wires.after])
    for (const { from, to } of wires)
      for (const [id] of [from, to]) {
        const met = limbOf.get(id);
        if (met !== undefined) limbs.add(met);
      }
  const spine = new Set<string>();
  for (const id of trunk) if (!limbOf.has(id) || limbs.has(limbOf.get(id)!)) spine.add(id);
  const within = trunkWires.filter(({ from, to }) => spine.has(from[0]) && spine.has(to[0]));
  return {
    spine,
    before: () => take(before, [...spine, ...touched.before], [...within, ...touched.wires.before]),
    after: () => take(after, [...spine, ...touched.after], [...within, ...touched.wires.after]),
  };
}
