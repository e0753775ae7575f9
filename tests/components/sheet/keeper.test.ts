import 'fake-indexeddb/auto';
import { deleteDB } from 'idb';
import { afterEach, beforeEach, describe, expect, it, vi } from 'vitest';
import type { Outbox } from '@/components/sheet/outbox';
import { saveWords } from '@/components/sheet/save-state';
import { ANNA, DRAWING, FakeServer, KOFI } from './fake-server';
import { home, lamp, openWindow, setPart, type TestWindow } from './window';

let server: FakeServer;
const windows: TestWindow[] = [];
const open = async (...args: Parameters<typeof openWindow>) => {
  const opened = await openWindow(...args);
  windows.push(opened);
  return opened;
};
const state = (w: TestWindow) => w.store.getState();
const partIds = (w: TestWindow) => state(w).document.parts.map((part) => part.id);
const settled = (w: TestWindow) => vi.waitFor(() => expect(state(w).saveState.kind).toBe('saved'), { timeout: 8000 });
const reaches = (w: TestWindow, kind: string) =>
  vi.waitFor(() => expect(state(w).saveState.kind).toBe(kind), { timeout: 8000 });

beforeEach(() => {
  server = new FakeServer(home());
});
afterEach(async () => {
  for (const w of windows.splice(0)) w.kill();
  await deleteDB('test');
});

describe('saving', () => {
  it('saves commands in the order of drawing and empties the outbox', async () => {
    const w = await open(server);
    state(w).run('Place E1', setPart(lamp('E1')));
    state(w).run('Place E2', setPart(lamp('E2')));
    expect(state(w).saveState).toEqual({ kind: 'saving' });
    await settled(w);
    expect(server.log.map((change) => change.label)).toEqual(['Place E1', 'Place E2']);
    expect(state(w).rev).toBe(2);
    expect(state(w).document).toEqual(server.document);
    await vi.waitFor(async () => expect(await w.outbox.unsent(DRAWING, ANNA.id)).toEqual([]));
    expect(saveWords(state(w).saveState)).toMatch(/^Saved \d\d:\d\d$/);
  });

  it('keeps a command before it sends it', async () => {
    const w = await open(server);
    const kept: string[] = [];
    const { save } = server.api;
    server.api.save = async (id, change) => {
      kept.push(...(await w.outbox.unsent(DRAWING, ANNA.id)).map((row) => row.saveId));
      expect(kept).toContain(change.saveId);
      return save(id, change);
    };
    state(w).run('Place E1', setPart(lamp('E1')));
    await settled(w);
    expect(kept).toHaveLength(1);
  });

  it('does not apply a change twice when its answer was lost', async () => {
    const w = await open(server);
    server.loseAnswers = 1;
    state(w).run('Place E1', setPart(lamp('E1')));
    await reaches(w, 'kept');
    server.write({ saveId: crypto.randomUUID(), label: 'Place M1', patch: setPart({ id: 'M1', kind: 'fan' }) });
    w.keeper.retry();
    await settled(w);
    await w.keeper.poll();
    expect(server.log.map((change) => change.label)).toEqual(['Place E1', 'Place M1']);
    expect(state(w).document).toEqual(server.document);
    expect(state(w).rev).toBe(2);
  });

  it('says what is kept while the server is away, and saves by itself when it is back', async () => {
    const w = await open(server);
    server.down = true;
    for (const id of ['E1', 'E2', 'E3']) state(w).run(`Place ${id}`, setPart(lamp(id)));
    await reaches(w, 'kept');
    expect(saveWords(state(w).saveState)).toBe('Not saved: kept on this device, 3 changes');
    server.down = false;
    await settled(w);
    expect(server.log).toHaveLength(3);
  });

  it('stops at a refusal, says why, and can set the work aside without losing it', async () => {
    const w = await open(server);
    server.answer = { kind: 'refused', message: 'This drawing is issued.' };
    state(w).run('Place E1', setPart(lamp('E1')));
    await reaches(w, 'kept');
    expect(state(w).saveState).toMatchObject({ why: 'refused', message: 'This drawing is issued.' });
    await w.keeper.setAside();
    expect(partIds(w)).toEqual([]);
    expect(state(w).aside.map((step) => step.label)).toEqual(['Place E1']);
    server.answer = null;
    state(w).bringBack(state(w).aside[0]!);
    await settled(w);
    expect(server.document.parts.map((part) => part.id)).toEqual(['E1']);
    expect(state(w).aside).toEqual([]);
  });
});

describe('closed and killed windows', () => {
  it('loses nothing in 100 kills while the server is away', async () => {
    server.down = true;
    for (let n = 0; n < 100; n++) {
      const w = await openWindow(server);
      state(w).run(`Place E${n}`, setPart(lamp(`E${n}`)));
      await vi.waitFor(() => expect(w.keeper.wouldLose).toBe(false));
      w.kill();
    }
    server.down = false;
    const last = await open(server);
    expect(partIds(last)).toHaveLength(100);
    await settled(last);
    expect(server.log.map((change) => change.label)).toEqual(Array.from({ length: 100 }, (_, n) => `Place E${n}`));
  });

  it('takes over what a dead window left, and leaves a living one its own', async () => {
    server.down = true;
    const first = await open(server, { windowId: 'w1' });
    state(first).run('Place E1', setPart(lamp('E1')));
    await reaches(first, 'kept');
    const beside = await open(server, { windowId: 'w2', alive: new Set(['w1', 'w2']) });
    expect(partIds(beside)).toEqual([]);
    first.kill();
    beside.kill();
    const later = await open(server, { windowId: 'w3', alive: new Set(['w3']) });
    expect(partIds(later)).toEqual(['E1']);
    server.down = false;
    later.keeper.retry();
    await settled(later);
    expect(server.log).toHaveLength(1);
  });

  it('keeps undo over a reload of the window', async () => {
    const w = await open(server);
    state(w).run('Place E1', setPart(lamp('E1')));
    await settled(w);
    await w.keeper.writeHistory();
    w.kill();
    const again = await open(server);
    expect(state(again).undoSteps.map((step) => step.label)).toEqual(['Place E1']);
    state(again).undo();
    await settled(again);
    expect(server.document).toEqual(home());
  });

  it('does not show one person what another left on the device, and forgets histories at sign-out', async () => {
    server.down = true;
    const w = await open(server);
    state(w).run('Place E1', setPart(lamp('E1')));
    await reaches(w, 'kept');
    await w.keeper.writeHistory();
    await w.outbox.forgetSent(ANNA.id);
    expect(await w.outbox.readHistory(DRAWING, ANNA.id, 'w1')).toBeUndefined();
    expect(await w.outbox.unsent(DRAWING, ANNA.id)).toHaveLength(1);
    w.kill();
    const other = await open(server, { personId: KOFI.id, windowId: 'w9' });
    expect(partIds(other)).toEqual([]);
  });
});

describe('two writers', () => {
  const theirs = (label: string, patch: ReturnType<typeof setPart>) =>
    server.write({ saveId: crypto.randomUUID(), label, patch });

  it('rebases over changes of other parts', async () => {
    const w = await open(server);
    theirs('Place M1', setPart({ id: 'M1', kind: 'fan', watts: 55 }));
    state(w).run('Place E1', setPart(lamp('E1')));
    await settled(w);
    expect(partIds(w)).toEqual(['E1', 'M1']);
    expect(state(w).document).toEqual(server.document);
    expect(state(w).news?.person.initials).toBe('K. O.');
  });

  it('shows what others saved when it asks', async () => {
    const w = await open(server);
    theirs('Place M1', setPart({ id: 'M1', kind: 'fan' }));
    await w.keeper.poll();
    expect(partIds(w)).toEqual(['M1']);
    expect(state(w).undoSteps).toEqual([]);
  });

  it.each([
    ['mine', 20, 0],
    ['theirs', 7, 1],
  ])('asks when both changed one part, and keeps %s', async (choice, watts, aside) => {
    server.write({ saveId: crypto.randomUUID(), label: 'Place E1', patch: setPart(lamp('E1')) });
    const w = await open(server);
    theirs('E1: 7 W', setPart(lamp('E1', 7)));
    state(w).run('E1: 20 W', setPart(lamp('E1', 20)));
    state(w).run('Place E2', setPart(lamp('E2')));
    await reaches(w, 'conflict');
    expect(state(w).conflict?.keys).toEqual(['parts:E1']);
    expect(state(w).conflict?.theirDocument.parts).toContainEqual(lamp('E1', 7));
    await w.keeper.decide(new Set(choice === 'theirs' ? ['parts:E1'] : []));
    await settled(w);
    expect(server.document.parts).toEqual([lamp('E1', watts), lamp('E2')]);
    expect(state(w).document).toEqual(server.document);
    expect(state(w).aside).toHaveLength(aside);
    if (aside) state(w).bringBack(state(w).aside[0]!);
    await settled(w);
    expect(server.document.parts[0]).toEqual(lamp('E1', 20));
  });

  it('asks when a part that I wire is removed, and brings it back with mine', async () => {
    server.document = { ...home(), parts: [lamp('E1'), { id: 'S1', kind: 'switch' }] };
    const w = await open(server);
    server.write({ saveId: crypto.randomUUID(), label: 'Delete S1', patch: { remove: { parts: ['S1'] } } });
    state(w).run('Wire E1', { set: { wires: [{ id: 'w1', from: ['S1', '2'], to: ['E1', 'L'], role: 'switched' }] } });
    await reaches(w, 'conflict');
    expect(state(w).conflict?.keys).toEqual(['parts:S1']);
    await w.keeper.decide(new Set());
    await settled(w);
    expect(server.document.parts.map((part) => part.id)).toEqual(['E1', 'S1']);
    expect(server.document.wires).toHaveLength(1);
  });

  it('leaves a conflict open over a reload', async () => {
    const w = await open(server);
    theirs('E1: 7 W', setPart(lamp('E1', 7)));
    state(w).run('E1: 20 W', setPart(lamp('E1', 20)));
    await reaches(w, 'conflict');
    w.kill();
    const again = await open(server);
    expect(state(again).document.parts).toEqual([lamp('E1', 20)]);
    await reaches(again, 'conflict');
    expect(server.document.parts).toEqual([lamp('E1', 7)]);
  });
});

describe('a browser that keeps nothing', () => {
  it('says so, and still saves over the network', async () => {
    const w = await open(server, { outbox: Promise.reject(new DOMException('no', 'InvalidStateError')) });
    expect(state(w).storageFailure).toMatch(/keeps nothing/);
    state(w).run('Place E1', setPart(lamp('E1')));
    expect(w.keeper.wouldLose).toBe(true);
    await settled(w);
    expect(server.log).toHaveLength(1);
    expect(w.keeper.wouldLose).toBe(false);
  });

  it('tells a full device from a change that is kept', async () => {
    const real = await open(server);
    const full: Outbox = { ...real.outbox, add: () => Promise.reject(new DOMException('full', 'QuotaExceededError')) };
    server.down = true;
    const w = await open(server, { outbox: Promise.resolve(full), windowId: 'w2' });
    state(w).run('Place E1', setPart(lamp('E1')));
    await reaches(w, 'unkept');
    expect(state(w).storageFailure).toMatch(/storage is full/);
    expect(saveWords(state(w).saveState)).toBe('Not saved and not kept: 1 change');
  });
});
