import { demandGroup } from '../../calculations/demand-group';
import { maximumDemand, type Demand, type DemandItem } from '../../calculations/maximum-demand';
import type { SurveyRoom } from '../../document/schema';
import type { DemandGroup, Practice } from '../../practices/types';
import { OUTLET_WATTS, POWER_FACTOR, startsMotor } from './assumptions';
import type { WayPlan } from './way-plan';

const item = (group: DemandGroup, watts: number, voltage: number, pf: number): DemandItem => ({
  group,
  watts,
  currentA: watts / (voltage * pf),
});

/**
 * Maximum demand of what the survey holds. The charger of a backup source is counted whole, as a load that runs for hours.
 * @param chargeWatts W drawn by the charger
 */
export function surveyDemand(
  rooms: readonly SurveyRoom[],
  ways: readonly WayPlan[],
  chargeWatts: number,
  practice: Practice,
  voltage: number,
): Demand {
  const items: DemandItem[] = [];
  for (const room of rooms) {
    const lighting = room.lamps * room.lampWatts + room.fans * room.fanWatts;
    if (lighting > 0) items.push(item('lighting', lighting, voltage, POWER_FACTOR.lamp));
    for (const { what, watts } of room.heavy)
      items.push(item(demandGroup(what), watts, voltage, startsMotor(what) ? POWER_FACTOR.motor : POWER_FACTOR.heater));
    if (room.keepOutletWatts > 0) items.push(item('sockets', room.keepOutletWatts, voltage, 1));
  }
  for (const way of ways)
    if (way.kind === 'outlets') items.push(item('sockets', way.segments[0]!.outlets.length * OUTLET_WATTS, voltage, 1));
  if (chargeWatts > 0) items.push(item('charging', chargeWatts, voltage, 1));
  return maximumDemand(items, practice);
}
