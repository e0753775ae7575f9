import type { Installation } from '../document/schema';
import { placeBackupSource, placeBoard } from './connections-board';
import type { Page } from './connections-page';
import { LEFT, TOP, putPart, sizeOn, startPage, type PageState } from './connections-page-state';
import { placePageRooms } from './connections-rooms';
import { m } from './overview-metrics';
import type { OverviewPlan } from './overview-plan';

/** Places the parts of one page of the connections face: boards by their bars, rooms by their ways, the loads at the foot. */

/** Positions of all parts of a page that the layout would choose. */
export function planPage(doc: Installation, plan: OverviewPlan, page: Page): PageState['positions'] {
  const state = startPage(doc, plan, page);
  placeBoard(state);
  placeBackupSource(state);
  placePageRooms(state);
  placeRest(state);
  return state.positions;
}

/** What nothing leads to, in rows below all else. */
function placeRest(s: PageState): void {
  let x = LEFT;
  let y = s.positions.size > 0 ? s.bottom + m(8) : TOP.first;
  let row = 0;
  for (const part of s.page.parts) {
    if (s.positions.has(part.id)) continue;
    const { width, height } = sizeOn(s, part);
    if (x > LEFT && x + width > m(170)) {
      x = LEFT;
      y += row + m(8);
      row = 0;
    }
    putPart(s, part, x, y);
    row = Math.max(row, height);
    x += width + m(8);
  }
}
