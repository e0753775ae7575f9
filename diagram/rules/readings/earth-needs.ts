import { adiabaticMm2, kFactor } from '../../calculations/adiabatic';
import type { Cable } from '../../document/schema';
import type { Context } from '../context';
import { figuresOf } from './figures';
import { openRegions } from './open-regions';

/** What a fault asks of the earth core of one cable. */
export interface EarthNeed {
  cable: Cable;
  mm2: number;
  /** id of the device of the way that asks for most */
  device: string;
  /** true where the table decides, for want of the fault's heat */
  byTable: boolean;
  wires: Set<string>;
  points: Set<string>;
}

/** Table 54.2 of IEC 60364-5-54 (54.7 of BS 7671): by the line conductor, where the heat of the fault is not known. */
export const tableMm2 = (lineMm2: number): number => (lineMm2 <= 16 ? lineMm2 : lineMm2 <= 35 ? 16 : lineMm2 / 2);

const isCutOff = (context: Context, ids: readonly string[]): boolean =>
  openRegions(context).some(({ points, onMains = [] }) => [...points, ...onMains].some((id) => ids.includes(id)));

/** The need of every cable with an earth core on the way to something earthed: the most of all ways behind it. */
export function earthNeeds(context: Context): EarthNeed[] {
  const { graph } = context;
  const { ways, earth } = figuresOf(context);
  const found = new Map<string, EarthNeed>();
  // By the table only beside a line core: its size is what the table goes by.
  const shared = new Set(
    context.document.wires.flatMap(({ role, cable }) => (cable !== undefined && role !== 'earth' ? [cable] : [])),
  );
  for (const { drawn, fault: own, feeder, device } of ways.values()) {
    const fault = own ?? feeder?.fault;
    const ends = drawn.map(({ part, isPoint }) => ({ part, node: graph.node(part.id, isPoint ? 'E' : 'in.E') }));
    if (feeder) ends.push({ part: feeder.at, node: feeder.earth });
    // A way that the mains do not reach for a gap in the line is judged once it is closed, by its fault and not by the
    // table.
    if (!fault && isCutOff(context, ends.map(({ part }) => part.id))) continue;
    // A fault that nothing clears in time is the finding of `slow-disconnection`; its heat has no end.
    if (fault && !(fault.holds && Number.isFinite(fault.energyA2s))) continue;
    for (const { part, node } of ends) {
      for (const number of earth.path(node) ?? []) {
        const { wire } = graph.edges[number]!;
        const cable = wire?.role === 'earth' && wire.cable !== undefined ? graph.cables.get(wire.cable) : undefined;
        if (!wire || !cable || (!fault && !shared.has(cable.id))) continue;
        const asked = fault
          ? adiabaticMm2(fault.energyA2s, kFactor(cable.material, cable.insulation, true))
          : tableMm2(cable.csa);
        const known = found.get(cable.id);
        const need: EarthNeed = known ?? {
          cable,
          mm2: 0,
          device: device.id,
          byTable: !fault,
          wires: new Set(),
          points: new Set(),
        };
        if (asked > need.mm2) Object.assign(need, { mm2: asked, device: device.id, byTable: !fault });
        need.wires.add(wire.id);
        need.points.add(part.id);
        found.set(cable.id, need);
      }
    }
  }
  return [...found.values()];
}
