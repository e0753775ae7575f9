import type { Stroke, SymbolData } from '@/diagram/symbols/types';

const styleOf = ({ weight, fill, dash }: Stroke): string => `${weight} ${fill} ${dash}`;
/** A path may begin with a relative move; behind another it would be taken from that one's end. */
const absolute = (d: string): string => (d.startsWith('m') ? `M${d.slice(1)}` : d);

const joined = new WeakMap<readonly Stroke[], readonly Stroke[]>();

/** The strokes of a symbol with neighbours of one style drawn as one path: a canvas of many parts has fewer elements. */
export function joinedStrokes({ strokes }: Pick<SymbolData, 'strokes'>): readonly Stroke[] {
  const known = joined.get(strokes);
  if (known) return known;
  const made: Stroke[] = [];
  for (const stroke of strokes) {
    const last = made.at(-1);
    // What is filled stays a path of its own: overlapping fills would cut holes into each other.
    const joins = last && styleOf(last) === styleOf(stroke) && (stroke.fill ?? 'none') === 'none';
    if (joins) made[made.length - 1] = { ...last, d: `${last.d}${absolute(stroke.d)}` };
    else made.push({ ...stroke, d: absolute(stroke.d) });
  }
  joined.set(strokes, made);
  return made;
}
