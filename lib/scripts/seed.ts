import { seed } from '@/lib/server/demo/seed';
import { sequelize } from '@/models';

/** Fills an empty database with the demo team; called by `npm start` once. */
seed()
  .catch((error: unknown) => {
    console.error(error);
    process.exitCode = 1;
  })
  .finally(() => sequelize.close());
