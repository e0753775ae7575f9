import { nameOf, byDesignation } from '../document/names';
import type { Graph } from '../terminals/graph';
import { isResidual } from '../terminals/roles-of-parts';
import type { Standing } from './assemble';
import type { Condition } from './conditions';
import { takeOver } from './inverters';

/**
 * What each type need not see, in words: AC is tested with sinusoidal residual current alone, A and F with pulsating
 * too, with
 * 6 mA and 10 mA of smooth direct current upon it; B with smooth direct current itself.
 * @source IEC 61008-1, IEC 62423, from memory
 */
const BLIND = {
  AC: 'a fault behind a rectifier, pulsating or smooth, it need not see',
  A: 'smooth direct current it does not see, and above 6 mA of it it may see nothing',
  F: 'smooth direct current it does not see, and above 10 mA of it it may see nothing',
  B: null,
} as const;

/**
 * The wave of the residual current is no fact of a drawing: a sine is taken, which every type sees. Said for each
 * device that the
 * walk moves, and for the inverter that feeds it.
 * @param moved ids of residual-current devices that saw current astray
 */
export function assumptions(graph: Graph, condition: Condition, moved: ReadonlySet<string>): string[] {
  const name = (id: string) => nameOf(graph.document, graph.parts.get(id)!);
  const devices = [...moved].map((id) => graph.parts.get(id)!).filter(isResidual).sort(byDesignation);
  const said = devices.flatMap((device): string[] => {
    if (device.type === undefined)
      return [`a sinusoidal residual current at ${name(device.id)}, whose type AC, A, F or B is not given`];
    const blind = BLIND[device.type];
    return blind ? [`a sinusoidal residual current at ${name(device.id)} of type ${device.type}: ${blind}`] : [];
  });
  if (devices.length === 0) return [];
  const inverters = condition.sources.filter(({ kind }) => kind === 'backup').map(({ part }) => part.id);
  return [...said, ...inverters.map((id) => `the output of ${name(id)} as a sine without a direct part`)];
}

/** A walk within one condition leaves inverters as that has them, though what has opened would make some take over. */
export function stayAsTheyAre(graph: Graph, end: Standing): string[] {
  const inverters = takeOver(graph, end)?.inverters ?? [];
  return inverters.map((part) => `${nameOf(graph.document, part)} as it is in this condition: without mains it would take over`);
}
