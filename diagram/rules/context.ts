import type { Installation } from '../document/schema';

/** Everything a rule may look at: the document and what was worked out from it once, before any rule ran. */
export interface Context {
  document: Installation;
}
