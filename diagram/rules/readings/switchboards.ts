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

/** Switchboards by place and board. */
export const switchboards = once((context: Context): Switchboard[] => {
  const found = new Map<string, Switchboard>();
  for (const part of context.document.parts) {
    if (part.place === undefined || !isEnclosed(part)) continue;
    const key = `${part.place} ${part.board ?? ''}`;
    const entry = found.get(key) ?? { place: part.place, board: part.board, parts: [] };
    entry.parts.push(part);
    found.set(key, entry);
  }
  return [...found.values()].map((each) => ({ ...each, parts: each.parts.sort(byDesignation) }));
});

/** "the switchboard in Study", "board A in Study" */
export const sayBoard = ({ graph }: Context, { place, board }: Switchboard): string =>
  `${board ? board : 'the switchboard'} in ${graph.places.get(place)?.name ?? place}`;
