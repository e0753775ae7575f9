import { fusesOn, type DcString } from '../../circuit/dc-leads';
import { capacityOf } from '../../circuit/way-cables';
import { ohmOf } from '../../circuit/way-paths';
import type { Cable } from '../../document/schema';
import type { Context } from '../context';
import { figuresOf } from './figures';

/** A cable between a bank and its inverter. */
export interface DcLead {
  cable: Cable;
  wires: Set<string>;
  /** A that flows in it at full output and cutoff */
  currentA: number;
  /** A, the fuse or breaker before it; null where none is rated */
  fuseA: number | null;
}

/** A for ever; beyond the practice's table the value of its largest size stands, which is the safe reading. */
export function leadIz(context: Context, cable: Cable): number | null {
  const { practice } = figuresOf(context);
  const sizes = [cable.csa, ...practice.csaMm2.filter((csa) => csa < cable.csa).reverse()];
  for (const csa of sizes) {
    const found = capacityOf(context.graph, practice, { ...cable, csa });
    if (found) return found.izA;
  }
  return null;
}

/** The leads of an inverter; in what several strings share the whole current flows, in each string its part. */
export function dcLeads(
  { graph }: Context,
  strings: readonly DcString[],
  dcAmps: number,
): { leads: DcLead[]; dropV: number } {
  const leads = new Map<string, DcLead>();
  const share = (number: number) => strings.filter(({ edges }) => edges.includes(number)).length / strings.length;
  let dropV = 0;
  for (const { edges } of strings) {
    const ratings = fusesOn(graph, edges).flatMap((device) =>
      'rating' in device && device.rating !== undefined ? [device.rating] : [],
    );
    let lost = 0;
    for (const number of edges) {
      const { wire } = graph.edges[number]!;
      const cable = wire?.cable === undefined ? undefined : graph.cables.get(wire.cable);
      if (!wire || !cable) continue;
      const currentA = dcAmps * share(number);
      lost += currentA * ohmOf(graph, number);
      const lead: DcLead = leads.get(cable.id) ?? { cable, wires: new Set(), currentA: 0, fuseA: null };
      lead.wires.add(wire.id);
      lead.currentA = Math.max(lead.currentA, currentA);
      lead.fuseA = ratings.length > 0 ? Math.min(...ratings) : lead.fuseA;
      leads.set(cable.id, lead);
    }
    dropV = Math.max(dropV, lost);
  }
  return { leads: [...leads.values()], dropV };
}
