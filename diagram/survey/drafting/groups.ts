import type { End, Installation, PartOf, Wire } from '../../document/schema';
import { isBar } from '../../document/kinds';
import { traceFeeds } from '../../terminals/feeds';
import { RCD_RATINGS, WAYS_PER_RCD } from './assumptions';
import type { WayBars } from './draw-way';
import { BOARD, drawBars, type Pair } from './house';
import { HOUSE } from './ids';
import type { Sketch } from './sketch';

/** A 30 mA rcd that is drawn, with the bars of its ways. */
export interface Group {
  rcd: PartOf<'rcd'>;
  backup: boolean;
  bars: WayBars;
  ways: number;
}

/** The bar of a kind that a terminal is wired to straight. */
function barAt(sketch: Sketch, end: End, kind: 'line-bar' | 'neutral-bar'): string | undefined {
  for (const id of sketch.wiresAt(end)) {
    const { from, to } = sketch.getWire(id);
    const other = from[0] === end[0] && from[1] === end[1] ? to[0] : from[0];
    if (sketch.find(other)?.kind === kind) return other;
  }
  return undefined;
}

/** The groups of ways of a drawing, drafted or by hand: rcds of 30 mA or less whose poles go to a line and a neutral bar. */
export function findGroups(doc: Installation, sketch: Sketch): Group[] {
  const feeds = traceFeeds(doc);
  const earthBar = doc.parts.find(({ kind }) => kind === 'earth-bar')?.id;
  const icn = Math.min(...doc.parts.flatMap((part) => (part.kind === 'mcb' && part.icn ? [part.icn] : [])), 10_000);
  if (!earthBar) return [];
  return doc.parts.flatMap((part): Group[] => {
    if (part.kind !== 'rcd' || (part.sensitivity ?? 1) > 0.03) return [];
    const lineBar = barAt(sketch, [part.id, '2'], 'line-bar');
    const neutralBar = barAt(sketch, [part.id, '4'], 'neutral-bar');
    const bar = lineBar === undefined ? undefined : sketch.find(lineBar);
    if (!bar || !neutralBar || bar.place === undefined) return [];
    const bars = { lineBar: bar.id, neutralBar, earthBar, place: bar.place, board: bar.board ?? 'Board', icn };
    const ways = doc.wires.filter(({ from, to }) => from[0] === bar.id || to[0] === bar.id).length - 1;
    return [{ rcd: part, backup: feeds.parts.get(part.id) === 'backup', bars, ways }];
  });
}

/** The group with most room for another way; undefined where all are full. */
export const roomiest = (groups: readonly Group[]): Group | undefined =>
  groups.filter(({ ways }) => ways < WAYS_PER_RCD).sort((a, b) => a.ways - b.ways)[0];

const isOnBar = (sketch: Sketch, { from }: Wire): boolean => isBar(sketch.find(from[0])!.kind);

/** What feeds an rcd, where another feeder can be hung beside it; undefined where that cannot be told from the drawing. */
function feedersOf(sketch: Sketch, rcd: PartOf<'rcd'>): { line: Wire; neutral: Wire; bars: boolean } | undefined {
  const line = sketch.arriving([rcd.id, '1']);
  const neutral = sketch.arriving([rcd.id, '3']);
  if (!line || !neutral || rcd.place === undefined) return undefined;
  const bars = isOnBar(sketch, line);
  const fits = bars === isOnBar(sketch, neutral) && (bars || !sketch.find(HOUSE.lineBar));
  return fits ? { line, neutral, bars } : undefined;
}

export const canTapBeside = (sketch: Sketch, { rcd }: Group): boolean => feedersOf(sketch, rcd) !== undefined;

/** A place to hang another feeder beside a group that is drawn: the bars that feed it, or new bars put before it. */
export function tapBeside(sketch: Sketch, { rcd }: Group): Pair | undefined {
  const feeders = feedersOf(sketch, rcd);
  if (!feeders) return undefined;
  const { line, neutral, bars } = feeders;
  if (bars) return { line: sketch.nextOn(line.from[0]), neutral: sketch.nextOn(neutral.from[0]) };
  const taps = drawBars(
    sketch,
    { line: line.from, neutral: neutral.from },
    {
      line: HOUSE.lineBar,
      neutral: HOUSE.neutralBar,
      place: rcd.place!,
      board: rcd.board ?? BOARD,
      ratingA: rcd.rating ?? RCD_RATINGS[RCD_RATINGS.length - 1]!,
    },
  );
  const moved = taps();
  sketch.moveStart(line.id, moved.line);
  sketch.moveStart(neutral.id, moved.neutral);
  return taps();
}
