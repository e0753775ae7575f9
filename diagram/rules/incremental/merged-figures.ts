import type { Drawn } from '../../circuit/drawn';
import { asksAlike, type WayLoad } from '../../circuit/way-demand';
import { addUp, type Figures, type WayFigures } from '../../circuit/way-figures';
import { mustBe, onlyKnown } from './beyond';
import { mergedList, mergedMap } from './merging';
import type { Touched } from './touched';

/** Devices of the trunk that the current of some parts passes; of all parts where none are given. */
function passed(drawn: readonly Drawn[], trunk: ReadonlySet<string>, parts?: ReadonlySet<string>): string {
  const found = new Set<string>();
  const seen = new Set<readonly string[]>();
  for (const { part, lineDevices, neutralDevices } of drawn) {
    if (parts && !parts.has(part.id)) continue;
    for (const ids of [lineDevices, neutralDevices]) {
      if (seen.has(ids)) continue;
      seen.add(ids);
      for (const id of ids) if (trunk.has(id)) found.add(id);
    }
  }
  return [...found].sort().join(' ');
}

/** Demands that stand: none of their ways asks for something else than before. */
function demandsAfter(
  { demands, loads: before }: Figures,
  loads: ReadonlyMap<string, WayLoad>,
  touched: Touched,
): Figures['demands'] {
  const changed = [...new Set([...touched.before, ...touched.after])].filter((id) => {
    const [was, is] = [before.get(id), loads.get(id)];
    return was && !(is && asksAlike(was, is));
  });
  if (changed.length === 0) return demands;
  return new Map([...demands].filter(([, { ways }]) => !changed.some((id) => ways.includes(id))));
}

/** A home in numbers after an edit. @param spine what of the trunk `now` has  @throws Beyond */
export function mergeFigures(known: Figures, now: Figures, touched: Touched, spine: ReadonlySet<string>): Figures {
  const { practice } = known;
  const points = ({ drawn }: Figures) => drawn.filter(({ isPoint }) => isPoint);
  const drawn = mergedList(points(known), points(now), touched, ({ part }) => part.id);
  for (const each of now.drawn) if (!each.isPoint) drawn.push(each);
  // Where the touched branches pass the same devices as before, all of them together do.
  const alike = passed(known.drawn, spine, touched.before) === passed(now.drawn, spine, touched.after);
  mustBe(alike || passed(known.drawn, spine) === passed(drawn, spine), 'what the trunk feeds');
  const loads = mergedMap(known.loads, now.loads, touched);
  const together = addUp(drawn, loads, practice, demandsAfter(known, loads, touched));
  const ways = mergedMap(known.ways, now.ways, touched);
  for (const id of spine) {
    const figures = ways.get(id);
    const ends = [[figures, touched.before], [now.ways.get(id), touched.after]] as const;
    // A feeder is judged by its worst end: where that is no touched one, before and after, it stands.
    mustBe(!ends.some(([each, parts]) => each?.feeder && parts.has(each.feeder.at.id)), 'where a feeder ends');
    if (figures) ways.set(id, { ...figures, ...together.carriedBy(id) } satisfies WayFigures);
  }
  return onlyKnown<Figures>('the figures', { practice, drawn, loads, ways, ...together });
}
