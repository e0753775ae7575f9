import type { Context } from './context';
import { once } from './readings/once';
import type { Remedy, Rule } from './types';

/** Every part but the first with the next free number of the same letters. */
function renumber({ document, graph }: Context, ref: string, ids: readonly string[]): Remedy[] {
  const letters = ref.replace(/\d+$/, '');
  const used = new Set(document.parts.map((part) => part.ref));
  let next = 1;
  const parts = ids.slice(1).map((id) => {
    while (used.has(`${letters}${next}`)) next++;
    used.add(`${letters}${next}`);
    return { ...graph.parts.get(id)!, ref: `${letters}${next}` };
  });
  return [{ label: `Call the other ${parts.map((part) => part.ref).join(', ')}`, patch: { set: { parts } } }];
}

/** By designation, the parts that carry it. */
export const byRef = once(({ document }: Context): ReadonlyMap<string, string[]> => {
  const found = new Map<string, string[]>();
  for (const { id, ref } of document.parts) {
    if (!ref) continue;
    const same = found.get(ref);
    if (same) same.push(id);
    else found.set(ref, [id]);
  }
  return found;
});

/** One designation on two parts. */
export const duplicateRef: Rule = {
  meta: {
    id: 'duplicate-ref',
    severity: 'defect',
    group: 'drawing',
    title: 'One designation names two parts',
    clauses: [{ document: 'IEC 81346-1', clause: '', memory: true }],
    lesson: 'The circuit chart says Q4 is off. There are two of them, and the other one is not.',
    remedy: 'Give one of them the next free number.',
  },
  *check(context) {
    for (const [ref, ids] of byRef(context)) {
      if (ids.length < 2) continue;
      yield {
        heading: `${ref} names ${ids.length} parts`,
        message: `${ids.length} parts carry the designation ${ref}. Charts, lists and findings cannot tell them apart.`,
        parts: ids,
        get remedies() {
          return renumber(context, ref, ids);
        },
      };
    }
  },
};
