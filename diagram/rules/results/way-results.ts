import type { SectionCable } from '../../circuit/way-cables';
import type { WayFigures } from '../../circuit/way-figures';
import type { Context } from '../context';
import type { WayResult } from '../examination';
import { figuresOf } from '../readings/figures';
import { round, roundOrNull } from './round';

/** The cable that decides: the least capacity in proportion to what it must carry; null where one is not known. */
function deciding(cables: readonly SectionCable[]): SectionCable | null {
  if (cables.length === 0 || cables.some(({ capacity }) => capacity === null)) return null;
  const spare = ({ capacity, needA }: SectionCable) => capacity!.izA / (needA ?? 1);
  return cables.reduce((worst, cable) => (spare(cable) < spare(worst) ? cable : worst));
}

/** The residual-current device that the way's loads lie behind on mains. */
function rcdOf({ evaluated }: Context, { section }: WayFigures): string | null {
  for (const { condition, points } of evaluated) {
    if (condition.base !== 'mains') continue;
    for (const part of section.points) {
      const rcd = points.get(part.id)?.rcd;
      if (rcd) return rcd;
    }
  }
  return null;
}

/** The figures of every way, as the schedule prints them. */
export function wayResults(context: Context): WayResult[] {
  const { ways } = figuresOf(context);
  return context.ways.map(({ device, label }) => {
    const figures = ways.get(device)!;
    const cable = deciding(figures.cables);
    const fault = figures.fault ?? figures.feeder?.fault;
    return {
      part: device,
      label,
      ib: roundOrNull(figures.ibA),
      in: figures.inA,
      iz: roundOrNull(cable?.capacity?.izA ?? null),
      capacity: cable?.capacity?.tableA ?? null,
      dropPercent: roundOrNull(figures.worstDrop?.percent ?? null),
      zs: roundOrNull(fault?.zs ?? null),
      zsMax: roundOrNull(fault?.zsMax ?? null),
      disconnects: roundOrNull(fault?.clearedS ?? null),
      rcd: rcdOf(context, figures),
      connectedWatts: round(figures.connectedWatts),
      demandWatts: round(figures.demandWatts ?? figures.connectedWatts),
      points: figures.section.points.length,
    };
  });
}
