import { fireEvent, render, screen } from '@testing-library/react';
import userEvent from '@testing-library/user-event';
import { afterEach, beforeEach, describe, expect, it, vi } from 'vitest';
import type { ActionContext } from '@/components/sheet/actions';
import { askForCopy } from '@/components/sheet/copying';
import { Hands } from '@/components/sheet/hands';
import { notesOf } from '@/components/sheet/margin/notes';
import { FindList } from '@/components/sheet/sheet-lists';
import { createDrawingStore, NOTHING } from '@/components/sheet/store';
import { takeAlso, takeKind, takeRoom } from '@/components/sheet/taking';
import { useKeyboard } from '@/components/sheet/use-keyboard';
import { createView, ViewProvider, type View } from '@/components/sheet/view';
import { readClip } from '@/diagram/commands/copy';
import { editRating } from '@/diagram/commands/edit-in-place';
import { buildScene } from '@/diagram/layout/build-scene';
import { examine } from '@/diagram/rules/examine';
import { counter } from '../../diagram/commands/counter';
import { draftedHome } from '../../diagram/commands/drafted';
import { FakeServer } from './fake-server';

vi.mock('next/navigation', () => ({ useRouter: () => ({ push: vi.fn() }) }));

const home = draftedHome(2);
// jsdom lays nothing out: there is nothing to scroll to.
Element.prototype.scrollIntoView ??= () => undefined;

/** The text of a blob, which this jsdom does not tell by itself. */
const textOf = (blob: Blob): Promise<string> =>
  new Promise((resolve) => {
    const reader = new FileReader();
    reader.onload = () => resolve(String(reader.result));
    reader.readAsText(blob);
  });

function onSheet(face: 'overview' | 'connections' = 'overview', document = home) {
  const store = createDrawingStore(new FakeServer(document).view(), () => undefined);
  const view = createView(face, null);
  const hands = new Hands({ store, view, newId: counter('h') });
  hands.show(buildScene(document, face, face === 'connections' ? { place: 'room0' } : {}));
  return { store, view, hands };
}

const contextOf = (hands: Hands): ActionContext => ({
  hands,
  otherFace: vi.fn(),
  schedule: vi.fn(),
  nextNote: vi.fn(),
  page: vi.fn(),
  tidy: vi.fn(),
  outline: vi.fn(),
  toSheet: vi.fn(),
  keys: vi.fn(),
});

describe('who may only look', () => {
  it('moves, edits and deletes nothing, though everything is in hand', () => {
    const { store, view, hands } = onSheet();
    view.getState().set({ editing: false });
    hands.take(home.parts.find((part) => part.kind === 'lamp')!.id);
    for (const act of [
      () => hands.remove(),
      () => hands.moveBy(store.getState().selection.parts, 2500, 0),
      () => hands.renumber(),
      () => hands.clipboard.duplicate(),
      () => hands.do(editRating(home, home.parts.find((part) => part.kind === 'lamp')!.id, '5 W')),
    ]) {
      act();
      expect(store.getState().document).toBe(home);
      expect(store.getState().notice).toBe('You may read this drawing.');
    }
    for (const open of [() => hands.extend(), () => hands.wire(), () => hands.startMove(), () => hands.edit(), () => askForCopy(hands)]) {
      open();
      expect(view.getState().mode.kind).toBe('rest');
    }
  });
});

describe('taking several in hand', () => {
  const lamps = home.parts.filter((part) => part.kind === 'lamp').map((part) => part.id);

  it('takes the room, or every part of a kind', () => {
    const { store, hands } = onSheet();
    takeKind(hands);
    expect(store.getState().notice).toBe('Take a part in hand first.');
    hands.take(lamps[0]!);
    takeKind(hands);
    expect(store.getState().selection.parts).toEqual(lamps);
    expect(store.getState().notice).toBe(`${lamps.length} in hand: every lamp.`);
    hands.take(lamps[0]!);
    takeRoom(hands);
    const { parts } = store.getState().selection;
    expect(parts).toEqual(home.parts.filter((part) => part.place === 'room0').map((part) => part.id));
  });

  it('goes on by the arrows from the part taken last', () => {
    const { store, hands } = onSheet();
    hands.take(lamps[0]!);
    takeAlso(hands, 'up');
    const two = store.getState().selection.parts;
    expect(two).toHaveLength(2);
    takeAlso(hands, 'up');
    expect(store.getState().selection.parts.slice(0, 2)).toEqual(two);
    expect(store.getState().selection.parts.length).toBe(3);
  });
});

describe('the system clipboard', () => {
  const written: Record<string, Blob>[] = [];
  class Item {
    static supports = (type: string) => type === 'image/svg+xml';
    constructor(readonly kinds: Record<string, Blob>) {
      written.push(kinds);
    }
  }
  const clipboard = { write: vi.fn(async () => undefined), readText: vi.fn(async () => '') };
  const mine = home.parts.filter((part) => part.place === 'room0' && part.kind !== 'joint').map((part) => part.id);

  beforeEach(() => {
    written.length = 0;
    vi.stubGlobal('ClipboardItem', Item);
    vi.stubGlobal('navigator', { clipboard });
  });
  afterEach(() => vi.unstubAllGlobals());

  it('carries a piece as JSON for another window and as a picture for another program', async () => {
    const { store, hands } = onSheet('connections');
    store.getState().select({ parts: mine, wires: [], terminal: null });
    await hands.clipboard.copy();
    const json = await textOf(written[0]!['text/plain']!);
    const svg = await textOf(written[0]!['image/svg+xml']!);
    expect(readClip(json)!.parts.map((part) => part.id).sort()).toEqual([...mine].sort());
    expect(svg).toMatch(/^<\?xml[\s\S]*<svg [^>]*width="[\d.]+mm"[\s\S]*<path /);
    expect(svg).not.toContain('foreignObject');

    const other = onSheet('overview');
    await other.hands.clipboard.paste(json);
    expect(other.store.getState().document.parts).toHaveLength(home.parts.length + mine.length);
    expect(other.store.getState().undoSteps).toHaveLength(1);
  });

  it('pastes in the same window where the browser keeps its clipboard to itself', async () => {
    const { store, hands } = onSheet();
    clipboard.write.mockRejectedValueOnce(new Error('denied'));
    store.getState().select({ parts: mine.slice(0, 2), wires: [], terminal: null });
    await hands.clipboard.copy();
    expect(store.getState().notice).toContain('for this window only');
    await hands.clipboard.paste();
    expect(store.getState().document.parts).toHaveLength(home.parts.length + 2);
  });
});

describe('keys on the sheet', () => {
  function Sheet({ context }: { context: ActionContext }) {
    const onKeyDown = useKeyboard(context);
    return (
      <div role="application" aria-label="sheet" tabIndex={0} onKeyDown={onKeyDown}>
        <input aria-label="field" />
        <div role="textbox" aria-label="text" contentEditable="true" suppressContentEditableWarning />
      </div>
    );
  }
  const lamp = home.parts.find((part) => part.kind === 'lamp')!.id;
  const open = () => {
    const sheet = onSheet();
    sheet.hands.take(lamp);
    render(<Sheet context={contextOf(sheet.hands)} />);
    return sheet;
  };

  it('delete what is in hand from the sheet, never from a field, and not while a letter is composed', () => {
    const { store } = open();
    for (const name of ['field', 'text']) {
      const field = screen.getByRole('textbox', { name });
      field.setAttribute('contenteditable', 'true');
      for (const key of ['Delete', 'Backspace', 'e', 'z']) fireEvent.keyDown(field, { key, code: key });
      expect(store.getState().document).toBe(home);
    }
    const sheet = screen.getByRole('application');
    fireEvent.keyDown(sheet, { key: 'Delete', code: 'Delete', isComposing: true });
    fireEvent.keyDown(sheet, { key: 'Delete', code: 'Delete', altKey: true });
    expect(store.getState().document).toBe(home);
    fireEvent.keyDown(sheet, { key: 'Delete', code: 'Delete' });
    expect(store.getState().document.parts.some((part) => part.id === lamp)).toBe(false);
    expect(store.getState().undoSteps.map((step) => step.label)).toEqual([expect.stringMatching(/^Delete E\d+$/)]);
  });

  it('leave single letters to the person who has switched them off, and keep the named keys', () => {
    document.cookie = 'ohmstead-keys=off';
    const { view, store } = open();
    const sheet = screen.getByRole('application');
    fireEvent.keyDown(sheet, { key: 'e', code: 'KeyE' });
    const quiet = view.getState().mode.kind;
    fireEvent.keyDown(sheet, { key: 'Delete', code: 'Delete' });
    expect([quiet, store.getState().document === home]).toEqual(['rest', false]);
  });
});

describe('finding', () => {
  const lamp = home.parts.find((part) => part.kind === 'lamp')!;
  const broken = {
    ...home,
    wires: home.wires.filter(({ role, from, to }) => role !== 'earth' || ![from[0], to[0]].includes(lamp.id)),
  };
  function find(view: View, hands: Hands, onNote = vi.fn()) {
    const scene = hands.scene();
    const severities = new Set(['danger', 'defect', 'advice'] as const);
    const notes = notesOf(examine(hands.doc).findings, hands.doc, scene, { condition: 'all', severities, room: null });
    render(
      <ViewProvider value={view}>
        <FindList context={contextOf(hands)} notes={notes} onLeave={vi.fn()} onNote={onNote} />
      </ViewProvider>,
    );
    return { notes, onNote };
  }
  const options = () => screen.getAllByRole('option').map((option) => option.textContent ?? '');

  it.each([
    ['a number', lamp.ref!, new RegExp(`^${lamp.ref}, lamp`)],
    ['a kind', 'inverter', /^G\d, inverter/],
    ['a name', 'main switch', /^Q0, Main switch, isolator/],
    ['a room and a kind', 'room 2 outlet', /^X\d+, outletRoom 2$/],
  ])('goes by %s', async (_, typed, first: RegExp) => {
    const { view, hands } = onSheet();
    find(view, hands);
    await userEvent.keyboard(typed);
    expect(options().filter((option) => first.test(option)).length).toBeGreaterThan(0);
    expect(options().length).toBeLessThan(home.parts.length / 4);
  });

  it('goes by a finding, and takes its note', async () => {
    const { view, hands } = onSheet('overview', broken);
    const { notes, onNote } = find(view, hands);
    const note = notes.find((each) => each.parts.includes(lamp.id))!;
    await userEvent.keyboard(`${note.finding.rule.replaceAll('-', ' ')} ${lamp.ref}`);
    await userEvent.keyboard('{Enter}');
    expect(onNote).toHaveBeenCalledWith(note);
  });

  it('finds what another page draws, and turns to it', async () => {
    const { view, hands, store } = onSheet('connections');
    const far = home.parts.find((part) => part.kind === 'lamp' && part.place === 'room1')!;
    find(view, hands);
    await userEvent.keyboard(far.ref!);
    await userEvent.keyboard('{Enter}');
    expect(store.getState().selection.parts).toEqual([far.id]);
    expect(view.getState().place).toBe('room1');
    expect(store.getState().selection).not.toEqual(NOTHING);
  });
});
