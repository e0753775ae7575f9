import { LIMIT_C, conductorOhm } from '../calculations/conductor';
import type { Edge, Graph } from '../terminals/graph';

/**
 * Ohm of a closed contact and of a wire without a cable, which the model takes as none: so little that no figure shows
 * it,
 * and yet the current shares itself among several of them.
 */
export const CONTACT_OHM = 1e-6;

/**
 * Resistance of one edge of the graph: a core of its cable, the protective one by `cpc` where the wire's role is earth.
 * @param temperatureC degC of the conductor; the limit of its insulation where not given
 * @returns ohm, never 0
 */
export function edgeOhm(graph: Graph, edge: Edge, temperatureC?: number): number {
  const cable = edge.wire?.cable === undefined ? undefined : graph.cables.get(edge.wire.cable);
  if (!cable) return CONTACT_OHM;
  const csaMm2 = edge.wire!.role === 'earth' ? (cable.cpc ?? cable.csa) : cable.csa;
  const ohm = conductorOhm({
    csaMm2,
    lengthM: cable.length,
    material: cable.material,
    temperatureC: temperatureC ?? LIMIT_C[cable.insulation],
  });
  return Math.max(ohm, CONTACT_OHM);
}
