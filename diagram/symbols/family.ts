import type { Kind } from '../document/schema';
import type { SymbolData } from './types';

/** What is drawn and where its terminals lie; names come from the family. */
export type Shape = Pick<SymbolData, 'width' | 'height' | 'strokes' | 'texts' | 'terminals'>;

/**
 * The two pictures of a kind. The overview may let one pole stand for all; the connections face shows every terminal,
 * with a picture for one pole and one for two where the kind has both.
 */
export interface SymbolFamily {
  id: string;
  /** for the legend */
  name: string;
  /** what the standard calls it */
  standard: string;
  kinds: readonly Kind[];
  overview: Shape;
  connections: Shape | { one: Shape; two: Shape };
}
