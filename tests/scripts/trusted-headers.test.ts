import { spawn } from 'node:child_process';
import path from 'node:path';
import { afterEach, describe, expect, it } from 'vitest';

const HOOK = path.resolve(import.meta.dirname, '../../lib/scripts/trusted-headers.mjs');
const SERVER = `
  const server = require('node:http').createServer((request, answer) => answer.end(JSON.stringify(request.headers)));
  server.listen(0, '127.0.0.1', () => console.log(server.address().port));
`;
const stop: (() => void)[] = [];
afterEach(() => stop.splice(0).forEach((end) => end()));

/** A server of the kind that is loaded after the hook, and what it sees of a request's headers. */
async function seen(
  headers: Record<string, string>,
  env: Record<string, string> = {},
): Promise<Record<string, string>> {
  const child = spawn(process.execPath, ['--import', HOOK, '-e', SERVER], { env: { ...process.env, ...env } });
  stop.push(() => child.kill());
  const port = await new Promise<string>((resolve) =>
    child.stdout.once('data', (text) => resolve(String(text).trim())),
  );
  return (await (await fetch(`http://127.0.0.1:${port}/`, { headers })).json()) as Record<string, string>;
}

describe('what a client says of itself', () => {
  const claims = {
    'x-forwarded-for': '203.0.113.9, 198.51.100.7',
    'x-forwarded-host': 'elsewhere.example',
    'x-forwarded-proto': 'https',
    'x-real-ip': '203.0.113.9',
    forwarded: 'for=203.0.113.9',
    'x-middleware-subrequest': 'proxy',
  };

  it('is thrown away; the address comes from the connection', async () => {
    const headers = await seen({ ...claims, accept: 'text/html' });
    expect(headers['x-forwarded-for']).toBe('127.0.0.1');
    for (const name of Object.keys(claims).slice(1)) expect(headers[name]).toBeUndefined();
    expect(headers.accept).toBe('text/html');
  });

  it('is believed behind a proxy of one\u2019s own only as far as that proxy wrote it', async () => {
    const headers = await seen(claims, { TRUST_PROXY: '1' });
    expect(headers['x-forwarded-for']).toBe('198.51.100.7');
    expect(headers['x-forwarded-host']).toBeUndefined();
  });
});
