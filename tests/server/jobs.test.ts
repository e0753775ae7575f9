import { randomUUID } from 'node:crypto';
import { describe, expect, it } from 'vitest';
import { GET as clients } from '@/app/api/clients/route';
import { GET as list, POST as create } from '@/app/api/jobs/route';
import { GET as read, PATCH as edit } from '@/app/api/jobs/[jobId]/route';
import { POST as save } from '@/app/api/drawings/[drawingId]/changes/route';
import { GET as open } from '@/app/api/drawings/[drawingId]/route';
import { examineDrawing } from '@/lib/server/drawings/background';
import type { JobInput, JobPage } from '@/lib/shared/jobs';
import { Client, Job } from '@/models';
import { signedIn, type Browser } from './browser';
import { SUPPLY, change, jobInput, makeJob, makePerson, makeTeam, place } from './factories';

async function office() {
  const team = await makeTeam();
  const person = await makePerson(['electrician'], team);
  return { team, person, browser: await signedIn(person) };
}
const patch = (browser: Browser, jobId: string, body: object) =>
  browser.ask(edit, { method: 'PATCH', params: { jobId }, body });
const page = async (browser: Browser, query = ''): Promise<JobPage> =>
  (await browser.ask(list, { path: `/?${query}` })).body;

describe('a new job', () => {
  it('has the next number of its team, an empty drawing in its practice, and what was typed', async () => {
    const { browser } = await office();
    const input = jobInput({
      practice: 'IN',
      hoursWanted: 4,
      due: '2027-01-15',
      clientPhone: '0123',
      clientEmail: 'o@example.org',
    });
    const first = await browser.post(create, {}, input);
    expect(first).toMatchObject({
      status: 201,
      body: {
        ...input,
        number: 'OH-1',
        revision: '-',
        state: 'draft',
        waits: 'the survey',
        version: 0,
        rights: { edit: true, draw: true },
      },
    });
    expect((await browser.post(create, {}, input)).body.number).toBe('OH-2');
    const { body } = await browser.ask(open, { params: { drawingId: first.body.drawingId } });
    expect(body).toMatchObject({
      rev: 0,
      document: { title: input.title, practice: 'IN', supply: SUPPLY, parts: [] },
      titleBlock: {
        number: 'OH-1',
        client: 'O. Pell',
        team: 'Reedbank Electrics',
        drawnBy: 'T. B.',
        revision: '-',
        state: 'draft',
      },
    });
  });

  it('gets a number of its own when twenty are made at once', async () => {
    const { browser } = await office();
    const answers = await Promise.all(Array.from({ length: 20 }, () => browser.post(create, {}, jobInput())));
    expect(new Set(answers.map(({ body }) => body.number)).size).toBe(20);
  });

  it('uses the client of that name again, whatever the capitals, and keeps what is known of them', async () => {
    const { browser, team } = await office();
    await browser.post(create, {}, jobInput({ client: 'O. Pell', clientPhone: '0123' }));
    const again = await browser.post(create, {}, jobInput({ client: 'o. pell' }));
    expect(again.body).toMatchObject({ client: 'O. Pell', clientPhone: '0123' });
    expect(await Client.count({ where: { teamId: team.id } })).toBe(1);
  });

  it.each([
    ['title', { title: '  ' }],
    ['client', { client: '' }],
    ['clientEmail', { clientEmail: 'nobody' }],
    ['hoursWanted', { hoursWanted: 73 }],
    ['practice', { practice: 'XX' }],
    ['supply.voltage', { supply: { ...SUPPLY, voltage: -1 } }],
    ['due', { due: '2027-02-30' }],
    ['given', { given: [randomUUID()] }],
  ])('names %s when it is wrong, and makes nothing', async (field, over) => {
    const { browser, team } = await office();
    const answer = await browser.post(create, {}, { ...jobInput(), ...over });
    expect(answer.status).toBe(400);
    expect(Object.keys(answer.body.fields)).toEqual([field]);
    expect(await Job.count({ where: { teamId: team.id } })).toBe(0);
    expect(await Client.count({ where: { teamId: team.id } })).toBe(0);
  });

  it('takes no other field than those named', async () => {
    const { browser } = await office();
    for (const field of ['teamId', 'number', 'createdBy', 'archivedAt', 'version', 'state', 'drawingId'])
      expect((await browser.post(create, {}, { ...jobInput(), [field]: randomUUID() })).status).toBe(400);
  });

  it('is given to people of the team only', async () => {
    const { browser } = await office();
    const outsider = await makePerson(['apprentice']);
    expect(await browser.post(create, {}, jobInput({ given: [outsider.id] }))).toMatchObject({
      status: 400,
      body: { fields: { given: expect.any(String) } },
    });
  });
});

describe('editing a job', () => {
  it('is refused on an older version, and loses nothing of the first', async () => {
    const { browser, person } = await office();
    const { id } = await makeJob(person);
    expect((await patch(browser, id, { version: 0, address: 'First' })).body).toMatchObject({
      address: 'First',
      version: 1,
    });
    expect(await patch(browser, id, { version: 0, address: 'Second', client: 'Somebody new' })).toMatchObject({
      status: 409,
      body: { error: 'conflict' },
    });
    expect((await browser.ask(read, { params: { jobId: id } })).body).toMatchObject({
      address: 'First',
      client: 'O. Pell',
    });
  });

  it('puts practice, supply and title into the drawing, as a change that an open sheet can take in', async () => {
    const { browser, person } = await office();
    const { id, drawingId } = await makeJob(person);
    await browser.post(save, { drawingId }, change(0, place('p1')));
    const supply = { ...SUPPLY, system: 'TT' as const, ra: 20 };
    expect(
      (await patch(browser, id, { version: 0, practice: 'GB', supply, title: 'Heron Row 11' })).body,
    ).toMatchObject({ practice: 'GB', supply, title: 'Heron Row 11' });
    const late = await browser.post(save, { drawingId }, change(1, place('p2')));
    expect(late.body.since).toMatchObject([
      { label: 'Change the job', patch: { set: { title: 'Heron Row 11', practice: 'GB', supply } } },
    ]);
    const { body } = await browser.ask(open, { params: { drawingId } });
    expect(body).toMatchObject({ rev: 2, document: { practice: 'GB', title: 'Heron Row 11', places: [{ id: 'p1' }] } });
  });

  it('leaves the drawing alone when nothing of it changes', async () => {
    const { browser, person } = await office();
    const { id, drawingId } = await makeJob(person);
    await patch(browser, id, { version: 0, due: '2027-03-01', supply: SUPPLY, practice: 'IEC' });
    expect((await browser.ask(open, { params: { drawingId } })).body.rev).toBe(0);
  });

  it('archives it and takes it back; an archived one is not drawn in', async () => {
    const { browser, person } = await office();
    const { id, drawingId } = await makeJob(person);
    expect((await patch(browser, id, { version: 0, archived: true })).body).toMatchObject({
      archived: true,
      rights: { edit: true, draw: false },
    });
    expect(await browser.post(save, { drawingId }, change(0, place('p1')))).toMatchObject({
      status: 409,
      body: { error: 'conflict' },
    });
    expect(await patch(browser, id, { version: 1, practice: 'GB' })).toMatchObject({ status: 409 });
    expect((await patch(browser, id, { version: 1, archived: false, practice: 'GB' })).body).toMatchObject({
      archived: false,
      practice: 'GB',
    });
    expect((await browser.post(save, { drawingId }, change(1, place('p1')))).status).toBe(200);
  });

  it('gives the job to an apprentice, who then sees it and draws in it, and takes it away again', async () => {
    const { browser, person, team } = await office();
    const apprentice = await makePerson(['apprentice'], team, 'Noah Sedge');
    const theirs = await signedIn(apprentice);
    const { id, drawingId } = await makeJob(person, { clientPhone: '0123', clientEmail: 'o@example.org' });
    expect((await page(theirs)).total).toBe(0);
    await patch(browser, id, { version: 0, given: [apprentice.id] });
    expect((await page(theirs)).rows).toHaveLength(1);
    const { body } = await theirs.ask(read, { params: { jobId: id } });
    expect(body).toMatchObject({ given: [apprentice.id], rights: { edit: false, draw: true } });
    expect(body.clientPhone ?? body.clientEmail).toBeUndefined();
    expect((await theirs.post(save, { drawingId }, change(0, place('p1')))).status).toBe(200);
    await patch(browser, id, { version: 1, given: [] });
    expect((await theirs.post(save, { drawingId }, change(1, place('p2')))).status).toBe(404);
    expect((await page(theirs)).total).toBe(0);
  });
});

describe('the register', () => {
  async function shelf() {
    const { browser, person, team } = await office();
    const day = (days: number) => new Date(Date.now() + days * 86_400_000).toISOString().slice(0, 10);
    const jobs: Partial<JobInput>[] = [
      { title: 'Salt Quay 3', client: 'L. Abara', due: day(-3) },
      { title: 'Old Store, loft', client: 'Zed & Sons', due: null },
      { title: '100% House', client: 'M. Orrin', due: day(2), address: 'Saltpan Lane' },
      { title: 'apple yard', client: 'a_b', due: day(30) },
    ];
    for (const job of jobs) await makeJob(person, job);
    return { browser, person, team };
  }
  const titles = async (browser: Browser, query: string) => (await page(browser, query)).rows.map(({ title }) => title);

  it('sorts by each heading, both ways, with nothing due last', async () => {
    const { browser } = await shelf();
    expect(await titles(browser, '')).toEqual(['Salt Quay 3', '100% House', 'apple yard', 'Old Store, loft']);
    expect(await titles(browser, 'sort=due&direction=desc')).toEqual([
      'apple yard',
      '100% House',
      'Salt Quay 3',
      'Old Store, loft',
    ]);
    expect(await titles(browser, 'sort=title')).toEqual(['100% House', 'apple yard', 'Old Store, loft', 'Salt Quay 3']);
    expect(await titles(browser, 'sort=number&direction=desc')).toEqual([
      'apple yard',
      '100% House',
      'Old Store, loft',
      'Salt Quay 3',
    ]);
    expect(await titles(browser, 'sort=client')).toEqual([
      'apple yard',
      'Salt Quay 3',
      '100% House',
      'Old Store, loft',
    ]);
    for (const sort of ['state', 'updated']) expect(await titles(browser, `sort=${sort}`)).toHaveLength(4);
  });

  it('finds by number, title, client and address, taking signs as they stand', async () => {
    const { browser } = await shelf();
    expect(await titles(browser, 'search=salt&sort=number')).toEqual(['Salt Quay 3', '100% House']);
    expect(await titles(browser, 'search=OH-2')).toEqual(['Old Store, loft']);
    expect(await titles(browser, 'search=100%25')).toEqual(['100% House']);
    expect(await titles(browser, 'search=a_b')).toEqual(['apple yard']);
    expect(await titles(browser, 'search=%5C')).toEqual([]);
    expect(await titles(browser, `search=${encodeURIComponent("' or 1=1 --")}`)).toEqual([]);
  });

  it('filters by what is due, mine and archived, and counts them all', async () => {
    const { browser, team, person } = await shelf();
    const colleague = await signedIn(await makePerson(['electrician'], team));
    expect(await titles(browser, 'filter=due&sort=number')).toEqual(['Salt Quay 3', '100% House']);
    expect(await titles(browser, 'filter=mine')).toHaveLength(4);
    expect(await titles(colleague, 'filter=mine')).toEqual([]);
    await Job.update({ archivedAt: new Date() }, { where: { teamId: team.id, number: 1 } });
    expect(await page(browser, 'filter=archived')).toMatchObject({
      total: 1,
      all: 3,
      rows: [{ title: 'Salt Quay 3', archived: true }],
    });
    expect((await page(browser)).total).toBe(3);
    expect(person.teamId).toBe(team.id);
  });

  it('pages by 25', async () => {
    const { browser, person } = await office();
    for (let i = 0; i < 27; i++) await makeJob(person, { title: `House ${i}` });
    expect(await page(browser, 'sort=number')).toMatchObject({ total: 27, page: 1, pages: 2 });
    expect((await page(browser, 'sort=number&page=2')).rows.map(({ number }) => number)).toEqual(['OH-26', 'OH-27']);
    expect((await page(browser, 'page=9')).rows).toEqual([]);
  });

  it.each(['sort=password', 'direction=asc;drop', 'page=0', 'page=1e9', 'sort=due&sort=title', 'filter=everything'])(
    'refuses %s',
    async (query) => {
      const { browser } = await office();
      expect((await browser.ask(list, { path: `/?${query}` })).status).toBe(400);
    },
  );

  it('shows what was found when the drawing was last examined', async () => {
    const { browser, person, team } = await office();
    const { drawingId } = await makeJob(person);
    expect((await page(browser)).rows[0]).toMatchObject({ findings: null });
    const bare = {
      set: {
        parts: [
          { id: 'E1', kind: 'lamp', watts: 9 },
          { id: 'G1', kind: 'supply' },
        ],
        wires: [{ id: 'w1', from: ['G1', 'L'], to: ['E1', 'L'], role: 'line' }],
      },
    };
    await browser.post(save, { drawingId }, change(0, bare));
    await examineDrawing(team.id, drawingId);
    const { findings, waits } = (await page(browser)).rows[0]!;
    expect(findings!.danger + findings!.defect).toBeGreaterThan(0);
    expect(waits).toMatch(/findings? to put right$/);
  });
});

describe('clients', () => {
  it('are found by a part of their name, in the own team only', async () => {
    const { browser, person } = await office();
    const other = await office();
    await makeJob(person, { client: 'Mira Orrin', clientEmail: 'mira@example.org' });
    await makeJob(other.person, { client: 'Mira Elsewhere' });
    const { body } = await browser.ask(clients, { path: '/?search=mira' });
    expect(body).toEqual([{ id: expect.any(String), name: 'Mira Orrin', phone: '', email: 'mira@example.org' }]);
    expect((await browser.ask(clients, { path: '/?search=%25' })).body).toEqual([]);
  });
});
