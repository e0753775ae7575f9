import type { PageCable } from './connections-page';
import { BODY, SMALL, textWidth } from './lettering';
import { m } from './overview-metrics';

/** What an arriving cable takes of a page's upper edge, 1/100 mm. */
export const CORE_PITCH = m(6);
export const CABLE_GAP = m(6);
/** Width of what is written over a cable's brace. */
export const wordsWidth = (cable: PageCable): number =>
  Math.max(0, ...cable.lines.map((line, i) => textWidth(line, i === 0 ? BODY : SMALL)));
