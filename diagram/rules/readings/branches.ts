import { branchesOf, isOfTrunk } from '../../circuit/branches';
import type { Context } from '../context';
import { once } from './once';

/**
 * Parts by what they are joined with outside the board: a lost wire leaves both its ends in one branch, over neutral
 * and cable.
 */
export const branches = once(({ graph }: Context) =>
  branchesOf(graph, new Set([...graph.parts.values()].filter(isOfTrunk).map(({ id }) => id))),
);
