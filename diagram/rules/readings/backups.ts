import { backupFigures } from '../../circuit/backup-figures';
import { once } from './once';

/** Every backup source of a home in numbers. */
export const backupsOf = once(({ graph, evaluated, backups }) => backupFigures(graph, evaluated, backups));
