import type { Context } from './context';
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
    const byRef = new Map<string, string[]>();
    for (const { id, ref } of context.document.parts) {
      if (!ref) continue;
      const same = byRef.get(ref);
      if (same) same.push(id);
      else byRef.set(ref, [id]);
    }
    for (const [ref, ids] of byRef) {
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
