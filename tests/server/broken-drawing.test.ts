import pg from 'pg';
import { describe, expect, inject, it } from 'vitest';
import { POST as save } from '@/app/api/drawings/[drawingId]/changes/route';
import { GET as json } from '@/app/api/drawings/[drawingId]/json/route';
import { GET as open } from '@/app/api/drawings/[drawingId]/route';
import { GET as readJobRoute } from '@/app/api/jobs/[jobId]/route';
import { sha256 } from '@/lib/server/drawings/hash';
import { forget } from '@/lib/server/drawings/state-cache';
import { DrawingSnapshot } from '@/models';
import { signedIn } from './browser';
import { change, makeJob, makePerson, place } from './factories';

/** As the owner of the tables: the app's own role can change neither a change nor a snapshot. */
async function tamper(table: string, statement: string, values: unknown[]): Promise<void> {
  const owner = new pg.Client({ connectionString: inject('ownerUrl') });
  await owner.connect();
  await owner.query(`alter table ${table} disable trigger ${table}_stay`);
  await owner.query(statement, values);
  await owner.query(`alter table ${table} enable trigger ${table}_stay`);
  await owner.end();
}

/** A drawing of two changes, whose first snapshot is then written anew. */
async function studio(rewrite: (body: string) => string, sum: 'right' | 'wrong' = 'right') {
  const person = await makePerson();
  const { id: jobId, drawingId } = await makeJob(person);
  const browser = await signedIn(person);
  const params = { drawingId };
  await browser.post(save, params, change(0, place('p1', 'Study')));
  const { body } = (await DrawingSnapshot.findOne({ where: { teamId: person.teamId, drawingId, rev: 0 } }))!;
  const written = rewrite(body);
  await tamper(
    'drawing_snapshots',
    'update drawing_snapshots set body = $1, sha256 = $2 where drawing_id = $3',
    [written, sum === 'right' ? sha256(written) : sha256(body), drawingId],
  );
  forget(person.teamId, drawingId);
  return { jobId, params, browser, written };
}
const edited = (change: (document: Record<string, unknown>) => void) => (body: string) => {
  const document = JSON.parse(body);
  change(document);
  return JSON.stringify(document);
};

describe('a drawing that cannot be read whole', () => {
  it('of a later version opens for reading, names what it does not know, and takes no change', async () => {
    const { jobId, params, browser } = await studio(
      edited((document) => {
        document.schema = 2;
        document.parts = [{ id: 'E1', kind: 'lamp', watts: 9 }, { id: 'E2', kind: 'warp drive' }];
      }),
    );
    const { status, body } = await browser.ask(open, { params });
    expect([status, body.rights]).toEqual([200, { edit: false, record: false }]);
    expect(body.document.parts).toEqual([{ id: 'E1', kind: 'lamp', watts: 9 }]);
    // what was drawn since is there
    expect(body.document.places).toEqual([{ id: 'p1', name: 'Study', kind: 'room' }]);
    expect(body.problems.map(({ path }: { path: string }) => path).sort()).toEqual(['parts.1.kind', 'schema']);
    const refused = await browser.post(save, params, change(1, place('p2')));
    expect([refused.status, refused.body.error]).toEqual([409, 'conflict']);
    expect((await browser.ask(open, { params })).body.rev).toBe(1);
    const file = await browser.ask(json, { params });
    expect(JSON.parse(file.body.snapshot).parts[1]).toEqual({ id: 'E2', kind: 'warp drive' });
    expect((await browser.ask(readJobRoute, { params: { jobId } })).body.rights.draw).toBe(false);
  });

  it.each([
    ['cut off', (body: string) => body.slice(0, 40), /JSON|bytes/],
    ['another than was written', edited((document) => void (document.title = 'Elsewhere')), /bytes are not the ones/],
  ])('because its snapshot is %s says so, keeps what was drawn since, and hands over what is stored', async (_, rewrite, words) => {
    const { params, browser, written } = await studio(rewrite, 'wrong');
    const { status, body } = await browser.ask(open, { params });
    expect([status, body.rights.edit]).toEqual([200, false]);
    expect(body.document.places).toEqual([{ id: 'p1', name: 'Study', kind: 'room' }]);
    expect(body.problems.map(({ message }: { message: string }) => message).join()).toMatch(words);
    expect((await browser.post(save, params, change(1, place('p2')))).status).toBe(409);
    const file = await browser.ask(json, { params });
    expect([file.body.snapshot, file.body.changes.length]).toEqual([written, 1]);
  });
});
