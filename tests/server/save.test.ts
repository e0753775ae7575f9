import { randomUUID } from 'node:crypto';
import { describe, expect, it } from 'vitest';
import { GET as open } from '@/app/api/drawings/[drawingId]/route';
import { GET as since, POST as save } from '@/app/api/drawings/[drawingId]/changes/route';
import { changeHash } from '@/lib/server/drawings/hash';
import { forget } from '@/lib/server/drawings/state-cache';
import { Drawing, DrawingChange, DrawingSnapshot } from '@/models';
import { signedIn } from './browser';
import { change, makeJob, makePerson, makeTeam, place } from './factories';

async function studio() {
  const team = await makeTeam();
  const person = await makePerson(['electrician'], team);
  const { drawingId } = await makeJob(person);
  const teamId = team.id;
  return {
    teamId,
    person,
    params: { drawingId },
    browser: await signedIn(person),
    second: await signedIn(await makePerson(['electrician'], team, 'Ada Finch')),
  };
}

describe('saving', () => {
  it('takes a change on the newest revision and gives it back', async () => {
    const { browser, params } = await studio();
    expect(await browser.post(save, params, change(0, place('p1', 'Study')))).toMatchObject({
      status: 200,
      body: { rev: 1 },
    });
    const { body } = await browser.ask(open, { params });
    expect(body).toMatchObject({
      rev: 1,
      state: 'open',
      rights: { edit: true, record: true },
      document: { places: [{ id: 'p1', name: 'Study' }] },
    });
  });

  it('answers a retry of a lost answer as before and applies nothing twice', async () => {
    const { browser, params, teamId } = await studio();
    const sent = change(0, place('p1'));
    const answers = [];
    for (let i = 0; i < 5; i++) answers.push(await browser.post(save, params, sent));
    await browser.post(save, params, change(1, place('p2')));
    answers.push(await browser.post(save, params, sent));
    expect(answers.map(({ status, body }) => [status, body.rev])).toEqual(Array(6).fill([200, 1]));
    expect(await DrawingChange.count({ where: { teamId, drawingId: params.drawingId } })).toBe(2);
  });

  it('answers the same save sent ten times at once with one revision', async () => {
    const { browser, params, teamId } = await studio();
    const sent = change(0, place('p1'));
    const answers = await Promise.all(Array.from({ length: 10 }, () => browser.post(save, params, sent)));
    expect(answers.map(({ status, body }) => [status, body.rev])).toEqual(Array(10).fill([200, 1]));
    expect(await DrawingChange.count({ where: { teamId, drawingId: params.drawingId } })).toBe(1);
  });

  it('tells the second of two who began at the same revision what the first did', async () => {
    const { browser, second, params } = await studio();
    await browser.post(save, params, change(0, place('p1', 'Study')));
    const late = await second.post(save, params, change(0, place('p2', 'Kitchen')));
    expect(late).toMatchObject({
      status: 409,
      body: {
        error: 'stale',
        rev: 1,
        since: [{ rev: 1, label: 'Add a place', patch: place('p1', 'Study'), person: { initials: 'T. B.' } }],
      },
    });
    const rebased = await second.post(save, params, change(late.body.rev, place('p2', 'Kitchen')));
    expect(rebased.body).toEqual({ rev: 2 });
    const { body } = await browser.ask(open, { params });
    expect(body.document.places.map((p: { name: string }) => p.name)).toEqual(['Study', 'Kitchen']);
  });

  it('keeps one of many that race from one base, and never overwrites', async () => {
    const { browser, second, params } = await studio();
    for (let round = 0; round < 20; round++) {
      const racers = [browser, second, browser, second];
      const answers = await Promise.all(
        racers.map((who, i) => who.post(save, params, change(round, place(`r${round}-${i}`)))),
      );
      expect(answers.map(({ status }) => status).sort()).toEqual([200, 409, 409, 409]);
      for (const { status, body } of answers)
        if (status === 409) expect(body).toMatchObject({ error: 'stale', rev: round + 1 });
    }
    expect((await browser.ask(open, { params })).body.document.places).toHaveLength(20);
  });

  it('answers the changes since a revision', async () => {
    const { browser, params } = await studio();
    for (let i = 0; i < 4; i++) await browser.post(save, params, change(i, place(`p${i}`)));
    const { body } = await browser.ask(since, { params, path: '/?since=2' });
    expect(body.rev).toBe(4);
    expect(body.changes.map((c: { rev: number }) => c.rev)).toEqual([3, 4]);
  });

  it('refuses a base ahead of the drawing', async () => {
    const { browser, params } = await studio();
    expect(await browser.post(save, params, change(7, place('p1')))).toMatchObject({
      status: 409,
      body: { rev: 0, since: [] },
    });
  });

  it('draws nothing in an archived job or a submitted drawing', async () => {
    const { browser, params, teamId } = await studio();
    await Drawing.update({ state: 'submitted' }, { where: { teamId, id: params.drawingId } });
    const refused = await browser.post(save, params, change(0, place('p1')));
    expect(refused).toMatchObject({ status: 409, body: { error: 'conflict' } });
    expect(refused.body.since).toBeUndefined();
    expect((await browser.ask(open, { params })).body.rights.edit).toBe(false);
  });
});

describe('what a patch may hold', () => {
  const bad: Record<string, object> = {
    'a key that is not in the schema': { set: { parts: [{ id: 'Q1', kind: 'mcb', mark: 10 }] } },
    'an unknown kind': { set: { parts: [{ id: 'Q1', kind: 'laser' }] } },
    'a number that is not one': { set: { ambient: 'NaN' } },
    'an id that reaches the prototype': { set: { places: [{ id: '__proto__', name: 'x', kind: 'room' }] } },
    'an owner': { set: { title: 'x' }, teamId: randomUUID() },
    'an array of ids by position': { remove: { parts: [0] } },
  };
  for (const [what, patch] of Object.entries(bad))
    it(`refuses ${what}, names the place and changes nothing`, async () => {
      const { browser, params, teamId } = await studio();
      const answer = await browser.post(save, params, change(0, patch));
      expect(answer).toMatchObject({ status: 400, body: { error: 'invalid' } });
      expect(Object.keys(answer.body.fields)[0]).toMatch(/^patch/);
      expect((await Drawing.findOne({ where: { teamId, id: params.drawingId } }))!.rev).toBe(0);
    });

  it('takes no field beside those of a change: not a mark, a state, an owner or a team', async () => {
    const { browser, params, teamId } = await studio();
    for (const field of ['mark', 'state', 'ownerId', 'teamId', 'personId', 'rev', 'hash', 'at'])
      expect([field, (await browser.post(save, params, { ...change(0, place('p1')), [field]: 'x' })).status]).toEqual([
        field,
        400,
      ]);
    expect(await Drawing.findOne({ where: { teamId, id: params.drawingId } })).toMatchObject({ rev: 0, state: 'open' });
  });

  it('refuses a key that would reach the prototype, wherever it stands', async () => {
    const { browser, params } = await studio();
    const raw = JSON.stringify(change(0, { set: { overview: {} } })).replace(
      '"overview":{}',
      '"overview":{"__proto__":{"x":1,"y":1}}',
    );
    const answer = await browser.ask(save, { method: 'POST', params, raw });
    expect(answer).toMatchObject({
      status: 400,
      body: { error: 'invalid', fields: { ['__proto__']: 'This name is reserved.' } },
    });
  });

  it('refuses a request of more than 640 kB before reading it, and a patch of more than 512 kB', async () => {
    const { browser, params } = await studio();
    const answer = await browser.ask(save, { method: 'POST', params, raw: `"${'x'.repeat(700_000)}"` });
    expect(answer).toMatchObject({ status: 413, body: { error: 'too-large' } });
    const parts = Array.from({ length: 6_000 }, (_, i) => ({ id: `p${i}`, kind: 'joint', label: 'x'.repeat(60) }));
    const most = await browser.post(save, params, change(0, { set: { parts } }));
    expect(most).toMatchObject({ status: 413, body: { error: 'too-large' } });
    expect(await browser.post(save, params, change(0, { set: { parts: parts.slice(0, 4_000) } }))).toMatchObject({
      status: 200,
    });
  });

  it('refuses what would make the drawing too large', async () => {
    const { browser, params } = await studio();
    const rooms = Array.from({ length: 501 }, (_, i) => ({ id: `p${i}`, name: 'x', kind: 'room' }));
    const answer = await browser.post(save, params, change(0, { set: { places: rooms } }));
    expect(answer).toMatchObject({ status: 400, body: { fields: { places: 'At most 500.' } } });
  });
});

describe('the log', () => {
  it('chains every change to the one before, from the first snapshot on', async () => {
    const { browser, params, teamId } = await studio();
    const { drawingId } = params;
    for (let i = 0; i < 6; i++) await browser.post(save, params, change(i, place(`p${i}`)));
    const changes = await DrawingChange.findAll({ where: { teamId, drawingId }, order: [['rev', 'ASC']] });
    let hash = (await DrawingSnapshot.findOne({ where: { teamId, drawingId, rev: 0 } }))!.sha256;
    for (const stored of changes) {
      expect(stored.prevHash).toBe(hash);
      expect(changeHash(hash, stored)).toBe(stored.hash);
      hash = stored.hash;
    }
    expect((await Drawing.findOne({ where: { teamId, id: drawingId } }))!.headHash).toBe(hash);
  });

  it('cannot be rewritten, by the app itself neither', async () => {
    const { browser, params, teamId } = await studio();
    await browser.post(save, params, change(0, place('p1')));
    const where = { teamId, drawingId: params.drawingId };
    await expect(DrawingChange.update({ label: 'Something else' }, { where })).rejects.toThrow(/never changed/);
    await expect(DrawingSnapshot.update({ body: '{}' }, { where })).rejects.toThrow(/never changed/);
  });

  it('draws nothing on a snapshot that is damaged: it opens for reading and says so', async () => {
    const { browser, params, teamId } = await studio();
    const { drawingId } = params;
    const snapshot = (await DrawingSnapshot.findOne({ where: { teamId, drawingId } }))!;
    await DrawingSnapshot.create({
      teamId,
      drawingId,
      rev: 1,
      body: snapshot.body.replace('Heron', 'Horen'),
      sha256: snapshot.sha256,
    });
    await Drawing.update({ rev: 1, snapshotRev: 1 }, { where: { teamId, id: drawingId } });
    forget(teamId, drawingId);
    const { status, body } = await browser.ask(open, { params });
    expect([status, body.rights]).toEqual([200, { edit: false, record: false }]);
    expect(body.problems).toEqual([{ path: 'snapshot 1', message: 'Its bytes are not the ones that were written.' }]);
    expect((await browser.post(save, params, change(1, place('p1')))).status).toBe(409);
  });
});
