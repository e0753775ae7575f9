import { recalled } from './clauses';
import type { Context } from './context';
import { deadRegions } from './readings/dead-regions';
import { earthGaps } from './readings/earth-gaps';
import { potentials } from './readings/potentials';
import type { Rule, Violation } from './types';
import { be, capital, sayParts } from './readings/words';

/** Points with line but no neutral of any source, by the conditions in which that is so. */
function withoutNeutral(context: Context): Map<string, Map<string, number>> {
  const { neutral } = potentials(context);
  const byConditions = new Map<string, Map<string, number>>();
  const swapped = new Set(earthGaps(context).filter(({ on }) => on === 'neutral').flatMap(({ parts }) => parts));
  const names = new Map<string, { names: string[]; end: number }>();
  for (const { condition, points } of context.evaluated) {
    for (const state of points.values()) {
      if (!state.source || state.fed) continue;
      // A backed-up point whose neutral is there on mains and gone on battery is another matter: backup-neutral-lost.
      if (condition.base !== 'mains' && neutral[state.neutralEnd] === 1) continue;
      const entry = names.get(state.part.id) ?? { names: [], end: state.neutralEnd };
      entry.names.push(condition.name);
      names.set(state.part.id, entry);
    }
  }
  for (const [id, entry] of names) {
    if (swapped.has(id) && potentials(context).earth[entry.end] === 1) continue;
    const key = entry.names.join(' ');
    byConditions.set(key, (byConditions.get(key) ?? new Map<string, number>()).set(id, entry.end));
  }
  return byConditions;
}

/** A load with line but no way back; one finding for each gap. */
export const openNeutral: Rule = {
  meta: {
    id: 'open-neutral',
    severity: 'defect',
    group: 'polarity',
    title: 'A load has line but no way back',
    clauses: [recalled('IEC 60364-6', '6.4.3.2')],
    lesson:
      'Current needs a way back to its source. Without a neutral the load does not work, and worse: its neutral terminal, which everybody ' +
      'takes for harmless, stands at line voltage through the load.',
    remedy: 'Join the neutral to the neutral bar of its own way.',
  },
  *check(context) {
    const { line, neutral, earth } = potentials(context);
    for (const [names, ends] of withoutNeutral(context)) {
      const stops = (node: number) => line[node] === 1 || neutral[node] === 1 || earth[node] === 1;
      for (const region of deadRegions(context, ends, stops)) {
        if (region.hanging) continue;
        const who = sayParts(context, region.points);
        const end = ends.get(region.points[0]!)!;
        const where = region.gap.length > 0 ? ` The way back ends at ${sayParts(context, region.gap)}.` : '';
        const violation: Violation = {
          heading: `${capital(who)} ${be(region.points.length)} without neutral`,
          message: `Line arrives at ${who}, but no neutral leads back to the source.${where} Beyond the break the neutral stands at line voltage.`,
          parts: [...region.gap, ...region.points],
          wires: region.wires,
          conditions: names.split(' '),
        };
        if (earth[end] === 1)
          yield {
            ...violation,
            severity: 'danger',
            heading: `${capital(who)} ${region.points.length === 1 ? 'returns' : 'return'} through the earth`,
            message: `The neutral of ${who} is joined to the earth, which is no way back: load current runs in the earth, and an rcd trips as soon as it is switched on.`,
          };
        else if (line[end] === 1)
          yield { ...violation, message: `Both ends of ${who} are joined to line: no neutral leads back to the source, and nothing works.` };
        else yield violation;
      }
    }
  },
};
