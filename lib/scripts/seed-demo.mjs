import { readFile } from 'node:fs/promises';
import { Stop, run } from './run.mjs';

/** Runs a TypeScript file of the server side, outside of the app's own server. */
export const runServerScript = (file, args, env) =>
  run(process.execPath, ['--conditions=react-server', '--import', 'tsx', file, ...args], { env });

/**
 * Fills an empty database with the demo team, once.
 * @param {{ env: Record<string, string>, wanted: boolean }} options `wanted: false` never fills: a database of one's own
 * @returns the demo's accounts when they are there, else null
 */
export async function seedDemo({ env, wanted }) {
  const accounts = JSON.parse(await readFile('lib/server/demo/accounts.json', 'utf8'));
  const { default: pg } = await import('pg');
  const client = new pg.Client({ connectionString: env.DATABASE_URL });
  await client.connect();
  const { rows } = await client.query(
    'select (select count(*)::int from teams) as teams, (select count(*)::int from logins where email = $1) as demo',
    [accounts.people[0].email],
  );
  await client.end();
  if (rows[0].demo > 0) return accounts;
  if (rows[0].teams > 0 || !wanted) return null;
  const { status, output } = await runServerScript('lib/scripts/seed.ts', [], env);
  if (status !== 0) throw new Stop(`The demo could not be written:\n${output.trim()}`);
  return accounts;
}
