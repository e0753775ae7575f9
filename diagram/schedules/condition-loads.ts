import type { Part } from '../document/schema';
import { designation } from '../layout/wording';
import type { Context } from '../rules/context';
import { figuresOf } from '../rules/readings/figures';

/** What one source carries in one condition. */
export interface ConditionLoad {
  /** "mains", "outage" ... */
  condition: string;
  /** "mains", or the designation of the inverter */
  source: string;
  /** VA: on mains after diversity, on battery all at once */
  va: number;
  watts: number;
  /** VA that the source, or the least device that all of it passes, is rated for; null where not given */
  limitVa: number | null;
  /** "Q0, 63 A": what sets the limit */
  limitBy: string | null;
}

/** The least rated of the service fuse, the meter, and the main switch: what all of the home passes. */
function mainLimit({ parts, mainSwitch }: Context): Part | null {
  const passed = [...parts('fuse'), ...parts('meter'), ...(mainSwitch ? [mainSwitch] : [])].filter(
    (part) => !(part.kind === 'fuse' && part.standard === 'dc'),
  );
  const rated = passed.filter((part) => 'rating' in part && part.rating !== undefined);
  const of = (part: Part) => ('rating' in part ? part.rating! : Infinity);
  return rated.reduce<Part | null>((least, part) => (!least || of(part) < of(least) ? part : least), null);
}

/** The load of the home by condition and source, in the order of the conditions; a source that carries nothing is left out. */
export function conditionLoads(context: Context): ConditionLoad[] {
  const { drawn, demand } = figuresOf(context);
  const { voltage } = context.document.supply;
  const main = mainLimit(context);
  const mainA = main && 'rating' in main ? main.rating! : null;
  return context.evaluated.flatMap(({ condition, points }): ConditionLoad[] => {
    const bySource = new Map<string, { va: number; watts: number; part: Part }>();
    for (const each of drawn) {
      const state = each.isPoint ? points.get(each.part.id) : undefined;
      if (!state?.fed || !state.source) continue;
      const { part } = state.source;
      const sum = bySource.get(part.id) ?? { va: 0, watts: 0, part };
      bySource.set(part.id, { part, va: sum.va + each.amps * voltage, watts: sum.watts + each.watts });
    }
    return [...bySource.values()].map(({ va, watts, part }) =>
      part.kind === 'inverter'
        ? {
            condition: condition.name,
            source: designation(part),
            va,
            watts,
            limitVa: part.va ?? null,
            limitBy: part.va === undefined ? null : designation(part),
          }
        : {
            condition: condition.name,
            source: 'mains',
            va: demand.demandA * voltage,
            watts: demand.demandWatts,
            limitVa: mainA === null ? null : mainA * voltage,
            limitBy: main && mainA !== null ? `${context.name(main)}, ${mainA} A` : null,
          },
    );
  });
}
