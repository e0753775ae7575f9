import fc from 'fast-check';
import pg from 'pg';
import { describe, expect, inject, it } from 'vitest';
import { GET as open } from '@/app/api/drawings/[drawingId]/route';
import { POST as save } from '@/app/api/drawings/[drawingId]/changes/route';
import { GET as revisions, POST as record } from '@/app/api/drawings/[drawingId]/revisions/route';
import { applyPatch, type Patch } from '@/diagram/document/patch';
import { DocumentSchema, emptyDocument, type Installation } from '@/diagram/document/schema';
import { SNAPSHOT_EVERY, snapshotIfDue } from '@/lib/server/drawings/background';
import { sha256 } from '@/lib/server/drawings/hash';
import { loadState, readSnapshot } from '@/lib/server/drawings/load-state';
import { nextLetter } from '@/lib/server/drawings/record-revision';
import { forget } from '@/lib/server/drawings/state-cache';
import { sweepIdleDrawings } from '@/lib/server/drawings/sweep';
import { Drawing, DrawingSnapshot } from '@/models';
import { signedIn, type Browser } from './browser';
import { SUPPLY, change, makeJob, makePerson, place } from './factories';

async function studio() {
  const person = await makePerson();
  const { drawingId } = await makeJob(person);
  return { teamId: person.teamId, params: { drawingId }, browser: await signedIn(person) };
}

/** Makes the changes of a team look a while old. The log cannot be rewritten, so the owner of the tables has to. */
async function age(teamId: string): Promise<void> {
  const owner = new pg.Client({ connectionString: inject('ownerUrl') });
  await owner.connect();
  await owner.query('alter table drawing_changes disable trigger drawing_changes_stay');
  await owner.query(`update drawing_changes set at = at - interval '16 minutes' where team_id = $1`, [teamId]);
  await owner.query('alter table drawing_changes enable trigger drawing_changes_stay');
  await owner.end();
}

const id = fc.constantFrom('a', 'b', 'c', 'd', 'Q1', 'k-9', 'x.y', '0');
const ids = fc.uniqueArray(id, { minLength: 1, maxLength: 4 });
const position = fc.record({ x: fc.integer({ min: -5000, max: 5000 }), y: fc.integer({ min: -5000, max: 5000 }) });
const uniqueBy = { selector: (item: { id: string }) => item.id, minLength: 1, maxLength: 4 };
const text = fc.string({ maxLength: 12, unit: 'grapheme' });
/** Any change that the schema takes, with ids from a small set so that changes meet. */
const anyPatch: fc.Arbitrary<Patch> = fc.record(
  {
    set: fc.record(
      {
        places: fc.uniqueArray(fc.record({ id, name: text, kind: fc.constantFrom('room', 'wet') }), uniqueBy),
        parts: fc.uniqueArray(
          fc.record({ id, kind: fc.constant('mcb' as const), rating: fc.constantFrom(6, 10, 16.5) }),
          uniqueBy,
        ),
        wires: fc.uniqueArray(
          fc.record({
            id,
            from: fc.tuple(id, fc.constant('1')),
            to: fc.tuple(id, fc.constant('2')),
            role: fc.constantFrom('line', 'neutral'),
          }),
          uniqueBy,
        ),
        overview: fc.dictionary(id, position, { minKeys: 1, maxKeys: 3 }),
        title: text,
        ambient: fc.constantFrom(25, 30.5, 40),
        notices: fc.array(fc.record({ place: id, text }), { maxLength: 2 }),
      },
      { requiredKeys: [] },
    ),
    remove: fc.record(
      { places: ids, parts: ids, wires: ids, overview: ids, notices: fc.constant(true as const) },
      { requiredKeys: [] },
    ),
  },
  { requiredKeys: [] },
) as fc.Arbitrary<Patch>;

describe('a history', () => {
  it('read back from snapshot and tail is the state built directly, byte for byte', async () => {
    await fc.assert(
      fc.asyncProperty(
        fc.array(anyPatch, { minLength: 1, maxLength: 25 }),
        fc.integer({ min: 1, max: 25 }),
        async (patches, cut) => {
          const { browser, params, teamId } = await studio();
          let direct: Installation = emptyDocument('Heron Row 9', 'IEC', SUPPLY);
          for (const [base, patch] of patches.entries()) {
            expect((await browser.post(save, params, change(base, patch))).status).toBe(200);
            direct = applyPatch(direct, patch);
            if (base === cut) await snapshotIfDue(teamId, params.drawingId, 1);
          }
          const kept = JSON.stringify((await loadState(teamId, params.drawingId)).document);
          forget(teamId, params.drawingId);
          const read = JSON.stringify((await loadState(teamId, params.drawingId)).document);
          // Through JSON once: what the server got was what the window sent.
          const sent = JSON.stringify(JSON.parse(JSON.stringify(direct)));
          expect(read).toBe(kept);
          expect(JSON.parse(read)).toEqual(JSON.parse(sent));
          expect(DocumentSchema.safeParse(JSON.parse(read)).success).toBe(true);
        },
      ),
      { numRuns: 25 },
    );
  }, 120_000);

  it('is frozen every 200 changes, without holding up a save, and opens from there', async () => {
    const { browser, params, teamId } = await studio();
    for (let i = 0; i < SNAPSHOT_EVERY + 3; i++)
      await browser.post(save, params, change(i, place(`p${i % 40}`, `Room ${i}`)));
    await expect
      .poll(async () => (await Drawing.findOne({ where: { teamId, id: params.drawingId } }))!.snapshotRev, {
        timeout: 10_000,
      })
      .toBeGreaterThanOrEqual(SNAPSHOT_EVERY);
    forget(teamId, params.drawingId);
    const { body } = await browser.ask(open, { params });
    expect(body.rev).toBe(SNAPSHOT_EVERY + 3);
    expect(body.document.places.find((p: { id: string }) => p.id === 'p2').name).toBe('Room 202');
  });

  it('of a drawing that was left alone is frozen by the sweep, when it is worth it', async () => {
    const { browser, params, teamId } = await studio();
    const head = async () => (await Drawing.findOne({ where: { teamId, id: params.drawingId } }))!;
    for (let i = 0; i < 19; i++) await browser.post(save, params, change(i, place(`p${i}`)));
    await age(teamId);
    await sweepIdleDrawings();
    expect((await head()).snapshotRev).toBe(0);
    await browser.post(save, params, change(19, place('p19')));
    await sweepIdleDrawings();
    expect((await head()).snapshotRev).toBe(0); // somebody draws in it right now
    await age(teamId);
    await sweepIdleDrawings();
    expect((await head()).snapshotRev).toBe(20);
  });

  it('is not read past a gap', async () => {
    const { browser, params, teamId } = await studio();
    await browser.post(save, params, change(0, place('p1')));
    await Drawing.update({ rev: 3 }, { where: { teamId, id: params.drawingId } });
    forget(teamId, params.drawingId);
    await expect(loadState(teamId, params.drawingId)).rejects.toThrow(/lacks changes/);
  });
});

describe('revisions', () => {
  const note = (browser: Browser, params: { drawingId: string }, text = 'As surveyed') =>
    browser.post(record, params, { note: text });

  it('freeze the drawing under the next letter, with the hash of the frozen bytes', async () => {
    const { browser, params, teamId } = await studio();
    await browser.post(save, params, change(0, place('p1', 'Study')));
    const a = await note(browser, params);
    expect(a).toMatchObject({
      status: 201,
      body: {
        letter: 'A',
        rev: 1,
        note: 'As surveyed',
        state: 'draft',
        by: 'T. B.',
        hash: expect.stringMatching(/^[0-9a-f]{64}$/),
      },
    });
    await browser.post(save, params, change(1, place('p1', 'Office')));
    await note(browser, params, 'After the visit');
    const { body } = await browser.ask(revisions, { params });
    expect(body.map((r: { letter: string }) => r.letter)).toEqual(['B', 'A']);
    const frozen = (await DrawingSnapshot.findOne({ where: { teamId, drawingId: params.drawingId, rev: 1 } }))!;
    expect(sha256(frozen.body)).toBe(a.body.hash);
    expect((await readSnapshot(teamId, params.drawingId, 1)).places[0]!.name).toBe('Study');
    expect((await browser.ask(open, { params })).body.titleBlock).toMatchObject({ revision: 'B', state: 'draft' });
  });

  it('are one when two are recorded at once', async () => {
    const { browser, params } = await studio();
    const answers = await Promise.all(Array.from({ length: 6 }, () => note(browser, params)));
    expect(answers.map(({ status }) => status).sort()).toEqual([201, 409, 409, 409, 409, 409]);
    expect(answers.find(({ status }) => status === 409)!.body.message).toBe('Nothing was drawn since revision A.');
  });

  it('and the changes they hold cannot be taken away', async () => {
    const { browser, params, teamId } = await studio();
    await note(browser, params);
    await expect(DrawingSnapshot.destroy({ where: { teamId, drawingId: params.drawingId } })).rejects.toThrow(
      /foreign key/,
    );
  });

  it.each([
    [null, 'A'],
    ['A', 'B'],
    ['Z', 'AA'],
    ['AZ', 'BA'],
    ['ZZ', 'AAA'],
  ])('after %s comes %s', (letter, next) => {
    expect(nextLetter(letter)).toBe(next);
  });
});
