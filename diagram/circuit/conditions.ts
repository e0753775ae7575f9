import { byDesignation } from '../document/names';
import type { Part, PartOf } from '../document/schema';
import type { Edge, Graph } from '../terminals/graph';
import { closedEdges } from '../terminals/reach';
import { backupSource, hasBattery, withMains } from './inverters';
import { findMainSwitch } from './main-switch';

/** What a source is in a condition: its two poles, as nodes. */
export interface Source {
  part: Part;
  kind: 'mains' | 'backup';
  line: number;
  neutral: number;
}

type Base = 'mains' | 'outage' | 'main-off';

/** One way in which the home can stand. All protective devices and plain switches are closed in it. */
export interface Condition {
  /** `mains`, `outage`, `main-off`; with a changeover `mains/A` ... */
  name: string;
  base: Base;
  /** position of each changeover, by id */
  positions: ReadonlyMap<string, 'A' | '0' | 'B'>;
  sources: readonly Source[];
  /** by edge; contacts of two-way and cross switches and bonds are open here */
  closed: Uint8Array;
  /** ids of inverters that run from their batteries */
  onBattery: ReadonlySet<string>;
}

export interface Conditions {
  mainSwitch: Part | undefined;
  /** inverters that are on and have a battery, by designation */
  backups: PartOf<'inverter'>[];
  changeovers: Part[];
  list: Condition[];
}

/**
 * Beyond this many changeovers not every combination of their positions is looked at: then every two of them are seen
 * in every
 * pair of A and B, the others all at A or all at B.
 */
export const MOST_COMBINED = 3;

function combinations(changeovers: readonly Part[]): Map<string, 'A' | '0' | 'B'>[] {
  const places = ['A', '0', 'B'] as const;
  if (changeovers.length <= MOST_COMBINED) {
    return changeovers.reduce<Map<string, 'A' | '0' | 'B'>[]>(
      (all, { id }) => all.flatMap((before) => places.map((place) => new Map(before).set(id, place))),
      [new Map()],
    );
  }
  const all = (place: 'A' | 'B') => new Map<string, 'A' | '0' | 'B'>(changeovers.map(({ id }) => [id, place]));
  const oneApart = changeovers.flatMap(({ id }) => [
    all('A').set(id, 'B'),
    all('A').set(id, '0'),
    all('B').set(id, 'A'),
    all('B').set(id, '0'),
  ]);
  return [all('A'), all('B'), ...oneApart];
}

/**
 * Lists the conditions of a home: `outage` and `main-off` only with a backup source, each once for every changeover
 * position.
 */
export function listConditions(graph: Graph): Conditions {
  // Only the few that are wanted are sorted: to compare designations is dear.
  const wanted = new Set<Part['kind']>(['supply', 'changeover', 'inverter']);
  const parts = [...graph.parts.values()].filter(({ kind }) => wanted.has(kind)).sort(byDesignation);
  const supplies = parts.filter((part) => part.kind === 'supply');
  const changeovers = parts.filter((part) => part.kind === 'changeover');
  const backups = parts.filter(
    (part): part is PartOf<'inverter'> => part.kind === 'inverter' && part.state !== 'off' && hasBattery(graph, part),
  );
  const mainSwitch = findMainSwitch(graph);
  const bases: Base[] = ['mains'];
  if (backups.length > 0) bases.push('outage');
  if (backups.length > 0 && mainSwitch) bases.push('main-off');

  const mains = supplies.map((part): Source => ({
    part,
    kind: 'mains',
    line: graph.node(part.id, 'L')!,
    neutral: graph.node(part.id, 'N')!,
  }));
  const isBackup = new Set(backups.map((part) => part.id));

  const build = (base: Base, positions: Map<string, 'A' | '0' | 'B'>): Condition => {
    const open = (edge: Edge): boolean => {
      if (edge.kind === 'select' || edge.kind === 'bond') return true;
      if (edge.kind === 'changeover') return positions.get(edge.part!) !== edge.position;
      return base === 'main-off' && edge.kind === 'device' && edge.part === mainSwitch?.id;
    };
    const closed = closedEdges(graph, open);
    const onBattery = new Set<string>();
    if (base !== 'mains') {
      for (const id of isBackup) onBattery.add(id);
      // An inverter fed from before the open main switch still has mains: it passes them through.
      if (base === 'main-off') for (const id of withMains(graph, mains, closed)) onBattery.delete(id);
    }
    graph.edges.forEach((edge, number) => {
      if (!edge.part || !onBattery.has(edge.part)) return;
      const inverter = graph.parts.get(edge.part) as PartOf<'inverter'>;
      if (edge.kind === 'bypass' || (edge.kind === 'through' && inverter.neutral === 'separate')) closed[number] = 0;
    });
    const batteries = backups.filter((part) => onBattery.has(part.id)).map((part) => backupSource(graph, part));
    const suffix = changeovers.map(({ id }) => positions.get(id)).join('');
    return {
      name: suffix ? `${base}/${suffix}` : base,
      base,
      positions,
      sources: base === 'outage' ? batteries : [...mains, ...batteries],
      closed,
      onBattery,
    };
  };
  const combined = combinations(changeovers);
  return {
    mainSwitch,
    backups,
    changeovers,
    list: bases.flatMap((base) => combined.map((positions) => build(base, positions))),
  };
}
