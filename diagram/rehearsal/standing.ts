import type { Standing } from '../circuit/assemble';
import { hasBattery, type Condition, type Source } from '../circuit/conditions';
import { byDesignation } from '../document/names';
import type { Part, PartOf } from '../document/schema';
import type { Edge, Graph } from '../terminals/graph';
import { reach, reaches } from '../terminals/reach';
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

/** Inverters that are on, have a battery, and no mains at their input: these drive. */
function drivers(
  graph: Graph,
  inverters: readonly PartOf<'inverter'>[],
  supplies: readonly Part[],
  settings: Settings,
  closed: Uint8Array,
) {
  const bypass = new Map<string, number>();
  graph.edges.forEach((edge, number) => edge.kind === 'bypass' && bypass.set(edge.part!, number));
  const apart = closed.slice();
  for (const number of bypass.values()) apart[number] = 0;
  // An inverter fed through another that passes the mains has mains, too: each found lets the mains on.
  const fed = new Set<string>();
  for (;;) {
    const at = (mark: string) => supplies.map(({ id }) => graph.node(id, mark)!);
    const line = reach(graph, at('L'), apart);
    const neutral = reach(graph, at('N'), apart);
    const found = inverters.filter(
      ({ id }) => !fed.has(id) && reaches(line, graph.node(id, 'in.L')) && reaches(neutral, graph.node(id, 'in.N')),
    );
    if (found.length === 0) break;
    for (const { id } of found) {
      fed.add(id);
      apart[bypass.get(id)!] = 1;
    }
  }
  return inverters.filter(
    (part) => !fed.has(part.id) && settings[part.id] !== 'off' && hasBattery(graph, part, closed),
  );
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
  const driving = drivers(graph, inverters, supply === 'live' ? supplies : [], settings, closed);
  const onBattery = new Set(driving.map(({ id }) => id));
  graph.edges.forEach((edge, number) => {
    if (!edge.part || !onBattery.has(edge.part)) return;
    const inverter = graph.parts.get(edge.part) as PartOf<'inverter'>;
    if (edge.kind === 'bond') closed[number] = 1;
    else if (edge.kind === 'bypass' || (edge.kind === 'through' && inverter.neutral === 'separate')) closed[number] = 0;
  });
  const source = (part: Part, kind: Source['kind'], prefix: string): Source => ({
    part,
    kind,
    line: graph.node(part.id, `${prefix}L`)!,
    neutral: graph.node(part.id, `${prefix}N`)!,
  });
  const mains = supply === 'live' ? supplies.map((part) => source(part, 'mains', '')) : [];
  const condition: Condition = {
    name,
    base: supply === 'dead' ? 'outage' : name === 'mains' ? 'mains' : 'main-off',
    positions: new Map(
      parts.flatMap(({ kind, id }) => (kind === 'changeover' ? [[id, settings[id] as 'A' | '0' | 'B'] as const] : [])),
    ),
    sources: [...mains, ...driving.map((part) => source(part, 'backup', 'out.'))],
    closed,
    onBattery,
  };
  // What draws nothing: an outlet switched off; a charger that is off or has nothing to charge.
  const off = new Set([
    ...parts.filter(({ kind, id }) => kind === 'socket' && settings[id] === 'open').map(({ id }) => id),
    ...inverters.filter((part) => settings[part.id] === 'off' || !hasBattery(graph, part, closed)).map(({ id }) => id),
  ]);
  return { condition, closed, off };
}
