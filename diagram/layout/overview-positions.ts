import type { Position } from '../document/schema';
import { symbolFor } from '../symbols';
import { otherEnd } from './overview-graph';
import type { OverviewPlan } from './overview-plan';
import { fillIn } from './positions';

/** The position of every part of the overview: stored, or where the plan puts it. */
export function overviewPositions(plan: OverviewPlan, stored: Readonly<Record<string, Position>>): Map<string, Position> {
  const near = (id: string): string[] => (plan.graph.at.get(id) ?? []).map((run) => otherEnd(run, id)[0]);
  return fillIn(plan.positions, stored, near, (id) => symbolFor(plan.graph.byId.get(id)!, 'overview'));
}
