import path from 'node:path';
import { clusterUrl } from './cluster.mjs';
import { explain } from './explain.mjs';
import { Stop } from './run.mjs';
import { loadSecrets } from './secrets.mjs';
import { runServerScript } from './seed-demo.mjs';

/** The database that `npm start` keeps running meanwhile. */
function ownDatabase({ clusterPort, passwords }) {
  if (!clusterPort)
    throw new Stop('There is no database yet: run npm start first, or say which one: DATABASE_URL=postgres://...');
  return clusterUrl({ port: clusterPort, passwords }, 'ohmstead');
}

// npm run team -- "Name of the firm" "Name of its admin" admin@example.org
try {
  const secrets = await loadSecrets(path.resolve('.data'));
  const { DATABASE_URL = ownDatabase(secrets), NEXTAUTH_SECRET = secrets.auth } = process.env;
  const { NEXTAUTH_URL = `http://127.0.0.1:${process.env.PORT ?? 3000}` } = process.env;
  const env = { DATABASE_URL, NEXTAUTH_URL, NEXTAUTH_SECRET };
  const { status, output } = await runServerScript('lib/scripts/team.ts', process.argv.slice(2), env);
  console.log(output.trim());
  process.exitCode = status;
} catch (error) {
  console.error(explain(error));
  process.exitCode = 1;
}
