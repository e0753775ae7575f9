import { capacity, type Capacity } from '../calculations/capacity';
import { byCode, type Cable, type Part, type Wire } from '../document/schema';
import type { Practice } from '../practices/types';
import type { Graph } from '../terminals/graph';
import type { Section } from '../terminals/ways';
import type { Drawn } from './drawn';

/** A cable that line conductors of a section run in, or a neutral of its own. */
export interface SectionCable {
  cable: Cable;
  /** ids of the section's line wires in it, of a neutral by itself the neutral ones */
  wires: string[];
  /** null where the practice has no table for its laying or its size */
  capacity: Capacity | null;
  /** A that it must carry for ever: the device's rating, or less on a leg of a ring; null without a rating */
  needA: number | null;
}

export const capacityOf = (graph: Graph, practice: Practice, cable: Cable): Capacity | null =>
  capacity(practice, cable.csa, {
    method: cable.method,
    material: cable.material,
    insulation: cable.insulation,
    ambientC: cable.ambient ?? graph.document.ambient,
    grouped: cable.grouped ?? 1,
  });

/** Edges of a section's line that lie on a ring which begins and ends at its device; empty on a radial way. */
export function ringEdges(graph: Graph, section: Section): Set<number> {
  const around = new Map<number, Set<number>>();
  const add = (node: number, edge: number) => around.set(node, (around.get(node) ?? new Set()).add(edge));
  for (const number of section.edges) {
    const { a, b, kind, wire } = graph.edges[number]!;
    if (kind === 'select' || wire?.role === 'strapper' || a === b) continue;
    add(a, number);
    add(b, number);
  }
  const ends = [...around.keys()].filter((node) => around.get(node)!.size === 1);
  for (const node of ends) {
    const [edge] = around.get(node)!;
    if (edge === undefined) continue;
    const { a, b } = graph.edges[edge]!;
    const other = a === node ? b : a;
    around.delete(node);
    around.get(other)!.delete(edge);
    if (around.get(other)!.size === 1) ends.push(other);
  }
  return around.get(section.downstream)?.size
    ? new Set([...around.values()].flatMap((edges) => [...edges]))
    : new Set();
}

const ratingOf = (device: Part): number | undefined => ('rating' in device ? device.rating : undefined);

/** Neutral wires in cables of their own on the way back of what is drawn, up to the first bar or device. */
function ownNeutrals(graph: Graph, drawn: readonly Drawn[]): { cable: Cable; wire: Wire }[] {
  const found = new Map<string, { cable: Cable; wire: Wire }>();
  for (const { neutralEdges, neutralEnd } of drawn) {
    let at = neutralEnd;
    for (const number of [...neutralEdges].reverse()) {
      const { a, b, wire, kind } = graph.edges[number]!;
      if (kind === 'device' || kind === 'through') break;
      const cable = wire?.cable === undefined ? undefined : graph.cables.get(wire.cable);
      if (cable && wire) found.set(wire.id, { cable, wire });
      at = a === at ? b : a;
      if (graph.partOf[at]!.kind === 'neutral-bar') break;
    }
  }
  const line = withLine(graph);
  return [...found.values()].filter(({ cable }) => !line.has(cable.id));
}

const lineCables = new WeakMap<Graph, ReadonlySet<string>>();

/** Cables that hold a line core, worked out once a home. */
function withLine(graph: Graph): ReadonlySet<string> {
  let known = lineCables.get(graph);
  if (!known) {
    const isLine = ({ role }: Wire) => role !== 'neutral' && role !== 'earth';
    known = new Set([...graph.wires.values()].flatMap((wire) => (isLine(wire) && wire.cable ? [wire.cable] : [])));
    lineCables.set(graph, known);
  }
  return known;
}

/**
 * The cables of a section with what each must carry. Where the practice has ring final circuits, a leg of one, and a spur
 * of it to a single point, may be rated below the device.
 */
export function sectionCables(
  graph: Graph,
  practice: Practice,
  section: Section,
  drawn: readonly Drawn[],
): SectionCable[] {
  const rating = ratingOf(section.device);
  const ring = practice.ring?.value;
  const onRing = ring && rating !== undefined && rating <= ring.deviceA ? ringEdges(graph, section) : new Set<number>();
  const behind = new Map<number, number>();
  if (onRing.size > 0)
    for (const { lineEdges } of drawn) for (const edge of lineEdges) behind.set(edge, (behind.get(edge) ?? 0) + 1);

  const cables = new Map<string, SectionCable>();
  for (const number of section.edges) {
    const { wire } = graph.edges[number]!;
    const cable = wire?.cable === undefined ? undefined : graph.cables.get(wire.cable);
    if (!wire || !cable) continue;
    const eased =
      ring && onRing.size > 0 && cable.csa >= ring.legCsaMm2 && (onRing.has(number) || (behind.get(number) ?? 0) <= 1);
    const needA = rating === undefined ? null : eased ? Math.min(rating, ring.legIzAtLeastA) : rating;
    const entry = cables.get(cable.id);
    if (!entry) cables.set(cable.id, { cable, wires: [wire.id], capacity: capacityOf(graph, practice, cable), needA });
    else {
      entry.wires.push(wire.id);
      if (needA !== null) entry.needA = Math.max(entry.needA ?? 0, needA);
    }
  }
  // A neutral that runs by itself carries what the line carries. In a ring it comes home both ways.
  if (onRing.size === 0)
    for (const { cable, wire } of ownNeutrals(graph, drawn)) {
      const entry = cables.get(cable.id);
      if (entry?.wires.includes(wire.id)) continue;
      if (entry) entry.wires.push(wire.id);
      else
        cables.set(cable.id, { cable, wires: [wire.id], capacity: capacityOf(graph, practice, cable), needA: rating ?? null });
    }
  return [...cables.keys()].sort(byCode).map((id) => cables.get(id)!);
}
