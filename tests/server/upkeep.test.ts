import pg from 'pg';
import { describe, expect, inject, it } from 'vitest';
import { POST as save } from '@/app/api/drawings/[drawingId]/changes/route';
import { GET as open } from '@/app/api/drawings/[drawingId]/route';
import { POST as record } from '@/app/api/drawings/[drawingId]/revisions/route';
import { changesSince } from '@/lib/server/drawings/list-changes';
import { snapshotIfDue } from '@/lib/server/drawings/background';
import { checkHashes, damageOf } from '@/lib/server/drawings/check-hashes';
import { forget } from '@/lib/server/drawings/state-cache';
import { doNightWork } from '@/lib/server/drawings/sweep';
import { thinChanges } from '@/lib/server/drawings/thin-changes';
import { AuditEntry, Drawing, DrawingChange } from '@/models';
import { signedIn } from './browser';
import { change, makeJob, makePerson, place } from './factories';

async function studio(saves: number) {
  const person = await makePerson();
  const { drawingId } = await makeJob(person);
  const { teamId } = person;
  const browser = await signedIn(person);
  for (let n = 0; n < saves; n++) await browser.post(save, { drawingId }, change(n, place(`p${n}`)));
  const head = async () => (await Drawing.findOne({ where: { teamId, id: drawingId } }))!;
  const revs = async () =>
    (await DrawingChange.findAll({ attributes: ['rev'], where: { teamId, drawingId }, order: [['rev', 'ASC']] })).map(
      ({ rev }) => rev,
    );
  return { teamId, drawingId, params: { drawingId }, browser, head, revs };
}

/** As the owner of the tables: the app's own role can change neither a change nor a snapshot. */
async function tamper(...statements: string[]): Promise<void> {
  const owner = new pg.Client({ connectionString: inject('ownerUrl') });
  await owner.connect();
  const tables = ['drawing_changes', 'drawing_snapshots'];
  for (const table of tables) await owner.query(`alter table ${table} disable trigger ${table}_stay`);
  for (const statement of statements) await owner.query(statement);
  for (const table of tables) await owner.query(`alter table ${table} enable trigger ${table}_stay`);
  await owner.end();
}
const age = (teamId: string, days: number, where = '') =>
  tamper(`update drawing_changes set at = at - interval '${days} days' where team_id = '${teamId}' ${where}`);

describe('thinning the log', () => {
  it('takes only what is old and lies under a snapshot, never the newest, and the drawing stays what it was', async () => {
    const { teamId, drawingId, params, browser, revs, head } = await studio(8);
    await browser.post(record, params, { note: 'First' });
    for (let n = 8; n < 12; n++) await browser.post(save, params, change(n, place(`p${n}`)));
    const before = (await browser.ask(open, { params })).body.document;
    await thinChanges();
    expect(await revs()).toHaveLength(12);
    await age(teamId, 31, 'and rev <= 6');
    await thinChanges();
    expect(await revs()).toEqual([7, 8, 9, 10, 11, 12]);
    await age(teamId, 31);
    await thinChanges();
    expect(await revs()).toEqual([9, 10, 11, 12]);
    await snapshotIfDue(teamId, drawingId, 1);
    await thinChanges();
    expect(await revs()).toEqual([12]);
    forget(teamId, drawingId);
    const { body } = await browser.ask(open, { params });
    expect(body.document).toEqual(before);
    expect(body.titleBlock).toMatchObject({ drawnBy: 'T. B.', revision: 'A' });
    expect((await browser.post(save, params, change(12, place('p12')))).body).toEqual({ rev: 13 });
    expect((await head()).rev).toBe(13);
  });

  it('answers a window that was away for longer with the drawing as it stands', async () => {
    const { teamId, drawingId, browser, params } = await studio(6);
    await snapshotIfDue(teamId, drawingId, 1);
    await age(teamId, 40);
    await thinChanges();
    const { rev, changes } = await changesSince(teamId, drawingId, 2);
    expect([rev, changes.map((one) => one.rev)]).toEqual([6, [6]]);
    expect(changes[0]!.patch.set?.places?.map(({ id }) => id)).toEqual(['p0', 'p1', 'p2', 'p3', 'p4', 'p5']);
    const late = await browser.post(save, params, change(2, place('p2', 'Cellar')));
    expect(late).toMatchObject({ status: 409, body: { error: 'stale', rev: 6 } });
    expect(await changesSince(teamId, drawingId, 6)).toEqual({ rev: 6, changes: [] });
    expect((await changesSince(teamId, drawingId, 5)).changes).toHaveLength(1);
  });
});

describe('the check of all sums', () => {
  it('finds nothing in a sound drawing, thinned or not', async () => {
    const { teamId, drawingId, browser, params, head } = await studio(5);
    expect(await damageOf(await head())).toEqual([]);
    await browser.post(record, params, { note: 'First' });
    await browser.post(save, params, change(5, place('p5')));
    expect(await damageOf(await head())).toEqual([]);
    await age(teamId, 31, 'and rev <= 3');
    // Its sums cover the time as well: a change that was made to look older is found.
    expect(await damageOf(await head())).toEqual([1, 2, 3].map((rev) => `change ${rev} is not what was written`));
    await thinChanges();
    expect(await damageOf(await head())).toEqual([]);
    await snapshotIfDue(teamId, drawingId, 1);
    expect(await damageOf(await head())).toEqual([]);
  });

  it.each([
    ['a patch', (id: string) => [`update drawing_changes set patch = replace(patch, 'p1', 'p7') where drawing_id = '${id}' and rev = 2`], /change 2 is not/],
    ['who made it', (id: string) => [`update drawing_changes set label = 'Another' where drawing_id = '${id}' and rev = 3`], /change 3 is not/],
    ['a change that is gone', (id: string) => [`delete from drawing_changes where drawing_id = '${id}' and rev = 3`], /changes 3 to 3 are missing/],
    ['the last change', (id: string) => [`delete from drawing_changes where drawing_id = '${id}' and rev = 5`], /newest change is 4/],
    ['a snapshot', (id: string) => [`update drawing_snapshots set body = replace(body, 'Heron', 'Hooon') where drawing_id = '${id}'`], /snapshot 0 is not what was written/],
    ['a snapshot with its sum', (id: string) => [
      `insert into drawing_snapshots (team_id, drawing_id, rev, body, sha256)
         select team_id, drawing_id, 4, body, sha256 from drawing_snapshots where drawing_id = '${id}' and rev = 0`,
    ], /snapshot 4 is not what the changes lead to/],
  ])('finds damage to %s, says it once and writes it down', async (_, statements, words) => {
    const { drawingId, teamId, head } = await studio(5);
    await tamper(...statements(drawingId));
    expect((await damageOf(await head())).join('; ')).toMatch(words);
    const { damaged } = await checkHashes();
    expect(damaged).toBeGreaterThan(0);
    const [entry] = await AuditEntry.findAll({ where: { teamId, action: 'drawing.damaged' } });
    expect(entry).toMatchObject({ subjectId: drawingId });
  });

  it('is done by one process at a time', async () => {
    await Promise.all([doNightWork(), doNightWork(), doNightWork()]);
    const { teamId } = await studio(1);
    expect(await AuditEntry.count({ where: { teamId, action: 'drawing.damaged' } })).toBe(0);
  });
});
