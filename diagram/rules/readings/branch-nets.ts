import { condenseBranches, placesOf, type BranchNet } from '../../circuit/branch-volts';
import { findBranches } from '../../circuit/branches';
import { standingsOf } from '../../circuit/steady';
import type { Context } from '../context';
import { once } from './once';

/** Trunk and branches of the home. */
export const branchesIn = once(({ graph }: Context) => findBranches(graph));

/** The home in one standing of its two-way and cross switches, with the points that are on in it. */
export interface StandingNet {
  points: readonly string[];
  net: BranchNet;
}

/** By name of the condition, the standings that it takes to have every point on: one where no switch must stand both ways. */
export const branchNets = once((context: Context): ReadonlyMap<string, readonly StandingNet[]> => {
  const { graph, evaluated } = context;
  const places = placesOf(graph, branchesIn(context).branchOf);
  // Most branches stand alike in every condition: what one comes to is worked out once.
  let like: BranchNet | undefined;
  return new Map(
    evaluated.map((each) => [
      each.condition.name,
      standingsOf(graph, each).map(({ standing, points }) => {
        const net = (like = condenseBranches(graph, standing, places, { like }));
        return { points, net };
      }),
    ]),
  );
});
