import { hasTerminal } from '../document/kinds';
import type { Cable, Wire } from '../document/schema';
import { reaches } from '../terminals/reach';
import { recalled } from './clauses';
import type { Context } from './context';
import type { Remedy, Rule } from './types';
import { capital, say } from './readings/words';

/** mm2 of the bonding conductor that the remedy draws: enough on every system (BS 7671 Table 54.8) */
const BOND_MM2 = 10;
/** m, as long as nobody has measured it; common practice, no source */
const BOND_M = 4;

/** A bonding conductor from the main earth bar. */
function bonding({ graph, earth, document }: Context, bond: string): Remedy[] {
  if (earth.mainBar === undefined) return [];
  const bar = graph.partOf[earth.mainBar]!;
  const used = document.wires.flatMap(({ from, to }) => [from, to]).filter(([id]) => id === bar.id);
  const free = String(1 + Math.max(0, ...used.map(([, mark]) => Number(mark))));
  if (!hasTerminal(bar, free)) return [];
  const id = `${bond}.bonding`;
  if (graph.wires.has(id) || graph.cables.has(id)) return [];
  const cable: Cable = {
    id,
    csa: BOND_MM2,
    cpc: BOND_MM2,
    material: 'Cu',
    insulation: 'PVC',
    method: 'C',
    length: BOND_M,
    cores: 1,
  };
  const wire: Wire = { id, from: [bar.id, free], to: [bond, 'E'], role: 'earth', cable: id };
  return [
    {
      label: `Bond it to ${bar.ref ?? 'the earth bar'} with ${BOND_MM2} mm2`,
      patch: { set: { cables: [cable], wires: [wire] } },
    },
  ];
}

/** An extraneous part that is not joined to the main earth bar. */
export const noMainBond: Rule = {
  meta: {
    id: 'no-main-bond',
    severity: 'defect',
    group: 'shock',
    title: 'A pipe is not bonded to the main earth',
    clauses: [recalled('IEC 60364-4-41', '411.3.1.2'), recalled('BS 7671', '544.1.1')],
    lesson:
      'A water or gas pipe brings the earth of the street into the home. While a fault lifts the cases of the ' +
      'home, an unbonded pipe stays where it was: whoever holds a kettle and a tap is the bond.',
    remedy: 'Join the pipe to the main earth bar where it enters, with a bonding conductor.',
  },
  *check(context) {
    const { earth, graph } = context;
    // Without any earth bar there is nothing to bond to: that is said once, by `no-main-earth`.
    if (earth.mainBar === undefined && !earth.earthed) return;
    for (const bond of context.parts('bond')) {
      if (bond.kind !== 'bond' || reaches(earth.reached, graph.node(bond.id, 'E'))) continue;
      const what = bond.to ? `The ${bond.to} pipe` : capital(say(context, bond.id));
      yield {
        heading: `${what} is not bonded`,
        message: `${what} is not joined to the main earth bar. In a fault it stands at another voltage than every case around it.`,
        parts: [bond.id],
        remedies: bonding(context, bond.id),
      };
    }
  },
};
