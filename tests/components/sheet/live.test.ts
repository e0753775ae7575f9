import { deleteDB } from 'idb';
import { afterEach, beforeEach, describe, expect, it, vi } from 'vitest';
import { followDrawing } from '@/components/sheet/live';
import { presenceWords } from '@/components/sheet/presence-view';
import { ANNA, FakeServer, KOFI } from './fake-server';
import { home, lamp, openWindow, setPart } from './window';

/** The browser's end of an event stream, worked by hand. */
class FakeSource extends EventTarget {
  static CLOSED = 2;
  static made: FakeSource[] = [];
  readyState = 0;
  onopen?: () => void;
  onerror?: () => void;
  constructor(readonly url: string) {
    super();
    FakeSource.made.push(this);
  }
  stand() {
    this.readyState = 1;
    this.onopen?.();
  }
  say(name: string, data: unknown) {
    this.dispatchEvent(new MessageEvent(name, { data: JSON.stringify(data) }));
  }
  fail(closed: boolean) {
    this.readyState = closed ? 2 : 0;
    this.onerror?.();
  }
  close() {
    this.readyState = 2;
  }
}

let visible = 'visible';
const turn = (state: 'visible' | 'hidden') => {
  visible = state;
  document.dispatchEvent(new Event('visibilitychange'));
};

beforeEach(() => {
  FakeSource.made = [];
  vi.stubGlobal('EventSource', FakeSource);
  vi.spyOn(document, 'visibilityState', 'get').mockImplementation(() => visible as DocumentVisibilityState);
  vi.useFakeTimers();
});
afterEach(() => {
  visible = 'visible';
  vi.useRealTimers();
  vi.restoreAllMocks();
  vi.unstubAllGlobals();
});

function follow() {
  const heard = { revs: [] as number[], people: [] as string[], stands: false };
  const live = followDrawing('d1', {
    rev: (rev) => heard.revs.push(rev),
    people: (people) => (heard.people = people.map(({ id }) => id)),
    standing: (stands) => (heard.stands = stands),
  });
  return { live, heard };
}

describe('following a drawing', () => {
  it('listens while a sheet is looked at, and not behind other windows or after the last sheet', () => {
    const { live, heard } = follow();
    expect(FakeSource.made).toHaveLength(0);
    const leave = live.attend();
    const [source] = FakeSource.made;
    expect(source!.url).toBe('/api/drawings/d1/events');
    source!.stand();
    source!.say('rev', { rev: 7 });
    source!.say('people', { people: [KOFI] });
    expect(heard).toEqual({ revs: [7], people: ['kofi'], stands: true });

    // turned to the next sheet of the job: the same stream
    leave();
    const leaveNext = live.attend();
    vi.advanceTimersByTime(60_000);
    expect([FakeSource.made.length, source!.readyState]).toEqual([1, 1]);

    turn('hidden');
    vi.advanceTimersByTime(9_000);
    expect(source!.readyState).toBe(1);
    vi.advanceTimersByTime(2_000);
    expect([source!.readyState, heard.stands, heard.people]).toEqual([2, false, []]);
    turn('visible');
    expect(FakeSource.made).toHaveLength(2);

    leaveNext();
    vi.advanceTimersByTime(11_000);
    expect(FakeSource.made[1]!.readyState).toBe(2);
    live.close();
  });

  it('leaves a lost network to the browser and tries a refusal again, later and later', () => {
    const { live, heard } = follow();
    live.attend();
    FakeSource.made[0]!.stand();
    FakeSource.made[0]!.fail(false);
    expect(heard.stands).toBe(false);
    vi.advanceTimersByTime(60_000);
    expect(FakeSource.made).toHaveLength(1);
    FakeSource.made[0]!.fail(true);
    const made: number[] = [];
    for (let n = 0; n < 8; n++) {
      vi.advanceTimersByTime(10_000);
      made.push(FakeSource.made.length);
      if (FakeSource.made.at(-1)!.readyState === 0) FakeSource.made.at(-1)!.fail(true);
    }
    expect(made[0]).toBe(2);
    expect(made.at(-1)).toBeLessThan(6);
    live.close();
  });

  it('ignores what is no event of ours', () => {
    const { live, heard } = follow();
    live.attend();
    FakeSource.made[0]!.say('rev', { rev: 'seven' });
    expect(heard.revs).toEqual([]);
    live.close();
  });
});

describe('a revision that is heard of', () => {
  it('is asked for once the save under way is answered, and its changes come in', async () => {
    vi.useRealTimers();
    const server = new FakeServer(home());
    const w = await openWindow(server, { database: 'live' });
    const asked = vi.spyOn(server.api, 'since');
    const { save } = server.api;
    server.api.save = async (id, change) => {
      const answer = await save(id, change);
      server.write({ saveId: crypto.randomUUID(), label: 'Place M1', patch: setPart({ id: 'M1', kind: 'fan' }) });
      w.keeper.hear(2);
      return answer;
    };
    w.store.getState().run('Place E1', setPart(lamp('E1')));
    await vi.waitFor(() => expect(w.store.getState().document.parts.map(({ id }) => id)).toEqual(['E1', 'M1']));
    w.keeper.hear(2);
    w.keeper.hear(1);
    await new Promise((resolve) => setTimeout(resolve, 50));
    expect(asked).toHaveBeenCalledTimes(1);
    w.kill();
    await deleteDB('live');
  });

  it('is not asked for without end when the server does not answer', async () => {
    vi.useRealTimers();
    const server = new FakeServer(home());
    const w = await openWindow(server, { database: 'live-2' });
    server.down = true;
    const asked = vi.spyOn(server.api, 'since');
    w.keeper.hear(9);
    await new Promise((resolve) => setTimeout(resolve, 100));
    expect(asked).toHaveBeenCalledTimes(1);
    w.kill();
    await deleteDB('live-2');
  });
});

describe('who is here', () => {
  it.each([
    [[], [KOFI], 'Kofi Owusu has opened this drawing.'],
    [[KOFI], [ANNA, KOFI], 'Anna Riedl has opened this drawing.'],
    [[ANNA, KOFI], [], 'Anna Riedl and Kofi Owusu have left it.'],
    [[ANNA], [ANNA], ''],
  ])('%# is said in words', (before, now, words) => {
    expect(presenceWords(before, now)).toBe(words);
  });
});
