import { box } from './strokes';
import type { SymbolData } from './types';

/** A part of a kind this version does not know: drawn, named, and left alone. */
export const unknownSymbol: SymbolData = {
  id: 'unknown',
  name: 'unknown kind',
  standard: 'none: the project’s own mark for what it cannot name',
  kinds: [],
  width: 1000,
  height: 1250,
  strokes: [box(0, 0, 1000, 1250), { d: 'M0 0L1000 1250M1000 0L0 1250' }],
  terminals: {},
};
