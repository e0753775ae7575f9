import { capacity, type Capacity } from '../calculations/capacity';
import { byCode, type Cable, type Part } from '../document/schema';
import type { Practice } from '../practices/types';
import type { Graph } from '../terminals/graph';
import type { Section } from '../terminals/ways';
import type { Drawn } from './drawn';

/** A cable that line conductors of a section run in. */
export interface SectionCable {
  cable: Cable;
  /** ids of the section's line wires in it */
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
  return [...cables.keys()].sort(byCode).map((id) => cables.get(id)!);
}
