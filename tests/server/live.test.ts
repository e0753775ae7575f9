import { randomUUID } from 'node:crypto';
import pg from 'pg';
import { afterAll, afterEach, describe, expect, inject, it, vi } from 'vitest';
import { POST as save } from '@/app/api/drawings/[drawingId]/changes/route';
import { GET as events } from '@/app/api/drawings/[drawingId]/events/route';
import { endSessions } from '@/lib/server/account/end-sessions';
import { hub } from '@/lib/server/live/hub';
import { CHECK_MS } from '@/lib/server/live/open-stream';
import { sweepPresences } from '@/lib/server/live/presence';
import { JobPerson, Presence } from '@/models';
import { signedIn, type Browser } from './browser';
import { change, makeJob, makePerson, makeTeam, place } from './factories';

interface Heard {
  name: string;
  // Each event has its own shape.
  // eslint-disable-next-line @typescript-eslint/no-explicit-any
  data: any;
}

/** A window's end of the stream: what it has heard so far, and whether it was ended from the other side. */
class Window {
  readonly heard: Heard[] = [];
  comments = 0;
  ended = false;
  private readonly reader: ReadableStreamDefaultReader<Uint8Array>;

  constructor(body: ReadableStream<Uint8Array>) {
    this.reader = body.getReader();
    void this.read();
  }

  private async read(): Promise<void> {
    let text = '';
    for (;;) {
      const { value, done } = await this.reader.read();
      if (done) break;
      text += new TextDecoder().decode(value);
      const blocks = text.split('\n\n');
      text = blocks.pop()!;
      for (const block of blocks) this.take(block);
    }
    this.ended = true;
  }

  private take(block: string): void {
    if (block.startsWith(':')) this.comments += 1;
    const [, name, data] = /^event: (\w+)\ndata: (.*)$/.exec(block) ?? [];
    if (name) this.heard.push({ name, data: JSON.parse(data!) });
  }

  last = (name: string) => this.heard.findLast((event) => event.name === name)?.data;
  close = () => this.reader.cancel();
}

const windows: Window[] = [];
async function listen(browser: Browser, drawingId: string): Promise<Window> {
  const response = await browser.open(events, { params: { drawingId } });
  expect(response.status).toBe(200);
  expect(response.headers.get('content-type')).toContain('text/event-stream');
  expect(response.headers.get('x-accel-buffering')).toBe('no');
  const window = new Window(response.body!);
  windows.push(window);
  await vi.waitFor(() => expect(window.last('people')).toBeDefined(), { timeout: 5000 });
  return window;
}

const names = (window: Window) => window.last('people').people.map(({ initials }: { initials: string }) => initials);

async function studio() {
  const team = await makeTeam();
  const anna = await makePerson(['electrician'], team, 'Anna Riedl');
  const kofi = await makePerson(['electrician'], team, 'Kofi Owusu');
  const pupil = await makePerson(['apprentice'], team, 'Noah Sedge');
  const { drawingId, id: jobId } = await makeJob(anna, { given: [pupil.id] });
  return {
    team,
    anna,
    pupil,
    drawingId,
    jobId,
    params: { drawingId },
    browsers: { anna: await signedIn(anna), kofi: await signedIn(kofi), pupil: await signedIn(pupil) },
  };
}

afterEach(async () => {
  vi.useRealTimers();
  await Promise.all(windows.splice(0).map((window) => window.close()));
});
afterAll(() => hub().close());

describe('two windows on one drawing', () => {
  it('hear of a save within a second, each of them, and only of this drawing', async () => {
    const { browsers, params, drawingId, anna } = await studio();
    const other = await makeJob(anna);
    const a = await listen(browsers.anna, drawingId);
    const b = await listen(browsers.kofi, drawingId);
    const elsewhere = await listen(browsers.kofi, other.drawingId);
    expect(b.last('rev')).toEqual({ rev: 0 });
    const began = performance.now();
    expect((await browsers.anna.post(save, params, change(0, place('p1')))).status).toBe(200);
    for (const window of [a, b]) await vi.waitFor(() => expect(window.last('rev')).toEqual({ rev: 1 }), { interval: 5 });
    expect(performance.now() - began).toBeLessThan(1000);
    expect(elsewhere.last('rev')).toEqual({ rev: 0 });
  });

  it('hear nothing of a save that was refused', async () => {
    const { browsers, params, drawingId } = await studio();
    const a = await listen(browsers.anna, drawingId);
    await browsers.anna.post(save, params, change(0, place('p1')));
    await vi.waitFor(() => expect(a.last('rev')).toEqual({ rev: 1 }));
    expect((await browsers.kofi.post(save, params, change(0, place('p2')))).status).toBe(409);
    await browsers.kofi.post(save, params, change(1, place('p3')));
    await vi.waitFor(() => expect(a.last('rev')).toEqual({ rev: 2 }));
    expect(a.heard.filter(({ name }) => name === 'rev').map(({ data }) => data.rev)).toEqual([0, 1, 2]);
  });

  it('see each other come and go, each person once', async () => {
    const { browsers, drawingId } = await studio();
    const a = await listen(browsers.anna, drawingId);
    expect(names(a)).toEqual(['A. R.']);
    const b = await listen(browsers.kofi, drawingId);
    const second = await listen(browsers.kofi, drawingId);
    await vi.waitFor(() => expect(names(a)).toEqual(['A. R.', 'K. O.']));
    await b.close();
    await vi.waitFor(async () => expect(await Presence.count({ where: { drawingId } })).toBe(2));
    expect(names(a)).toEqual(['A. R.', 'K. O.']);
    await second.close();
    await vi.waitFor(() => expect(names(a)).toEqual(['A. R.']));
  });
});

describe('the right to listen', () => {
  it('ends with the session, within one look, and says no more', async () => {
    const { browsers, params, drawingId, anna } = await studio();
    vi.useFakeTimers({ toFake: ['setInterval', 'clearInterval'] });
    const a = await listen(browsers.anna, drawingId);
    const b = await listen(browsers.kofi, drawingId);
    vi.advanceTimersByTime(CHECK_MS);
    await vi.waitFor(() => expect(a.comments).toBe(1));
    await endSessions({ teamId: anna.teamId, personId: anna.id }, 'admin');
    vi.advanceTimersByTime(CHECK_MS);
    await vi.waitFor(() => expect(a.ended).toBe(true));
    expect(b.ended).toBe(false);
    await browsers.kofi.post(save, params, change(0, place('p1')));
    await vi.waitFor(() => expect(b.last('rev')).toEqual({ rev: 1 }));
    expect(a.last('rev')).toEqual({ rev: 0 });
    expect((await browsers.anna.open(events, { params })).status).toBe(401);
  });

  it('ends when the job is no longer given, and an open stream does not keep an idle session alive', async () => {
    const { browsers, drawingId, jobId, team, pupil } = await studio();
    vi.useFakeTimers({ toFake: ['setInterval', 'clearInterval'] });
    const idle = await import('@/models').then(({ AuthSession }) => AuthSession);
    const window = await listen(browsers.pupil, drawingId);
    const longAgo = new Date(Date.now() - 3 * 3_600_000);
    await idle.update({ seenAt: longAgo }, { where: { teamId: team.id, personId: pupil.id } });
    vi.advanceTimersByTime(CHECK_MS);
    await vi.waitFor(() => expect(window.comments).toBe(1));
    const row = await idle.findOne({ where: { teamId: team.id, personId: pupil.id } });
    expect(row!.seenAt.getTime()).toBe(longAgo.getTime());
    await JobPerson.destroy({ where: { teamId: team.id, jobId, personId: pupil.id } });
    vi.advanceTimersByTime(CHECK_MS);
    await vi.waitFor(() => expect(window.ended).toBe(true));
  });

  it('is refused to a stranger before anything is opened', async () => {
    const { drawingId, params } = await studio();
    const stranger = await signedIn(await makePerson(['electrician', 'admin', 'trainer', 'apprentice']));
    expect((await stranger.open(events, { params })).status).toBe(404);
    expect(await Presence.count({ where: { drawingId } })).toBe(0);
  });

  it('has room for so many windows of a person, and again when one of them closes', async () => {
    const { browsers, params, drawingId } = await studio();
    const open = [];
    for (let n = 0; n < 12; n++) open.push(await listen(browsers.anna, drawingId));
    const refused = await browsers.anna.open(events, { params });
    expect([refused.status, refused.headers.get('retry-after')]).toEqual([429, '30']);
    await listen(browsers.kofi, drawingId);
    await open[0]!.close();
    await listen(browsers.anna, drawingId);
  });
});

describe('a window that is gone', () => {
  it('before its answer began holds nothing for longer than one look', async () => {
    const { browsers, params, drawingId } = await studio();
    vi.useFakeTimers({ toFake: ['setInterval', 'clearInterval'] });
    for (let n = 0; n < 12; n++) await browsers.anna.open(events, { params });
    const reading = await listen(browsers.kofi, drawingId);
    expect((await browsers.anna.open(events, { params })).status).toBe(429);
    vi.advanceTimersByTime(CHECK_MS);
    await vi.waitFor(async () => expect(await Presence.count({ where: { drawingId } })).toBe(1));
    expect(reading.ended).toBe(false);
    await listen(browsers.anna, drawingId);
  });

  it('is swept with the process that was killed', async () => {
    const { drawingId, team, anna } = await studio();
    const row = { teamId: team.id, drawingId, personId: anna.id };
    await Presence.create({ ...row, streamId: randomUUID(), seenAt: new Date(Date.now() - 60_000) });
    await Presence.create({ ...row, streamId: randomUUID() });
    await sweepPresences();
    expect(await Presence.count({ where: { drawingId } })).toBe(1);
  });
});

describe('a connection that is lost', () => {
  const killListeners = async () => {
    const owner = new pg.Client({ connectionString: inject('ownerUrl') });
    await owner.connect();
    try {
      const { rowCount } = await owner.query(
        `select pg_terminate_backend(pid) from pg_stat_activity where application_name = 'ohmstead-listen'`,
      );
      return rowCount;
    } finally {
      await owner.end();
    }
  };

  it('comes back, one for the process, and nothing that was saved meanwhile is missed', async () => {
    const { browsers, params, drawingId } = await studio();
    const a = await listen(browsers.anna, drawingId);
    const b = await listen(browsers.kofi, drawingId);
    for (let n = 0; n < 3; n++) {
      expect(await killListeners()).toBe(1);
      expect((await browsers.anna.post(save, params, change(n, place(`p${n}`)))).body.rev).toBe(n + 1);
      for (const window of [a, b])
        await vi.waitFor(() => expect(window.last('rev')).toEqual({ rev: n + 1 }), { timeout: 5000 });
    }
    expect([a.ended, b.ended]).toEqual([false, false]);
  });

  it('is let go with every stream when the server stops', async () => {
    const { browsers, params, drawingId } = await studio();
    const a = await listen(browsers.anna, drawingId);
    const began = performance.now();
    await hub().close();
    await vi.waitFor(() => expect(a.ended).toBe(true));
    expect(performance.now() - began).toBeLessThan(1000);
    expect(await killListeners()).toBe(0);
    expect((await browsers.anna.open(events, { params })).status).toBe(429);
  });
});
