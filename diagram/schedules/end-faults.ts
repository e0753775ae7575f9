import { prospectiveA } from '../calculations/prospective-current';
import type { Drawn } from '../circuit/drawn';
import { shortCircuitA } from '../circuit/loads';
import { externalOhm } from '../circuit/way-faults';
import type { WayFigures } from '../circuit/way-figures';
import { lacksCable, ohmOf, supplySide } from '../circuit/way-paths';
import type { Context } from '../rules/context';
import { figuresOf } from '../rules/readings/figures';

/** The prospective currents of a way, A; null where a value is missing. Least currents: hot conductors, factor Cmin. */
export interface EndFaults {
  /** the point farthest from the source, by resistance */
  at: Drawn | null;
  lineNeutral: number | null;
  lineEarth: number | null;
  /** all that the backup source can drive, where the way lies behind one */
  onBattery: number | null;
  /** greatest, line to neutral just behind the device: cold conductors, factor Cmax */
  atBoard: number | null;
}

const FAR: EndFaults = { at: null, lineNeutral: null, lineEarth: null, onBattery: null, atBoard: null };

/** ohm of the neutral from the source to a point, hot, along the path it is fed by; null where a cable is not known */
function neutralOhm(context: Context, { neutralEdges }: Drawn): number | null {
  const outside = supplySide(context.graph);
  const inside = neutralEdges.filter((number) => !outside.has(number));
  if (neutralEdges.length === 0 || inside.some((number) => lacksCable(context.graph, number))) return null;
  return inside.reduce((sum, number) => sum + ohmOf(context.graph, number), 0);
}

/** Works out the currents of faults on one way. @source IEC 60364-4-43 434.1, IEC 60364-4-41 411.4.4 */
export function endFaults(context: Context, way: WayFigures): EndFaults {
  const { paths, practice } = figuresOf(context);
  const { supply } = context.document;
  const { voltage, zln } = supply;
  let far: { each: Drawn; ohm: number | null } | null = null;
  for (const each of way.drawn) {
    const r1 = paths.fed.get(each.part.id)?.r1 ?? null;
    const rn = neutralOhm(context, each);
    const ohm = r1 === null || rn === null ? null : r1 + rn;
    if (!far || (ohm ?? -1) > (far.ohm ?? -1)) far = { each, ohm };
  }
  const least = (loopOhm: number) => prospectiveA({ voltage, loopOhm, factor: practice.cMin.value });
  const cold = paths.coldOhm(way.section.downstream) ?? paths.coldOhm(way.section.upstream);
  const fromMains = far?.each.source?.kind === 'mains';
  const inverter = way.section.backup ? context.backups[0] : undefined;
  return {
    ...FAR,
    at: way.faultAt ?? far?.each ?? null,
    lineNeutral: far && far.ohm !== null && fromMains && zln !== undefined ? least(zln + far.ohm) : null,
    lineEarth: way.fault && externalOhm(supply) !== undefined ? way.fault.faultA : null,
    onBattery: inverter ? shortCircuitA(inverter, voltage) : null,
    atBoard:
      fromMains && zln !== undefined && cold !== undefined
        ? prospectiveA({ voltage, loopOhm: zln + 2 * cold, factor: practice.cMax.value })
        : null,
  };
}
