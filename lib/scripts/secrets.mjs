import { randomBytes } from 'node:crypto';
import { chmod, mkdir, readFile, readdir, rename, writeFile } from 'node:fs/promises';
import path from 'node:path';
import { Stop } from './run.mjs';

const fileIn = (folder) => path.join(folder, 'secrets.json');
const secret = () => randomBytes(32).toString('base64url');

async function write(folder, secrets) {
  const file = fileIn(folder);
  // First beside, then in its place: a full disk must not leave half a file where the passwords were.
  await writeFile(`${file}.new`, `${JSON.stringify(secrets, null, 2)}\n`, { mode: 0o600 });
  await chmod(`${file}.new`, 0o600);
  await rename(`${file}.new`, file);
}

/** The passwords of the database and the key that signs cookies: made once, readable by their owner only. */
export async function loadSecrets(folder) {
  await mkdir(folder, { recursive: true });
  const text = await readFile(fileIn(folder), 'utf8').catch((error) => {
    if (error.code === 'ENOENT') return null;
    throw error;
  });
  if (text === null) {
    if ((await readdir(folder)).includes('postgres'))
      throw new Stop(
        `${fileIn(folder)} is missing, and without it the database beside it cannot be opened. Put it back from a copy, or move ${folder} away to begin anew.`,
      );
    const made = { auth: secret(), passwords: { owner: secret(), app: secret() } };
    await write(folder, made);
    return made;
  }
  try {
    const secrets = JSON.parse(text);
    if (secrets.auth && secrets.passwords.owner && secrets.passwords.app) return secrets;
  } catch {
    // said below
  }
  throw new Stop(`${fileIn(folder)} is broken. Put it back from a copy, or move ${folder} away to begin anew.`);
}

/** Keeps the port, so that the database is found again under the same one. */
export async function rememberPort(folder, clusterPort) {
  const secrets = await loadSecrets(folder);
  if (secrets.clusterPort !== clusterPort) await write(folder, { ...secrets, clusterPort });
}
