import type { Standing } from '../circuit/assemble';
import type { Condition, Source } from '../circuit/conditions';
import { backupSource, hasBattery, partFromInput, withMains } from '../circuit/inverters';
import { byDesignation } from '../document/names';
import type { Edge, Graph } from '../terminals/graph';
import type { Settings } from './settings';
import type { ConditionName } from './stance';

/** Whether a contact is closed with the parts in these positions; those inside an inverter are decided later. */
function isClosed(graph: Graph, edge: Edge, settings: Settings): boolean {
  switch (edge.kind) {
    case 'device':
    case 'switch':
      return settings[edge.part!] !== 'open';
    case 'select':
    case 'changeover':
      return settings[edge.part!] === edge.position;
    case 'plug': {
      const socket = graph.partOf[edge.b]!.id;
      return settings[edge.part!] !== 'out' && !(settings[socket] === 'open' && graph.markOf[edge.a] === 'L');
    }
    case 'bond':
      return false;
    default:
      return true;
  }
}

/**
 * The home as it stands with its parts in these positions. An inverter runs from its battery as soon as nothing of the
 * mains reaches its input, whatever has taken it away; one without a battery, or switched off, passes what comes.
 */
export function standingIn(graph: Graph, settings: Settings, supply: 'live' | 'dead', name: ConditionName): Standing {
  const closed = Uint8Array.from(graph.edges, (edge) => (isClosed(graph, edge, settings) ? 1 : 0));
  const parts = [...graph.parts.values()];
  const supplies = parts.filter(({ kind }) => kind === 'supply').sort(byDesignation);
  const inverters = parts.filter((part) => part.kind === 'inverter').sort(byDesignation);
  const mains = supplies
    .filter(() => supply === 'live')
    .map((part): Source => ({ part, kind: 'mains', line: graph.node(part.id, 'L')!, neutral: graph.node(part.id, 'N')! }));
  const idle = inverters.filter((part) => settings[part.id] === 'off' || !hasBattery(graph, part, closed));
  const fed = withMains(graph, mains, closed);
  const driving = inverters.filter((part) => !fed.has(part.id) && !idle.includes(part));
  const onBattery = new Set(driving.map(({ id }) => id));
  partFromInput(graph, onBattery, closed);
  const condition: Condition = {
    name,
    base: supply === 'dead' ? 'outage' : name === 'mains' ? 'mains' : 'main-off',
    positions: new Map(
      parts.flatMap(({ kind, id }) => (kind === 'changeover' ? [[id, settings[id] as 'A' | '0' | 'B'] as const] : [])),
    ),
    sources: [...mains, ...driving.map((part) => backupSource(graph, part))],
    closed,
    onBattery,
  };
  // What draws nothing: an outlet switched off; a charger that is off or has nothing to charge.
  const off = new Set([
    ...parts.filter(({ kind, id }) => kind === 'socket' && settings[id] === 'open').map(({ id }) => id),
    ...idle.map(({ id }) => id),
  ]);
  return { condition, closed, off };
}
