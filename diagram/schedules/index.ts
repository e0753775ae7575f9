import type { Context } from '../rules/context';
import { wayResults } from '../rules/results/way-results';
import { loadResults } from '../rules/results/load-results';
import { backupTable, batteriesTable, sourcesTable } from './backup-tables';
import { cablesTable } from './cables-table';
import { designationsTable } from './designations-table';
import { loadsTable } from './loads-table';
import type { Table, TableId } from './types';
import { waysTable } from './ways-table';

/** The tables by name: each is worked out from one examined home, and stores nothing. */
const TABLES: Record<TableId, (context: Context) => Table> = {
  ways: (context) => waysTable(context, wayResults(context)),
  cables: cablesTable,
  loads: (context) => loadsTable(context, loadResults(context)),
  backup: backupTable,
  sources: sourcesTable,
  batteries: batteriesTable,
  designations: designationsTable,
};

export const tableOf = (context: Context, id: TableId): Table => TABLES[id](context);
