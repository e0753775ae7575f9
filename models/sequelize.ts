import { Sequelize } from 'sequelize';

const store = globalThis as typeof globalThis & { ohmsteadDatabase?: Sequelize };

/**
 * The one pool of connections of a process, named by DATABASE_URL. It lives on globalThis because a development reload
 * loads this module again. Nothing connects before the first query, so a build without a database can import it.
 */
export const sequelize = (store.ohmsteadDatabase ??= new Sequelize(
  process.env.DATABASE_URL ?? 'postgres://DATABASE_URL-is-not-set.invalid/ohmstead',
  {
    dialect: 'postgres',
    logging: false,
    pool: { max: 10, min: 0, acquire: 10_000, idle: 10_000 },
    define: { underscored: true, timestamps: false },
  },
));
