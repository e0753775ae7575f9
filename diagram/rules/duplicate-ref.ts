import type { Rule } from './types';

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
    for (const { id, ref } of context.document.parts) if (ref) byRef.set(ref, [...(byRef.get(ref) ?? []), id]);
    for (const [ref, ids] of byRef) {
      if (ids.length < 2) continue;
      yield {
        heading: `${ref} names ${ids.length} parts`,
        message: `${ids.length} parts carry the designation ${ref}. Charts, lists and findings cannot tell them apart.`,
        parts: ids,
      };
    }
  },
};
