import { externalOhm, deviceOf } from '../../circuit/way-faults';
import type { WayFigures } from '../../circuit/way-figures';
import type { Part } from '../../document/schema';
import type { Context } from '../context';
import type { Remedy } from '../types';
import { exceeds } from './amounts';
import { figuresOf } from './figures';
import { rcboInPlace } from './rcbo-remedy';
import { changePart } from './remedies';

/** A way or feeder with a fault to earth that nothing clears in time, and where. */
export type SlowWay = WayFigures & { fault: NonNullable<WayFigures['fault']>; at: Part };

/**
 * Ways on mains, and feeders of other boards, whose fault to earth nothing clears in time. Where a device is not fully
 * rated
 * the question stays open.
 */
export function slowWays(context: Context): SlowWay[] {
  return [...figuresOf(context).ways.values()].flatMap((way): SlowWay[] => {
    const fault = way.fault ?? way.feeder?.fault;
    const at = way.faultAt?.part ?? way.feeder?.at;
    return fault && at && !fault.holds && deviceOf(way.device) !== null ? [{ ...way, fault, at }] : [];
  });
}

/** The supply's own loop is too large already: one cause for all such ways. */
export const bySupply = ({ document }: Context, { fault }: SlowWay): boolean => {
  const external = externalOhm(document.supply);
  return fault.zsMax !== null && external !== undefined && exceeds(external, fault.zsMax);
};

/** A type that opens on less current, where the loop is small enough for it. */
function quickerCurve({ device, fault }: SlowWay): Remedy[] {
  if (device.kind !== 'mcb' && device.kind !== 'rcbo') return [];
  const factor = { B: 1, C: 2, D: 4 } as const;
  const slower = factor[device.curve ?? 'C'];
  const fits = (['C', 'B'] as const).find(
    (curve) => factor[curve] < slower && fault.zsMax !== null && fault.zs <= (fault.zsMax * slower) / factor[curve],
  );
  return fits ? [changePart(`Fit type ${fits}`, device, { curve: fits })] : [];
}

/** What puts one slow way right. */
export const remediesOf = (context: Context, way: SlowWay): Remedy[] => [
  ...quickerCurve(way),
  ...rcboInPlace(context, way.device.id),
];
