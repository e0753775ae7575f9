import { natureOfNode, natureOfRole } from '../circuit/natures';
import type { Feed } from '../terminals/feeds';
import { seen } from './clauses';
import type { Context } from './context';
import { sayBoard, switchboards, type Switchboard } from './readings/switchboards';
import { once } from './readings/once';
import type { Rule } from './types';
import { capital } from './readings/words';

/** By part, the sources whose line is landed on it, in the order of its terminals. */
export const feedsByPart = once(({ graph, feeds }: Context): Map<string, Feed[]> => {
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

/** Parts of a switchboard that hold line of a source: the first of each is enough to show it. */
function sourcesIn(feeds: ReadonlyMap<string, readonly Feed[]>, { parts }: Switchboard): Map<Feed, string> {
  const found = new Map<Feed, string>();
  for (const { id } of parts)
    for (const feed of feeds.get(id) ?? []) if (!found.has(feed)) found.set(feed, id);
  return found;
}

/** An enclosure with conductors of two sources and no warning notice. */
export const twoSourcesUnmarked: Rule = {
  meta: {
    id: 'two-sources-unmarked',
    severity: 'advice',
    group: 'separation',
    title: 'Two sources in one enclosure, and no notice',
    clauses: [seen('BS 7671', '514.15.1')],
    lesson:
      'Whoever opens it switches off the breaker he knows. The other half is fed from the battery and stays live under his fingers.',
    remedy: 'Fix a notice: two sources, isolate both.',
  },
  *check(context) {
    if (context.parts('inverter').length === 0) return;
    const feeds = feedsByPart(context);
    for (const board of switchboards(context).values()) {
      const sources = sourcesIn(feeds, board);
      if (!sources.has('mains') || !sources.has('backup')) continue;
      const noticed = context.document.notices?.some(
        (notice) =>
          notice.place === board.place &&
          (notice.board === undefined || notice.board === board.board) &&
          notice.text.trim() !== '',
      );
      if (noticed) continue;
      yield {
        heading: `Two sources in ${sayBoard(context, board)}, no notice`,
        message: `${capital(sayBoard(context, board))} holds conductors of mains and of backup, and no warning notice is fixed to it.`,
        parts: [sources.get('mains')!, sources.get('backup')!],
        remedies: [
          {
            label: 'Write the notice',
            patch: {
              set: {
                notices: [
                  ...(context.document.notices ?? []),
                  {
                    place: board.place,
                    ...(board.board && { board: board.board }),
                    text: 'Two sources: isolate the mains and the backup before work.',
                  },
                ],
              },
            },
          },
        ],
      };
    }
  },
};
