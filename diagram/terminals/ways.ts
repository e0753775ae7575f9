import type { Installation, Part } from '../document/schema';
import { byDesignation } from '../document/names';
import { buildGraph, type Edge, type Graph } from './graph';
import { closedEdges, reach, reaches } from './reach';
import { isOvercurrent, isPoint } from './roles-of-parts';
import { spread } from './spread';

/** An outgoing protective device and everything it feeds, up to the next overcurrent device. Derived, never stored. */
export interface Way {
  /** id of the device */
  device: string;
  /** from 1: mains ways in order of designation, then backup ways */
  number: number;
  /** its conductors lie behind an inverter's output */
  backup: boolean;
  label: string;
  /** the device, what its line feeds, and the joints of its neutral and earth */
  parts: string[];
  wires: string[];
  places: string[];
}

/** What one overcurrent device protects: the line conductors behind it, up to the next overcurrent device. */
export interface Section {
  device: Part;
  /** terminals of the device: on the side of the source, and beyond */
  upstream: number;
  downstream: number;
  backup: boolean;
  /** nodes and edges of its line conductors */
  nodes: ReadonlySet<number>;
  edges: ReadonlySet<number>;
  /** points fed, sorted by id */
  points: Part[];
  /** inverters whose input it feeds */
  inverters: Part[];
  /** overcurrent devices that follow */
  next: string[];
}

const COLLECTORS = new Set([
  'neutral-bar',
  'earth-bar',
  'line-bar',
  'supply',
  'meter',
  'isolator',
  'mcb',
  'rcd',
  'rcbo',
  'fuse',
  'changeover',
  'inverter',
]);

/**
 * The sections of a home. Where a drawing leaves the direction open (a device that no source reaches) there is none.
 * @param apart edges taken as open: wires that join what must stay apart
 */
export function findSections(graph: Graph, apart: ReadonlySet<number> = new Set()): Section[] {
  const lineStarts = (kind: 'supply' | 'inverter', mark: string) =>
    [...graph.parts.values()].filter((part) => part.kind === kind).map((part) => graph.node(part.id, mark)!);
  const blocked = (edge: Edge) => edge.kind === 'bypass' || edge.kind === 'through' || edge.kind === 'bond';
  const closed = closedEdges(graph, blocked);
  for (const number of apart) closed[number] = 0;
  const mains = lineStarts('supply', 'L');
  const backup = lineStarts('inverter', 'out.L');
  const walk = reach(graph, [...mains, ...backup], closed);
  const fromBackup = reach(
    graph,
    backup,
    closedEdges(graph, (edge) => blocked(edge) || edge.kind === 'changeover'),
  );
  const isDevice = (edge: Edge) => edge.kind === 'device' && isOvercurrent(graph.parts.get(edge.part!)!);

  const ends = new Map<string, readonly [upstream: number, downstream: number]>();
  for (const device of graph.parts.values()) {
    if (!isOvercurrent(device)) continue;
    const pole = graph.contactsOf.get(device.id)![0]!;
    const { a, b } = graph.edges[pole]!;
    if (!reaches(walk, a) || !reaches(walk, b)) continue;
    ends.set(device.id, walk.via[b] === pole ? [a, b] : walk.via[a] === pole ? [b, a] : [a, b]);
  }
  const sections: Section[] = [];
  for (const [id, [upstream, downstream]] of ends) {
    const device = graph.parts.get(id)!;
    const region = spread(graph, [downstream], (edge, number) => closed[number] !== 0 && !isDevice(edge));
    const points = new Map<string, Part>();
    const inverters = new Map<string, Part>();
    const next = new Set<string>();
    for (const node of region.nodes) {
      const part = graph.partOf[node]!;
      if (part.id === device.id) continue;
      const mark = graph.markOf[node]!;
      if (isPoint(part) && mark !== 'E') points.set(part.id, part);
      else if (part.kind === 'inverter' && mark === 'in.L') inverters.set(part.id, part);
      // One that is met from behind, over a two-way switch between two ways, does not follow.
      else if (isOvercurrent(part) && (ends.get(part.id)?.[0] ?? node) === node) next.add(part.id);
    }
    const sorted = <T>(map: Map<string, T>) => [...map.keys()].sort().map((id) => map.get(id)!);
    sections.push({
      device,
      upstream,
      downstream,
      backup: reaches(fromBackup, downstream),
      nodes: region.nodes,
      edges: region.edges,
      points: sorted(points),
      inverters: sorted(inverters),
      next: [...next].sort(),
    });
  }
  return sections;
}

/** A section is a way when something is used behind it, or nothing more follows; a feeder of other devices is not. */
const isWay = (section: Section): boolean =>
  section.edges.size > 0 && (section.points.length > 0 || section.inverters.length > 0 || section.next.length === 0);

/** The wires and joints of a section: its line, and the neutral and earth of its points back to their bars. */
function belongings(graph: Graph, section: Section): Pick<Way, 'parts' | 'wires' | 'places'> {
  const returns = section.points.flatMap((part) => ['L', 'N', 'E'].map((mark) => graph.node(part.id, mark)!));
  const starts = returns.filter((node) => !section.nodes.has(node));
  const back = spread(
    graph,
    starts,
    (edge) => edge.kind === 'wire' || edge.kind === 'switch' || edge.kind === 'select' || edge.kind === 'plug',
    (node) => COLLECTORS.has(graph.partOf[node]!.kind),
  );
  const points = new Set(section.points);
  const parts = new Set<string>([section.device.id]);
  for (const node of [...section.nodes, ...back.nodes]) {
    const part = graph.partOf[node]!;
    const foreign = isPoint(part) && !points.has(part);
    if (!COLLECTORS.has(part.kind) && !foreign) parts.add(part.id);
  }
  const wires = new Set<string>();
  for (const number of [...section.edges, ...back.edges]) {
    const { wire } = graph.edges[number]!;
    if (wire) wires.add(wire.id);
  }
  const places = new Set<string>();
  for (const id of parts) {
    const { place } = graph.parts.get(id)!;
    if (place !== undefined && id !== section.device.id) places.add(place);
  }
  return { parts: [...parts].sort(), wires: [...wires].sort(), places: [...places].sort() };
}

/** The ways of a home, numbered from 1: mains ways in order of designation, then backup ways. */
export function findWays(
  doc: Installation,
  graph: Graph = buildGraph(doc),
  sections: Section[] = findSections(graph),
): Way[] {
  const ways = sections.filter(isWay);
  ways.sort((a, b) => Number(a.backup) - Number(b.backup) || byDesignation(a.device, b.device));
  return ways.map((section, i) => ({
    device: section.device.id,
    number: i + 1,
    backup: section.backup,
    label: section.device.label ?? '',
    ...belongings(graph, section),
  }));
}
