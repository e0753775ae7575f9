import type { Context } from '../context';
import type { SupplyResult } from '../examination';
import { figuresOf } from '../readings/figures';
import { round, roundOrNull } from './round';

/**
 * Demand of the home line by line, and the current of a fault at the origin: voltage over `zln`, without voltage
 * factor.
 */
export function supplyResult(context: Context): SupplyResult {
  const { demand } = figuresOf(context);
  const { voltage, zln } = context.document.supply;
  return {
    demandWatts: round(demand.demandWatts),
    demandAmps: round(demand.demandA),
    ipf: roundOrNull(zln === undefined ? null : voltage / zln),
    conditions: context.evaluated.map(({ condition }) => condition.name),
    lines: demand.rows.map((row) => ({
      what: row.count === 1 ? row.what : `${row.what} (${row.count})`,
      watts: round(row.watts),
      demand: round(row.demandWatts),
      allowance: row.allowance,
      source: row.source,
    })),
  };
}
