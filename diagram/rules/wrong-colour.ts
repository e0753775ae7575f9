import type { Role, Wire } from '../document/schema';
import { practices } from '../practices';
import type { ColourScheme } from '../practices/types';
import { seen } from './clauses';
import type { Context } from './context';
import type { Remedy, Rule } from './types';
import { sayWire } from './readings/words';

const allows = (scheme: ColourScheme, role: Role, colour: string): boolean =>
  scheme.colours[role].value.includes(colour);

/** Colours that a practice keeps for the earth, in any of its schemes. */
const isEarthColour = (schemes: readonly ColourScheme[], colour: string): boolean =>
  schemes.some((scheme) => allows(scheme, 'earth', colour));

/** The scheme that fits most of the stated colours: a home is judged by the one it is wired in. */
function schemeOf(schemes: readonly ColourScheme[], wires: readonly (Wire & { colour: string })[]): ColourScheme {
  const fits = (scheme: ColourScheme) => wires.filter(({ role, colour }) => allows(scheme, role, colour)).length;
  return schemes.reduce((best, scheme) => (fits(scheme) > fits(best) ? scheme : best));
}

/** The core in the first colour of its role. */
function recolour({ graph, document }: Context, id: string, scheme: ColourScheme): Remedy[] {
  const wire = graph.wires.get(id) ?? document.wires.find((each) => each.id === id)!;
  const [colour] = scheme.colours[wire.role].value;
  return [{ label: `Take a core in ${colour}`, patch: { set: { wires: [{ ...wire, colour }] } } }];
}

/** A stated colour outside the practice's code; an earth colour on anything else is a danger. */
export const wrongColour: Rule = {
  meta: {
    id: 'wrong-colour',
    severity: 'defect',
    group: 'drawing',
    title: 'A core has the wrong colour',
    clauses: [seen('BS 7671', '514.3'), { document: 'IEC 60445', clause: '6.2', memory: true }],
    lesson:
      'People trust colour before they trust a tester. A green-yellow core that carries line will one day be screwed to a case.',
    remedy: 'Take a core of the right colour, or sleeve it at both ends where the practice allows.',
  },
  *check(context) {
    const { colourSchemes } = practices[context.practice];
    const stated = context.document.wires
      .filter((wire): wire is Wire & { colour: string } => wire.colour !== undefined && wire.colour.trim() !== '')
      .map((wire) => ({ ...wire, colour: wire.colour.trim().toUpperCase() }));
    if (stated.length === 0) return;
    const scheme = schemeOf(colourSchemes, stated);
    for (const { id, role, colour, from, to } of stated) {
      const earth = role !== 'earth' && isEarthColour(colourSchemes, colour);
      if (allows(scheme, role, colour)) continue;
      yield {
        ...(earth && { severity: 'danger' as const }),
        heading: earth ? `An earth colour on a ${role} core` : `${colour} is not the colour of a ${role} core`,
        message: earth
          ? `The ${role} wire ${sayWire(context, id)} is ${colour}, the colour of earth. Somebody will join it to a case.`
          : `The ${role} wire ${sayWire(context, id)} is ${colour}; in this practice (${scheme.name}) it is ${scheme.colours[role].value.join(' or ')}.`,
        parts: [...new Set([from[0], to[0]])].filter((part) => context.graph.parts.has(part)),
        wires: [id],
        remedies: recolour(context, id, scheme),
      };
    }
  },
};
