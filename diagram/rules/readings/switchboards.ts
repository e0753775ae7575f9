import { natureOfNode, natureOfRole } from '../../circuit/natures';
import { isBar } from '../../document/kinds';
import { byDesignation } from '../../document/names';
import type { Part } from '../../document/schema';
import type { Feed } from '../../terminals/feeds';
import { isControl } from '../../terminals/roles-of-parts';
import type { Context } from '../context';
import { once } from './once';

/** A part in an enclosure, with the ways whose line runs over its terminals and the sources whose line is landed on it. */
interface Held {
  part: Part;
  ways: readonly string[];
  feeds: readonly Feed[];
}

/** An enclosure: what stands under one name in one place. */
export interface Switchboard {
  place: string;
  board: string | undefined;
  /** in order of designation */
  held: readonly Held[];
  /** ways of which it holds line */
  ways: ReadonlySet<string>;
  /** the first part that holds line of a source: enough to show it */
  sources: ReadonlyMap<Feed, string>;
}

/** Parts that sit in an enclosure with others; lamps, fans, appliances, sources and plugs stand by themselves. */
const isEnclosed = (part: Part): boolean =>
  isControl(part) ||
  isBar(part.kind) ||
  ['socket', 'mcb', 'rcd', 'rcbo', 'fuse', 'isolator', 'changeover'].includes(part.kind);

/** What names the switchboard of a part; undefined for parts that sit in none. */
export const boardOf = (part: Part): string | undefined =>
  part.place === undefined || !isEnclosed(part) ? undefined : `${part.place} ${part.board ?? ''}`;

/** By part, the ways whose line runs over its terminals. */
const waysByPart = once(({ graph, sections, ways }: Context): Map<string, string[]> => {
  const found = new Map<string, string[]>();
  const devices = new Set(ways.map(({ device }) => device));
  for (const { device, nodes } of sections) {
    if (!devices.has(device.id)) continue;
    for (const node of nodes) {
      const { id } = graph.partOf[node]!;
      const known = found.get(id);
      if (!known) found.set(id, [device.id]);
      else if (known.at(-1) !== device.id) known.push(device.id);
    }
  }
  return found;
});

/** By part, the sources whose line is landed on it, in the order of its terminals. */
const feedsByPart = once(({ graph, feeds }: Context): Map<string, Feed[]> => {
  const found = new Map<string, Feed[]>();
  graph.partOf.forEach(({ id, kind }, node) => {
    if (kind === 'neutral-bar' || kind === 'earth-bar' || natureOfNode(graph, node) === 'D') return;
    for (let k = graph.start[node]!; k < graph.start[node + 1]!; k++) {
      const { wire } = graph.edges[graph.around[k]!]!;
      if (!wire || natureOfRole(wire.role) !== 'L') continue;
      const feed = feeds.wires.get(wire.id)!;
      if (feed !== 'none') found.set(id, [...(found.get(id) ?? []), feed]);
    }
  });
  return found;
});

/** @param held of one enclosure */
export function switchboardOf(held: readonly Held[]): Switchboard {
  const { place, board } = held[0]!.part;
  const all = new Set<string>();
  const sources = new Map<Feed, string>();
  for (const { part, ways, feeds } of held) {
    for (const way of ways) all.add(way);
    for (const feed of feeds) if (!sources.has(feed)) sources.set(feed, part.id);
  }
  return { place: place!, board, held, ways: all, sources };
}

/** Switchboards by place and board. */
export const switchboards = once((context: Context): ReadonlyMap<string, Switchboard> => {
  const ways = waysByPart(context);
  const feeds = feedsByPart(context);
  const byBoard = new Map<string, Part[]>();
  for (const part of context.document.parts) {
    const key = boardOf(part);
    if (key === undefined) continue;
    const same = byBoard.get(key);
    if (same) same.push(part);
    else byBoard.set(key, [part]);
  }
  return new Map(
    [...byBoard].map(([key, parts]) => {
      const held = parts
        .sort(byDesignation)
        .map((part) => ({ part, ways: ways.get(part.id) ?? [], feeds: feeds.get(part.id) ?? [] }));
      return [key, switchboardOf(held)] as const;
    }),
  );
});

/** "the switchboard in Study", "board A in Study" */
export const sayBoard = ({ graph }: Context, { place, board }: Pick<Switchboard, 'place' | 'board'>): string =>
  `${board ? board : 'the switchboard'} in ${graph.places.get(place)?.name ?? place}`;
