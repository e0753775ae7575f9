import { spawn } from 'node:child_process';
import { Stop } from './run.mjs';

const NEXT = 'node_modules/next/dist/bin/next';
const GRACE_MS = 8_000;
const READY_MS = 60_000;

/**
 * Runs the app's server until it is stopped: node itself, so that the process which is stopped is the one that listens.
 * @param {{ dev?: boolean, host: string, port: number, env: Record<string, string>, show?: boolean }} wanted
 */
export function serve({ dev = false, host, port, env, show = true }) {
  const child = spawn(
    process.execPath,
    [
      ...['trusted-headers', 'last-answers'].flatMap((name) => [
        '--import',
        new URL(`./${name}.mjs`, import.meta.url).href,
      ]),
      NEXT,
      dev ? 'dev' : 'start',
      '-H',
      host,
      '-p',
      String(port),
    ],
    {
      env: { ...process.env, ...env, NODE_ENV: dev ? 'development' : 'production', NEXT_TELEMETRY_DISABLED: '1' },
      // Its own banner would stand before ours; faults come on the error stream.
      stdio: ['ignore', dev ? 'inherit' : 'ignore', show ? 'inherit' : 'ignore'],
    },
  );
  let status = null;
  const ended = new Promise((resolve) =>
    child.on('close', (code) => {
      status = code ?? 1;
      resolve(status);
    }),
  );
  return {
    pid: child.pid,
    ended,
    async stop() {
      if (status !== null) return;
      child.kill('SIGTERM');
      const hard = setTimeout(() => child.kill('SIGKILL'), GRACE_MS);
      await ended;
      clearTimeout(hard);
    },
    /** Resolves when the address answers. */
    async ready(address) {
      const until = Date.now() + READY_MS;
      const local = `http://${host === '0.0.0.0' ? '127.0.0.1' : host}:${port}/api/health`;
      while (Date.now() < until) {
        if (status !== null)
          throw new Stop(`The server ended at once with status ${status}; what it said stands above.`);
        const answer = await fetch(local).catch(() => null);
        if (answer?.ok) return;
        await new Promise((resolve) => setTimeout(resolve, 100));
      }
      throw new Stop(`The server did not answer at ${address} within a minute.`);
    },
  };
}
