import type { Clause } from './types';

/** Clause pointers for metas. A pointer is seen where a public page quoting the clause was open, else from memory. */
export const seen = (document: string, clause: string): Clause => ({ document, clause, memory: false });
export const recalled = (document: string, clause: string): Clause => ({ document, clause, memory: true });
/** For rules of the trade that lean on no clause. */
export const COMMON_PRACTICE: Clause = { document: 'common practice, no source', clause: '', memory: true };
