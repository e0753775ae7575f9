import { readdir } from 'node:fs/promises';
import path from 'node:path';
import { describe, expect, it } from 'vitest';
import { ACCESS, ASKING, NOT_OURS, type Row } from './access-table';
import { Browser, type Answer, type Asked } from './browser';
import { fingerprint, makeWorld, type World } from './world';

const ROOT = path.resolve(import.meta.dirname, '../..');
const METHODS = ['GET', 'HEAD', 'POST', 'PUT', 'PATCH', 'DELETE'];
const CHANGES = new Set(['POST', 'PUT', 'PATCH', 'DELETE']);

interface Found {
  name: string;
  method: string;
  address: string;
  handler: unknown;
}

/** Every method that a file under app/api answers: the table is held against this, not the other way round. */
async function findRoutes(): Promise<Found[]> {
  const found: Found[] = [];
  for (const file of await readdir(path.join(ROOT, 'app/api'), { recursive: true })) {
    if (path.basename(file) !== 'route.ts') continue;
    const address = `/api/${path.dirname(file)}`;
    if (NOT_OURS.includes(address)) continue;
    const handlers = (await import(path.join(ROOT, 'app/api', file))) as Record<string, unknown>;
    for (const method of METHODS)
      if (handlers[method]) found.push({ name: `${method} ${address}`, method, address, handler: handlers[method] });
  }
  return found.sort((a, b) => (a.name < b.name ? -1 : 1));
}

const routes = await findRoutes();
const asked = (world: World, method: string, row: Row): Asked => ({
  method,
  path: row.path ?? '/',
  params: row.params?.(world) ?? {},
  body: row.body?.(world),
  ...(row.file && { raw: row.file.bytes, headers: { 'content-type': row.file.type } }),
});
const withHeaders = (request: Asked, headers: Record<string, string | null>): Asked => ({
  ...request,
  headers: { ...request.headers, ...headers },
});
const browserOf = (world: World, who: (typeof ASKING)[number]) =>
  who === 'anonymous' ? new Browser() : world.browsers[who];

describe('the table', () => {
  it('has a row for every method of every route, and no other', () => {
    expect(Object.keys(ACCESS).sort()).toEqual(routes.map(({ name }) => name));
  });

  it('has no address with a child under a parent: the first one needs a test of a foreign child', () => {
    expect(routes.filter(({ address }) => (address.match(/\[/g) ?? []).length > 1)).toEqual([]);
  });
});

describe.each(routes)('$name', ({ name, method, handler }) => {
  const row = ACCESS[name]!;

  it.each(ASKING.map((who, i) => [who, row.gets[i]!] as const))(
    '%s gets %i, and a refusal changes nothing',
    async (who, status) => {
      const world = await makeWorld();
      const before = await fingerprint(world.team.id);
      const answer: Answer = await browserOf(world, who).ask(handler, asked(world, method, row));
      expect(answer.status).toBe(status);
      if (status >= 400) expect(answer.body).toMatchObject({ error: expect.any(String), message: expect.any(String) });
      if (status >= 400 || !CHANGES.has(method) || who === 'stranger')
        expect(await fingerprint(world.team.id)).toBe(before);
    },
  );

  if (!CHANGES.has(method)) return;

  it.each([
    ['a foreign origin', { origin: 'https://elsewhere.example' }],
    ['an origin of null', { origin: 'null' }],
    ['no origin', { origin: null }],
    ['a page of another site', { 'sec-fetch-site': 'cross-site' }],
    ['a page of a sister host', { 'sec-fetch-site': 'same-site' }],
  ])('refuses %s with the cookie of somebody who may', async (_, headers) => {
    const world = await makeWorld();
    const before = await fingerprint(world.team.id);
    for (const who of ASKING) {
      const answer = await browserOf(world, who).ask(handler, withHeaders(asked(world, method, row), headers));
      expect([who, answer.status]).toEqual([who, 403]);
    }
    expect(await fingerprint(world.team.id)).toBe(before);
  });

  if (!row.body && !row.file) return;

  it('refuses a body sent as a form would send it', async () => {
    const world = await makeWorld();
    const before = await fingerprint(world.team.id);
    for (const type of ['text/plain', 'application/x-www-form-urlencoded', 'multipart/form-data', null]) {
      const answer = await world.browsers.electrician.ask(
        handler,
        withHeaders(asked(world, method, row), { 'content-type': type }),
      );
      expect([type, answer.status]).toEqual([type, 400]);
    }
    expect(await fingerprint(world.team.id)).toBe(before);
  });
});

describe.each(routes.filter(({ name }) => ACCESS[name]!.params))('$name', ({ name, method, handler }) => {
  const row = ACCESS[name]!;

  it('answers the id of another team, an unknown one and what is no id alike', async () => {
    const world = await makeWorld();
    const [field] = Object.keys(row.params!(world));
    const foreign = {
      jobId: world.foreign.jobId,
      drawingId: world.foreign.drawingId,
      personId: world.foreign.personId,
      uploadId: world.foreign.uploadId,
    }[field!]!;
    for (const who of ASKING.filter((_, i) => row.gets[i]! < 300))
      for (const id of [foreign, '00000000-0000-4000-8000-000000000000', `${foreign}'--`, '1', '../..']) {
        const { status } = await browserOf(world, who).ask(handler, { ...asked(world, method, row), params: { [field!]: id } });
        expect([who, id, status]).toEqual([who, id, 404]);
      }
  });
});
