import { readFileSync } from 'node:fs';
import { describe, expect, it } from 'vitest';
import { createDrawingStore, type DrawingStore } from '@/components/sheet/store';
import { valueAt } from '@/diagram/commands/merge';
import { applyPatch, diff, touched } from '@/diagram/document/patch';
import { readDocument, type Installation } from '@/diagram/document/schema';
import { counter } from '../../diagram/commands/counter';
import { chance, randomCommand } from '../../diagram/commands/random-commands';
import { FakeServer } from './fake-server';
import { home as emptyHome, lamp, setPart } from './window';

function flat(): Installation {
  const read = readDocument(JSON.parse(readFileSync('tests/fixtures/homes/clean-flat.json', 'utf8')));
  if (!read.ok) throw new Error('no document');
  return read.document;
}

const storeOf = (document: Installation): DrawingStore =>
  createDrawingStore(new FakeServer(document).view(), () => undefined);
const bytes = (store: DrawingStore): string => JSON.stringify(store.getState().document);

describe('undo without limit', () => {
  it('gives the starting bytes after 500 random commands and 500 undos, and the last after 500 redos', () => {
    const start = flat();
    const store = storeOf(start);
    const pick = chance(3);
    const newId = counter();
    let done = 0;
    for (let n = 0; done < 500 && n < 5000; n++) {
      const command = randomCommand(store.getState().document, pick, newId);
      if (command && store.getState().run(command.label, command.patch)) done++;
    }
    expect(done).toBe(500);
    const end = bytes(store);
    for (let n = 0; n < 500; n++) store.getState().undo();
    expect(bytes(store)).toBe(JSON.stringify(start));
    expect(store.getState().undoSteps).toEqual([]);
    for (let n = 0; n < 500; n++) store.getState().redo();
    expect(bytes(store)).toBe(end);
  }, 240_000);

  it.each([
    [2, 500],
    [3, 150],
  ])('leaves what a second writer drew between my commands, all of them real ones: seed %i, %i of mine', (seed, count) => {
    const start = flat();
    const store = storeOf(start);
    const pick = chance(seed);
    const newId = counter('m');
    const theirId = counter('t');
    /** what they left at each key that nobody has touched since */
    const theirs = new Map<string, unknown>();
    let mine = 0;
    for (let n = 0; mine < count && n < 10 * count; n++) {
      const { document, run } = store.getState();
      const foreign = pick(4) === 0;
      const command = randomCommand(document, pick, foreign ? theirId : newId);
      if (!command) continue;
      if (foreign) {
        // As a change of somebody else arrives: into the document, not into the history.
        const next = applyPatch(document, command.patch);
        const change = diff(document, next);
        for (const key of touched(change)) theirs.set(key, valueAt(next, key));
        store.setState({ document: next });
        store.getState().disown(change);
      } else if (run(command.label, command.patch)) {
        mine++;
        for (const key of touched(diff(document, store.getState().document))) theirs.delete(key);
      }
    }
    expect(mine).toBe(count);
    expect(theirs.size).toBeGreaterThan(20);
    while (store.getState().undoSteps.length > 0) store.getState().undo();
    const left = store.getState().document;
    for (const [key, value] of theirs) expect([key, valueAt(left, key)]).toEqual([key, value]);
    const parts = new Set(left.parts.map((part) => part.id));
    for (const wire of left.wires) expect([wire.from[0], wire.to[0]].filter((id) => !parts.has(id))).toEqual([]);
    expect(readDocument(JSON.parse(JSON.stringify(left))).ok).toBe(true);
  }, 240_000);

  it('leaves what a second writer did between my steps', () => {
    const store = storeOf(emptyHome());
    const pick = chance(5);
    const theirs = new Map<string, number>();
    for (let n = 0; n < 200; n++) {
      const id = `E${pick(30)}`;
      if (pick(3) === 0) {
        // As a change of somebody else arrives: into the document, not into the history.
        theirs.set(id, 100 + n);
        store.setState({ document: applyPatch(store.getState().document, setPart(lamp(id, 100 + n))) });
      } else {
        store.getState().run(`${id}`, setPart(lamp(id, 1 + n / 1000)));
        theirs.delete(id);
      }
    }
    for (let n = 0; n < 200; n++) store.getState().undo();
    const left = new Map(
      store.getState().document.parts.map((part) => [part.id, part.kind === 'lamp' ? part.watts : 0]),
    );
    for (const [id, watts] of theirs) expect(left.get(id)).toBe(watts);
    for (const [, watts] of left) expect(watts).toBeGreaterThanOrEqual(100);
  });
});

describe('the history', () => {
  it('names its steps, and a new step drops what was taken back', () => {
    const store = storeOf(emptyHome());
    const { run, undo } = store.getState();
    run('Place E1', setPart(lamp('E1')));
    run('Place E2', setPart(lamp('E2')));
    undo();
    expect(store.getState().undoSteps.map((step) => step.label)).toEqual(['Place E1']);
    expect(store.getState().redoSteps.map((step) => step.label)).toEqual(['Place E2']);
    expect(store.getState().notice).toBe('Taken back: Place E2');
    run('Place E3', setPart(lamp('E3')));
    expect(store.getState().redoSteps).toEqual([]);
  });

  it('takes no step for what changes nothing, and none from a reader', () => {
    const store = storeOf(emptyHome());
    expect(store.getState().run('Nothing', {})).toBe(false);
    store.getState().run('Place E1', setPart(lamp('E1')));
    expect(store.getState().run('The same', setPart(lamp('E1')))).toBe(false);
    store.setState({ rights: { edit: false, record: false } });
    expect(store.getState().run('Place E2', setPart(lamp('E2')))).toBe(false);
    expect(store.getState().undoSteps).toHaveLength(1);
  });

  it('passes over a step that somebody has written over, and says when none is left', () => {
    const store = storeOf(emptyHome());
    store.getState().run('Place E1', setPart(lamp('E1')));
    store.getState().run('E1: 5 W', setPart(lamp('E1', 5)));
    store.setState({ document: applyPatch(store.getState().document, setPart(lamp('E1', 70))) });
    store.getState().undo();
    expect(store.getState().document.parts).toEqual([lamp('E1', 70)]);
    expect(store.getState().notice).toBe('Nothing of yours is left to take back.');
  });

  it('lets go of what is deleted', () => {
    const store = storeOf(emptyHome());
    store.getState().run('Place E1', setPart(lamp('E1')));
    store.getState().select({ parts: ['E1'], terminal: ['E1', 'L'] });
    store.getState().undo();
    expect(store.getState().selection).toEqual({ parts: [], wires: [], terminal: null });
  });
});
