import { act, fireEvent, render, screen, waitFor, within } from '@testing-library/react';
import userEvent from '@testing-library/user-event';
import { beforeEach, describe, expect, it, vi } from 'vitest';
import { PhotographsSheet } from '@/components/photographs/photographs-sheet';
import { PlanSheet } from '@/components/plan/plan-sheet';
import { createDrawingStore, type DrawingStore } from '@/components/sheet/store';
import { addPlan, planSize } from '@/diagram/commands/floor-plan';
import { applyPatch } from '@/diagram/document/patch';
import { emptyDocument, type Installation } from '@/diagram/document/schema';
import type { DrawingView } from '@/lib/shared/drawings';
import type { UploadList, UploadView } from '@/lib/shared/uploads';

const push = vi.fn();
vi.mock('next/navigation', () => ({ useRouter: () => ({ push, replace: vi.fn() }) }));

let store: DrawingStore;
// The document comes from a store of the test's own: no outbox, no network.
vi.mock('@/components/sheet/use-drawing', async (original) => ({
  ...(await original<typeof import('@/components/sheet/use-drawing')>()),
  useDrawing: () => ({ store, keeper: null }),
}));

const picture = (id: string, over: Partial<UploadView> = {}): UploadView => ({
  ...{ id, subject: 'plan', place: null, caption: '', width: 1600, height: 1200, removed: false },
  ...{ by: { name: 'Tessa Brand', initials: 'T. B.' }, at: '2026-11-30T10:00:00Z' },
  ...over,
});

function home(): Installation {
  const supply = { system: 'TN-S', voltage: 230, frequency: 50 } as const;
  return {
    ...emptyDocument('Weir Cottage', 'IEC', supply),
    places: [{ id: 'study', name: 'Study', kind: 'room' }],
    parts: [
      { id: 'a', kind: 'lamp', ref: 'E1', place: 'study' },
      { id: 'b', kind: 'lamp', ref: 'E2', place: 'study' },
      { id: 'c', kind: 'switch', ref: 'S1' },
    ],
  };
}

function view(document: Installation, edit = true): DrawingView {
  return {
    ...{ id: 'drawing', jobId: 'job', rev: 0, state: 'open', rights: { edit, record: edit }, document },
    titleBlock: {
      ...{ number: 'OH-1', title: 'Weir Cottage', client: '', address: '', team: 'Tillmere', drawnBy: 'T. B.' },
      ...{ drawnOn: '2026-11-30', checkedBy: null, revision: '-', state: 'draft' },
    },
  };
}

const me = { id: 'me', initials: 'T. B.' };
const list = (uploads: UploadView[], mayEdit = true): UploadList => ({ uploads, mayEdit });
const planned = (document = home()) => {
  const plan = { id: 'ground', name: 'Ground floor', picture: 'p1', ...planSize(1600, 1200) };
  return applyPatch(document, addPlan(document, plan).patch);
};
const places = () => store.getState().document.sheet?.plan ?? {};
const tray = () => within(screen.getByRole('region', { name: 'Not placed yet' }));

function openPlan(document: Installation, uploads: UploadView[] = [], edit = true) {
  const drawing = view(document, edit);
  store = createDrawingStore(drawing, () => undefined);
  render(<PlanSheet view={drawing} me={me} list={list(uploads, edit)} storey={null} />);
}

beforeEach(() => {
  push.mockClear();
  // There is nothing to scroll where nothing is laid out.
  Element.prototype.scrollIntoView ??= () => undefined;
});

describe('the plan of a storey', () => {
  it('begins with one of the pictures, what was added as a plan first, in one step', async () => {
    openPlan(home(), [picture('p0', { subject: 'board', caption: 'the board' }), picture('p1', { caption: 'the sketch' })]);
    expect(screen.getAllByRole('button', { name: /^Draw on/ }).map(({ textContent }) => textContent)).toEqual([
      'Draw on the sketch',
      'Draw on the board',
    ]);
    await userEvent.click(screen.getByRole('button', { name: 'Draw on the sketch' }));
    expect(store.getState().document.plans).toMatchObject([{ name: 'Ground floor', picture: 'p1', width: 32_000 }]);
    expect(screen.getByRole('application', { name: 'Plan of the Ground floor' })).toBeInTheDocument();
    act(() => store.getState().undo());
    expect(screen.getByRole('heading', { name: 'No plan yet' })).toBeInTheDocument();
  });

  it('takes parts by keys: carried, moved, put down, the next of the room at once', async () => {
    openPlan(planned());
    const user = userEvent.setup();
    tray().getByRole('button', { name: 'E1' }).focus();
    await user.keyboard('{Enter}');
    expect(screen.getByRole('application')).toHaveFocus();
    await user.keyboard('{ArrowRight}{Enter}');
    expect(places()).toEqual({ a: expect.objectContaining({ on: 'ground' }) });
    expect(places().a!.x).toBeGreaterThan(16_000);
    await user.keyboard('{ArrowDown}{Enter}');
    expect(Object.keys(places())).toEqual(['a', 'b']);
    expect(store.getState().selection.parts).toEqual(['b']);
    expect(tray().getAllByRole('button').map(({ textContent }) => textContent)).toEqual(['S1']);
    expect(store.getState().undoSteps.map(({ label }) => label)).toEqual([
      'Put E1 on the Ground floor',
      'Put E2 on the Ground floor',
    ]);
  });

  it('makes a row of arrow presses one step, turns, takes off, and takes each back', async () => {
    const document = applyPatch(planned(), { set: { plan: { a: { x: 1000, y: 1000, on: 'ground' } } } });
    openPlan(document);
    const user = userEvent.setup();
    screen.getByRole('application').focus();
    await user.keyboard('{PageDown}{ArrowRight}{ArrowRight}{Shift>}{ArrowDown}{/Shift}');
    expect(places().a).toMatchObject({ x: 1000, y: 1000 });
    await waitFor(() => expect(places().a).toMatchObject({ x: 1500, y: 2000 }), { timeout: 3000 });
    expect(store.getState().undoSteps).toHaveLength(1);
    await user.keyboard('{ArrowLeft}r');
    expect(places().a).toMatchObject({ x: 1250, turn: 1 });
    expect(store.getState().undoSteps).toHaveLength(3);
    await user.keyboard('{Delete}');
    expect(places()).toEqual({});
    await user.keyboard('{Control>}zzzz{/Control}');
    expect(store.getState().document).toEqual(document);
  });

  it('is named anew, and taken away and brought back, each in one step', async () => {
    openPlan(planned());
    const user = userEvent.setup();
    await user.click(screen.getByRole('button', { name: 'rename' }));
    const name = screen.getByRole('textbox', { name: 'Name of the storey' });
    await user.clear(name);
    await user.type(name, 'Mezzanine{Enter}');
    expect(store.getState().document.plans).toMatchObject([{ name: 'Mezzanine' }]);
    await user.click(screen.getByRole('button', { name: 'take away' }));
    expect(store.getState().document.plans).toBeUndefined();
    act(() => store.getState().undo());
    expect(screen.getByRole('application', { name: 'Plan of the Mezzanine' })).toBeInTheDocument();
  });

  it('lets a reader look and change nothing', async () => {
    openPlan(applyPatch(planned(), { set: { plan: { a: { x: 1000, y: 1000, on: 'ground' } } } }), [], false);
    expect(tray().getByRole('button', { name: 'E2' })).toBeDisabled();
    expect(screen.queryByRole('button', { name: 'take away' })).toBeNull();
    screen.getByRole('application').focus();
    await userEvent.keyboard('{PageDown}{ArrowRight}r{Delete}');
    expect(places().a).toEqual({ x: 1000, y: 1000, on: 'ground' });
  });
});

describe('measuring on the plan', () => {
  const wired = (): Installation => ({
    ...planned(),
    wires: [{ id: 'w', from: ['a', 'L'], to: ['c', '2'], role: 'switched', cable: 'W1' }],
    cables: [{ id: 'W1', ref: 'W1', csa: 1.5, material: 'Cu', insulation: 'PVC', method: 'C', length: 12 }],
  });
  const scaleOf = () => store.getState().document.plans![0]!.scale;

  it('takes the scale, then a run, by keys alone: each one step of the history', async () => {
    openPlan(wired());
    const user = userEvent.setup();
    screen.getByRole('application').focus();
    // a run asks for the scale first
    await user.keyboard('m{Enter}{ArrowRight}{ArrowRight}{ArrowRight}{ArrowRight}{Enter}');
    await user.type(screen.getByRole('textbox', { name: /in metres/ }), '4,0{Enter}');
    expect(scaleOf()).toMatchObject({ metres: 4, a: { x: 16_000, y: 12_000 }, b: { x: 20_000, y: 12_000 } });
    expect(screen.getByText('1:100')).toBeInTheDocument();
    screen.getByRole('application').focus();
    await user.keyboard('m{Enter}{ArrowRight}{ArrowRight}{ArrowRight}{Enter}{ArrowDown}{ArrowDown}{Enter}{Backspace}{Enter}');
    await user.type(screen.getByRole('textbox', { name: /up and down/ }), '2.4');
    await user.selectOptions(screen.getByRole('combobox', { name: 'for' }), 'W1');
    await user.click(screen.getByRole('button', { name: 'Write it' }));
    expect(store.getState().document.cables[0]!.length).toBe(7.4);
    expect(store.getState().undoSteps.map(({ label }) => label)).toEqual([
      'Measure the Ground floor: 4 m',
      'Measure W1, E1 to S1 on the plan: 7.4 m',
    ]);
    act(() => store.getState().undo());
    act(() => store.getState().undo());
    expect([store.getState().document.cables[0]!.length, scaleOf()]).toEqual([12, undefined]);
  });

  it('is left by Esc without a trace, and is not there for readers', async () => {
    openPlan(wired());
    const user = userEvent.setup();
    screen.getByRole('application').focus();
    await user.keyboard('s{Enter}');
    expect(screen.getByRole('group', { name: 'Measuring' })).toBeInTheDocument();
    await user.keyboard('{Escape}');
    expect(screen.queryByRole('group', { name: 'Measuring' })).toBeNull();
    expect(store.getState().undoSteps).toEqual([]);
  });

  it('prints the storey that is open, for readers too', () => {
    openPlan(wired(), [], false);
    expect(screen.getByRole('link', { name: 'print A3' })).toHaveAttribute(
      'href',
      '/api/drawings/drawing/pdf?face=plan&storey=ground&paper=A3',
    );
    expect(screen.queryByRole('button', { name: /measure/ })).toBeNull();
  });
});

describe('a part that is locked on the plan', () => {
  it('is moved, turned and taken off by nothing until it is unlocked, and says so', async () => {
    openPlan(applyPatch(planned(), { set: { plan: { a: { x: 1000, y: 1000, on: 'ground' } } } }));
    const user = userEvent.setup();
    screen.getByRole('application').focus();
    await user.keyboard('{PageDown}{Shift>}L{/Shift}');
    expect(places().a).toEqual({ x: 1000, y: 1000, on: 'ground', pinned: true, locked: true });
    for (const keys of ['{ArrowRight}', 'r', '{Delete}']) {
      await user.keyboard(keys);
      expect(places().a).toMatchObject({ x: 1000, locked: true });
      expect(store.getState().notice).toBe('E1 is locked in place. Unlock with Shift L.');
    }
    await user.keyboard('{Shift>}L{/Shift}r');
    expect(places().a).toMatchObject({ turn: 1 });
    expect(store.getState().undoSteps.map(({ label }) => label)).toEqual(['Lock E1 in place', 'Unlock E1', 'Turn E1 on the plan']);
  });
});

describe('the photographs', () => {
  const answers = (...queue: [number, unknown][]) => {
    const fetch = vi.fn(async (_path: string, _init?: RequestInit) => {
      const [status, body] = queue.shift()!;
      return new Response(JSON.stringify(body), { status });
    });
    // Once open, the sheet asks for the list again: that is no change, and answered with what was shown.
    vi.stubGlobal('fetch', (path: string, init?: RequestInit) =>
      init?.method === 'GET' ? Promise.resolve(new Response(JSON.stringify(list(shown)))) : fetch(path, init),
    );
    return fetch;
  };
  let shown: UploadView[] = [];
  const openPhotographs = (uploads: UploadView[], document = home()) => {
    shown = uploads;
    const drawing = view(document);
    store = createDrawingStore(drawing, () => undefined);
    HTMLDialogElement.prototype.showModal ??= function (this: HTMLDialogElement) {
      this.open = true;
    };
    HTMLDialogElement.prototype.close ??= function (this: HTMLDialogElement) {
      this.open = false;
      fireEvent(this, new Event('close'));
    };
    render(<PhotographsSheet view={drawing} me={me} list={list(uploads)} today="2026-12-01" />);
  };
  const jpeg = (name: string) => new File(['x'], name, { type: 'image/jpeg' });

  it('go one after the other; a refusal says why, a lost network keeps the file for another try', async () => {
    const refusal = { error: 'invalid', message: 'This picture is damaged.' };
    const lost = { error: 'failed', message: 'The server could not do this.' };
    const fetch = answers([201, picture('n1', { subject: 'board' })], [400, refusal], [500, lost], [201, picture('n3')]);
    openPhotographs([]);
    await userEvent.upload(screen.getByLabelText('Choose photographs'), [jpeg('1.jpg'), jpeg('2.jpg'), jpeg('3.jpg')]);
    expect(await screen.findByText('This picture is damaged.')).toBeInTheDocument();
    expect(await screen.findByText('The server could not do this.')).toBeInTheDocument();
    expect(screen.getAllByRole('button', { name: 'Try again' })).toHaveLength(1);
    await userEvent.click(screen.getByRole('button', { name: 'Try again' }));
    await waitFor(() => expect(screen.getAllByRole('button', { name: /open it large/ })).toHaveLength(2));
    // The retry carries the id of the first try, so that a lost answer is not stored twice.
    const sent = fetch.mock.calls.map(([path]) => new URLSearchParams(path.split('?')[1]).get('id'));
    expect(sent[3]).toBe(sent[2]);
    expect(new Set(sent).size).toBe(3);
    expect(fetch.mock.calls[0]![0]).toContain('subject=board');
  });

  it('lead from a picture to a plan, and a picture behind one stays', async () => {
    openPhotographs([picture('p1', { caption: 'Sketch' })]);
    await userEvent.click(screen.getByRole('button', { name: 'Sketch: open it large' }));
    await userEvent.click(screen.getByRole('button', { name: 'Draw on it as a floor plan' }));
    expect(store.getState().document.plans).toMatchObject([{ picture: 'p1' }]);
    expect(push.mock.calls[0]![0]).toMatch(/^\/jobs\/job\/plan\?storey=/);
    expect(screen.getByRole('button', { name: 'Remove' })).toBeDisabled();
  });

  it('are removed and brought back', async () => {
    answers([200, picture('p1', { removed: true })], [200, picture('p1')]);
    openPhotographs([picture('p1', { caption: 'Sketch' })]);
    await userEvent.click(screen.getByRole('button', { name: 'Sketch: open it large' }));
    await userEvent.click(screen.getByRole('button', { name: 'Remove' }));
    await userEvent.click(await screen.findByRole('button', { name: 'Bring it back' }));
    expect(await screen.findByRole('button', { name: /open it large/ })).toBeInTheDocument();
  });
});
