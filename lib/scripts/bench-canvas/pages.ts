import { spawn } from 'node:child_process';
import { randomUUID } from 'node:crypto';
import { mkdtemp, readFile, rm, writeFile } from 'node:fs/promises';
import { createServer } from 'node:http';
import { tmpdir } from 'node:os';
import path from 'node:path';
import react from '@vitejs/plugin-react';
import type { Browser, BrowserContext } from 'playwright';
import { build } from 'vite';
import type { Installation } from '@/diagram/document/schema';
import accounts from '@/lib/server/demo/accounts.json' with { type: 'json' };
import { freePort } from '../ports.mjs';

const TYPES: Record<string, string> = { '.html': 'text/html', '.js': 'text/javascript', '.css': 'text/css' };
export interface Served {
  address: string;
  stop(): Promise<void>;
}

/** Builds the bare page into a folder of its own and serves it with the files beside it. */
export async function serveBare(files: Record<string, unknown>): Promise<Served> {
  const folder = await mkdtemp(path.join(tmpdir(), 'bare-'));
  const root = path.resolve('lib/scripts/bench-canvas');
  await build({
    ...{ root, configFile: false, logLevel: 'error', base: './', plugins: [react()], css: { postcss: {} } },
    build: { outDir: folder, emptyOutDir: true, rollupOptions: { input: path.join(root, 'bare.html') } },
  });
  for (const [name, value] of Object.entries(files)) await writeFile(path.join(folder, name), JSON.stringify(value));
  const port = await freePort();
  const server = createServer((request, response) => {
    const name = new URL(request.url!, 'http://localhost').pathname;
    readFile(path.join(folder, path.normalize(name))).then(
      (body) => response.setHeader('content-type', TYPES[path.extname(name)] ?? 'application/json').end(body),
      () => response.writeHead(404).end(),
    );
  }).listen(port, '127.0.0.1');
  return {
    address: `http://127.0.0.1:${port}/bare.html`,
    async stop() {
      server.close();
      await rm(folder, { recursive: true, force: true });
    },
  };
}

/** The app itself, built for production, on a database that is thrown away. */
export async function serveApp(): Promise<Served> {
  const port = await freePort();
  const address = `http://127.0.0.1:${port}`;
  const child = spawn(process.execPath, ['lib/scripts/browser-app.mjs', String(port)], {
    stdio: ['ignore', 'ignore', 'inherit'],
  });
  const ended = new Promise<void>((resolve) => child.on('close', () => resolve()));
  const stop = async () => {
    child.kill('SIGTERM');
    await ended;
  };
  // It may have to be built first.
  const until = Date.now() + 900_000;
  while (!(await fetch(`${address}/api/health`).catch(() => null))?.ok) {
    if (child.exitCode !== null || Date.now() > until) {
      await stop();
      throw new Error('The app did not start; what it said stands above.');
    }
    await new Promise((resolve) => setTimeout(resolve, 250));
  }
  return { address, stop };
}

/** Signs an electrician of the demo in and lays a drawing before them. @returns the path of its job, and the context */
export async function openWith(
  browser: Browser,
  app: string,
  home: Installation,
): Promise<{ context: BrowserContext; job: string }> {
  const context = await browser.newContext({ baseURL: app, viewport: { width: 1440, height: 900 } });
  const { request } = context;
  const email = accounts.people.find(({ roles }) => roles.includes('electrician'))!.email;
  const { csrfToken } = (await (await request.get('/api/auth/csrf')).json()) as { csrfToken: string };
  const headers = { origin: app };
  const form = { csrfToken, email, password: accounts.password, json: 'true' };
  await request.post('/api/auth/callback/credentials', { form, headers });
  const { title, practice, supply } = home;
  const data = { title, client: 'M. Orrin', address: title, practice, supply, hoursWanted: 2, due: null };
  const made = await request.post('/api/jobs', { headers, data });
  if (made.status() !== 201) throw new Error(`the job was refused: ${await made.text()}`);
  const { id } = (await made.json()) as { id: string };
  const { drawingId } = (await (await request.get(`/api/jobs/${id}`)).json()) as { drawingId: string };
  const { places, parts, wires, cables, survey, sheet } = home;
  const set = { places, parts, wires, cables, survey, ...sheet };
  const saved = await request.post(`/api/drawings/${drawingId}/changes`, {
    headers,
    data: { saveId: randomUUID(), base: 0, label: 'Draft the home', patch: { set } },
  });
  if (!saved.ok()) throw new Error(`the drawing was refused: ${await saved.text()}`);
  return { context, job: `/jobs/${id}` };
}
