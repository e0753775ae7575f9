import type { End, Wire } from '../../document/schema';
import type { Context } from '../context';
import type { Remedy } from '../types';
import { newWireId } from './rewire';
import { potentials } from './potentials';

/**
 * "Wire them the usual way": two two-way switches with the line on the common of the first, the lamp on the common of
 * the last
 * and strappers from 1 to 1 and 2 to 2, with the wires that are there. Offered where one wire brings the line, one
 * leads to the lamp
 * and the others run between the two.
 */
export function usualTwoWay(context: Context, switches: readonly string[]): Remedy[] {
  const { graph, document } = context;
  const [a, b] = switches;
  if (switches.length !== 2 || switches.some((id) => graph.parts.get(id)!.kind !== 'switch-2way')) return [];
  const at = ({ from, to }: Wire) => [from[0], to[0]].filter((id) => switches.includes(id));
  const strappers = document.wires.filter((wire) => at(wire).length === 2 && wire.from[0] !== wire.to[0]);
  const outer = document.wires.filter((wire) => at(wire).length === 1);
  if (strappers.length < 1 || strappers.length > 2 || outer.length !== 2) return [];
  const line = outer.find(({ role }) => role === 'line');
  const lamp = outer.find(({ role }) => role === 'switched');
  if (!line || !lamp || at(line)[0] === at(lamp)[0]) return [];
  const far = (wire: Wire): End => (switches.includes(wire.from[0]) ? wire.to : wire.from);
  const isLine = graph.node(...far(line));
  if (isLine === undefined || potentials(context).line[isLine] !== 1) return [];
  const first = at(line)[0] === a ? a! : b!;
  const last = first === a ? b! : a!;
  const between = (wire: Wire, mark: string): Wire => ({
    ...wire,
    from: [first, mark],
    to: [last, mark],
    role: 'strapper',
  });
  const [one, two] = strappers;
  const second: Wire = two ?? { ...one!, id: newWireId(context, one!.id) };
  const wires = [
    { ...line, from: far(line), to: [first, 'C'] as End },
    { ...lamp, from: [last, 'C'] as End, to: far(lamp) },
    between(one!, '1'),
    between(second, '2'),
  ];
  return [{ label: 'Wire them the usual way', patch: { set: { wires } } }];
}
