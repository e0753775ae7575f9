import type { Installation } from '../document/schema';

/**
 * Keeps what was worked out of a document as long as somebody holds the document: a face and all its pages are drawn from
 * one plan. Documents are never changed in place, so the same object is the same drawing.
 */
export function perDocument<T>(work: (doc: Installation) => T): (doc: Installation) => T {
  const known = new WeakMap<Installation, { value: T }>();
  return (doc) => {
    const kept = known.get(doc);
    if (kept) return kept.value;
    const value = work(doc);
    known.set(doc, { value });
    return value;
  };
}
