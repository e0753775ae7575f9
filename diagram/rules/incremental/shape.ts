import type { BranchNet } from '../../circuit/branch-volts';
import { findLimbs, type Branches } from '../../circuit/branches';
import type { Wire } from '../../document/schema';
import type { Context } from '../context';
import type { Finding } from '../types';
import { branchesIn, branchNets } from '../readings/branch-nets';
import { membersOf, type Members } from './members';
import { isOfBranch } from './merged-findings';
import { isRegular, leaning, type Leaning } from './regular';

/** A home that falls into a trunk and branches, and what is known of each. */
export interface Shape extends Branches {
  /** by key of a branch */
  members: ReadonlyMap<string, Members>;
  trunkWires: readonly Wire[];
  /** by id of a part of the trunk, the limb that it belongs to; the rest of the trunk is in every excerpt */
  limbOf: ReadonlyMap<string, string>;
  /** by key of a branch, the cables of the trunk that its points draw over */
  leaning: Leaning;
  /** how many positions of the two-way and cross switches are looked at */
  positions: number;
  /** what the rules that look at one branch find */
  findings: readonly Finding[];
  /** by condition; null where the switches of a home must stand in several ways to have every point on */
  nets: readonly BranchNet[] | null;
}

function netsOf(context: Context): Shape['nets'] {
  const nets = [...branchNets(context).values()];
  return nets.every(({ length }) => length === 1) ? nets.map(([only]) => only!.net) : null;
}

/** Finds the shape of a home that was examined; null where it is irregular. */
export function shapeOf(context: Context, findings: readonly Finding[]): Shape | null {
  const branches = branchesIn(context);
  if (!isRegular(context, branches.trunk)) return null;
  return {
    ...branches,
    ...membersOf(context.document, branches),
    limbOf: findLimbs(context.graph, branches),
    leaning: leaning(context),
    positions: context.evaluation.positions.count,
    findings: findings.filter(isOfBranch),
    nets: netsOf(context),
  };
}
