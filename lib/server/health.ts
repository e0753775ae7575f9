import 'server-only';
import { sequelize } from '@/models';

/** True when the database answers. */
export const isDatabaseUp = (): Promise<boolean> =>
  sequelize.query('select 1').then(
    () => true,
    () => false,
  );
