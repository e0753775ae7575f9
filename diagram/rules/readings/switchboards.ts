import { isBar } from '../../document/kinds';
import { byDesignation } from '../../document/names';
import type { Part } from '../../document/schema';
import { isControl } from '../../terminals/roles-of-parts';
import type { Context } from '../context';
import { once } from './once';

/** An enclosure: what stands under one name in one place. */
export interface Switchboard {
  place: string;
  board: string | undefined;
  parts: Part[];
}

/** Parts that sit in an enclosure with others; lamps, fans, appliances, sources and plugs stand by themselves. */
const isEnclosed = (part: Part): boolean =>
  isControl(part) ||
  isBar(part.kind) ||
  ['socket', 'mcb', 'rcd', 'rcbo', 'fuse', 'isolator', 'changeover'].includes(part.kind);

/** What names the switchboard of a part; undefined for parts that sit in none. */
export const boardOf = (part: Part): string | undefined =>
  part.place === undefined || !isEnclosed(part) ? undefined : `${part.place} ${part.board ?? ''}`;

/** Switchboards by place and board, the parts of each in order of designation. */
export const switchboards = once(({ document }: Context): ReadonlyMap<string, Switchboard> => {
  const found = new Map<string, Switchboard>();
  for (const part of document.parts) {
    const key = boardOf(part);
    if (key === undefined) continue;
    const board = found.get(key) ?? { place: part.place!, board: part.board, parts: [] };
    board.parts.push(part);
    found.set(key, board);
  }
  for (const { parts } of found.values()) parts.sort(byDesignation);
  return found;
});

/** "the switchboard in Study", "board A in Study" */
export const sayBoard = ({ graph }: Context, { place, board }: Switchboard): string =>
  `${board ? board : 'the switchboard'} in ${graph.places.get(place)?.name ?? place}`;
