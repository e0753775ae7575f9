import path from 'node:path';
import { explain } from './explain.mjs';
import { Stop } from './run.mjs';
import { loadSecrets } from './secrets.mjs';
import { runServerScript } from './seed-demo.mjs';

// npm run team -- "Name of the firm" "Name of its admin" admin@example.org
try {
  const { DATABASE_URL, NEXTAUTH_SECRET, NEXTAUTH_URL = `http://127.0.0.1:${process.env.PORT ?? 3000}` } = process.env;
  if (!DATABASE_URL)
    throw new Stop('Say which database: DATABASE_URL=postgres://... npm run team -- "Firm" "Name" you@example.org');
  const env = {
    DATABASE_URL,
    NEXTAUTH_URL,
    NEXTAUTH_SECRET: NEXTAUTH_SECRET ?? (await loadSecrets(path.resolve('.data'))).auth,
  };
  const { status, output } = await runServerScript('lib/scripts/team.ts', process.argv.slice(2), env);
  console.log(output.trim());
  process.exitCode = status;
} catch (error) {
  console.error(explain(error));
  process.exitCode = 1;
}
