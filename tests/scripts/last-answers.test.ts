import { spawn } from 'node:child_process';
import http from 'node:http';
import { pathToFileURL } from 'node:url';
import { expect, it } from 'vitest';

const HOOK = pathToFileURL('lib/scripts/last-answers.mjs').href;
/** Answers after half a second, is told to stop after a fifth, and says how long the stop took. */
const SERVER = `
  const server = require('node:http').createServer((_, answer) => setTimeout(() => answer.end('last'), 500));
  server.on('request', () => setTimeout(() => {
    const began = Date.now();
    server.close(() => console.log(Date.now() - began));
  }, 200));
  server.listen(0, '127.0.0.1', () => console.log(server.address().port));`;

it('a server that is told to stop gives the answer under way, then ends the connection', async () => {
  const child = spawn(process.execPath, ['--import', HOOK, '-e', SERVER]);
  const said: string[] = [];
  const line = (n: number) =>
    new Promise<string>((resolve) => {
      const look = () => said.length >= n && resolve(said[n - 1]!);
      child.stdout.on('data', look);
      look();
    });
  child.stdout.on('data', (text) => said.push(...String(text).trim().split('\n')));
  try {
    const agent = new http.Agent({ keepAlive: true });
    const port = Number(await line(1));
    const answer = await new Promise<string>((resolve, reject) =>
      http
        .get({ host: '127.0.0.1', port, agent }, (response) => response.on('data', (text) => resolve(String(text))))
        .on('error', reject),
    );
    expect(answer).toBe('last');
    // Node's keep-alive is five seconds
    expect(Number(await line(2))).toBeLessThan(4000);
  } finally {
    child.kill('SIGKILL');
  }
});
