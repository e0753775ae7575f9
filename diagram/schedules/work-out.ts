import type { Installation } from '../document/schema';
import { buildContext } from '../rules/context';
import { rules } from '../rules';
import { runRules } from '../rules/run';
import type { Finding } from '../rules/types';
import { backupPlots, type BackupPlot } from './backup-plot';
import { conditionLoads, type ConditionLoad } from './condition-loads';
import { tableOf } from './index';
import { TABLE_IDS, type Table, type TableId } from './types';
import { wayPlot, type WayPlot } from './way-plot';

/** All that the schedules sheet shows of one drawing, worked out in one pass. */
export interface Worked {
  tables: Readonly<Record<TableId, Table>>;
  /** by id of the way's device */
  plots: Readonly<Record<string, WayPlot>>;
  backups: readonly BackupPlot[];
  conditions: readonly ConditionLoad[];
  /** those that nobody answers for */
  findings: readonly Finding[];
}

/** Works out the schedules, the pictures and the findings of a home. Pure: the same document gives the same answer. */
export function workOut(doc: Installation): Worked {
  const context = buildContext(doc);
  const tables = Object.fromEntries(TABLE_IDS.map((id) => [id, tableOf(context, id)])) as Record<TableId, Table>;
  const plots = Object.fromEntries(
    context.ways.flatMap(({ device }) => {
      const plot = wayPlot(context, device);
      return plot ? [[device, plot] as const] : [];
    }),
  );
  return {
    tables,
    plots,
    backups: backupPlots(context),
    conditions: conditionLoads(context),
    findings: runRules(context, rules).filter(({ silenced }) => !silenced),
  };
}
