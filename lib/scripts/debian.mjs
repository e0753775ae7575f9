import { access } from 'node:fs/promises';
import { Stop, isRoot, lastLine, run } from './run.mjs';

const exists = (path) =>
  access(path).then(
    () => true,
    () => false,
  );

/**
 * Installs packages of Debian, as root; a person without the right is told the one line to run instead.
 * @throws {Stop} with what to do
 */
export async function installPackages(packages, what) {
  const line = `apt-get install -y ${packages.join(' ')}`;
  if (!(await exists('/usr/bin/apt-get')))
    throw new Stop(
      `${what} is missing and this system has no apt-get. Install ${packages.join(', ')} and start again.`,
    );
  if (!isRoot()) throw new Stop(`${what} is missing. Run this once: sudo ${line}`);
  console.log(`Installing ${packages.join(', ')} from Debian ...`);
  const env = { DEBIAN_FRONTEND: 'noninteractive' };
  await run('apt-get', ['update', '-qq'], { env });
  const { status, output } = await run('apt-get', ['install', '-y', '-qq', '--no-install-recommends', ...packages], {
    env,
  });
  if (status !== 0)
    throw new Stop(`Debian could not install ${packages.join(', ')}: ${lastLine(output)}. Try: ${line}`);
}
