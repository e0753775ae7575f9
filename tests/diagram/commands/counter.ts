import type { NewId } from '@/diagram/commands/types';

/** Ids in order, for tests: n1, n2 ... */
export function counter(prefix = 'n'): NewId {
  let n = 0;
  return () => `${prefix}${++n}`;
}
