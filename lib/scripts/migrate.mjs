import { Stop, lastLine, run } from './run.mjs';

const CLI = 'node_modules/sequelize-cli/lib/sequelize';

/** Runs sequelize-cli; `url` is of the role that owns the tables. */
export async function sequelizeCli(command, url) {
  return run(process.execPath, [CLI, command], { env: { DATABASE_URL: url, NODE_ENV: 'production' } });
}

/** Brings the tables up to date. */
export async function migrate(url) {
  const { status, output } = await sequelizeCli('db:migrate', url);
  if (status !== 0) throw new Stop(`The tables could not be brought up to date: ${lastLine(output)}`);
}
