import type { Graph } from '../terminals/graph';
import { pathTo, reaches } from '../terminals/reach';
import type { Earth } from './earth';
import { OhmNet, type OhmBranch } from './ohm-net';
import { lacksCable, ohmOf } from './way-paths';

export interface EarthPaths {
  /** hot ohm of the protective conductors from the means of earthing to a node; null where not joined or not known */
  r2(node: number | undefined): number | null;
  /** edges from the means of earthing to a node, in that order; null where the earth does not reach it */
  path(node: number | undefined): readonly number[] | null;
}

/** Protective conductors as one net, rings as rings. Nothing has an earth while the main bar has none. */
export function workOutEarthPaths(graph: Graph, { closed, reached, mainBar, earthed }: Earth): EarthPaths {
  const starts = reached.order.filter((node) => reached.via[node]! < 0);
  const root = mainBar !== undefined && !earthed ? undefined : starts[0];
  if (root === undefined) return { r2: () => null, path: () => null };
  const branches: OhmBranch[] = starts.slice(1).map((node) => ({ a: root, b: node, ohm: 0 }));
  graph.edges.forEach(({ a, b }, number) => {
    if (closed[number] !== 0 && reaches(reached, a) && reaches(reached, b))
      branches.push({ a, b, ohm: ohmOf(graph, number) });
  });
  const net = new OhmNet(branches, root);
  const path = (node: number | undefined) => (reaches(reached, node) ? pathTo(graph, reached, node!) : null);
  return {
    path,
    r2(node) {
      const edges = path(node);
      if (!edges || edges.some((number) => lacksCable(graph, number))) return null;
      return net.ohmTo(node!) ?? null;
    },
  };
}
