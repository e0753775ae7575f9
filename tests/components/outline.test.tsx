import { act, render, screen, within } from '@testing-library/react';
import userEvent from '@testing-library/user-event';
import { beforeEach, describe, expect, it, vi } from 'vitest';
import { FindingsVoice } from '@/components/outline/findings-voice';
import { OutlinePane } from '@/components/outline/outline-pane';
import type { ActionContext } from '@/components/sheet/actions';
import { Hands } from '@/components/sheet/hands';
import { createDrawingStore } from '@/components/sheet/store';
import { createView, ViewProvider } from '@/components/sheet/view';
import { buildScene } from '@/diagram/layout/build-scene';
import { examine } from '@/diagram/rules/examine';
import { counter } from '../diagram/commands/counter';
import { draftedHome } from '../diagram/commands/drafted';
import { FakeServer } from './sheet/fake-server';

vi.mock('next/navigation', () => ({ useRouter: () => ({ push: vi.fn() }) }));
// Remedies are worked out in a worker, which jsdom has not: the browser walk proves them.
vi.mock('@/components/sheet/margin/use-proof', () => ({ useProof: () => null }));
Element.prototype.scrollIntoView ??= () => undefined;

const home = draftedHome(2);
const lamp = home.parts.find((part) => part.kind === 'lamp' && part.place === 'room0')!;

function open(document = home) {
  const store = createDrawingStore(new FakeServer(document).view(), () => undefined);
  const view = createView('overview', null);
  const hands = new Hands({ store, view, newId: counter('o') });
  hands.show(buildScene(document, 'overview'));
  const does = { otherFace: vi.fn(), schedule: vi.fn(), nextNote: vi.fn(), page: vi.fn(), tidy: vi.fn(), keys: vi.fn() };
  const context: ActionContext = { ...does, hands, outline: vi.fn(), toSheet: vi.fn() };
  const onClose = vi.fn();
  render(
    <ViewProvider value={view}>
      <OutlinePane context={context} findings={examine(document).findings} onReady={vi.fn()} onClose={onClose} />
    </ViewProvider>,
  );
  return { store, view, hands, context, onClose };
}

const tree = () => screen.getByRole('tree', { name: 'Outline of Drafted home' });
const held = () => [...tree().querySelectorAll<HTMLElement>('[role=treeitem][tabindex="0"]')];
const words = () => document.activeElement?.textContent ?? '';
const keys = (text: string) => userEvent.keyboard(text);

describe('the outline beside the canvas', () => {
  it('is one stop of the keyboard, with level, place and number of each line', async () => {
    open();
    expect(document.activeElement).toBe(held()[0]);
    expect(held()).toHaveLength(1);
    await keys('{ArrowRight}');
    expect(held()).toHaveLength(1);
    expect(document.activeElement).toHaveAttribute('aria-level', '2');
    expect(document.activeElement).toHaveAttribute('aria-posinset', '1');
    const boards = within(tree()).getAllByRole('treeitem').filter((item) => item.getAttribute('aria-level') === '2');
    for (const board of boards) expect(board).toHaveAttribute('aria-setsize', String(boards.length));
    expect(document.activeElement).toHaveAttribute('aria-expanded', 'false');
    await keys('{ArrowRight}');
    expect(document.activeElement).toHaveAttribute('aria-expanded', 'true');
    await keys('{ArrowLeft}{Home}');
    expect(words()).toMatch(/^Drafted home/);
  });

  it('has in hand what the canvas has, and the canvas what it has', async () => {
    const { store, hands } = open();
    act(() => hands.take(lamp.id));
    expect(held()[0]!.textContent).toMatch(new RegExp(`^${lamp.ref}, lamp`));
    expect(held()[0]).toHaveAttribute('aria-selected', 'true');
    await keys('{ArrowRight}{ArrowDown}');
    expect(words()).toMatch(/^Terminal L/);
    expect(store.getState().selection.terminal).toEqual([lamp.id, 'L']);
    await keys('{ArrowRight}{ArrowDown}');
    expect(words()).toMatch(/^Wire to/);
    expect(store.getState().selection.wires).toHaveLength(1);
  });

  it('takes several lines in hand, by Shift and arrows or by the space bar', async () => {
    const { store, hands } = open();
    act(() => hands.take(lamp.id));
    await keys('{Shift>}{ArrowDown}{/Shift}');
    expect(store.getState().selection.parts).toHaveLength(2);
    await keys(' ');
    expect(store.getState().selection.parts).toEqual([lamp.id]);
  });

  it('deletes, takes back and goes on from the line above what has gone', async () => {
    const { store, hands } = open();
    act(() => hands.take(lamp.id));
    await keys('{ArrowRight}{ArrowDown}{ArrowRight}{ArrowDown}{Delete}');
    expect(store.getState().document.wires.length).toBe(home.wires.length - 1);
    expect(words()).toMatch(/^Terminal L, line: free/);
    expect(store.getState().selection.terminal).toEqual([lamp.id, 'L']);
    await keys('{Control>}z{/Control}');
    expect(JSON.stringify(store.getState().document)).toBe(JSON.stringify(home));
  });

  it('says what can be done with a line, and wires it by name', async () => {
    const { store, hands } = open();
    act(() => hands.take(lamp.id));
    await keys('{ArrowRight}{ArrowDown}{ArrowRight}{ArrowDown}{Delete}{Enter}');
    const list = screen.getByRole('listbox', { name: /^What can be done: Terminal L/ });
    expect(within(list).getAllByRole('option').map((option) => option.textContent)).toEqual([
      expect.stringMatching(/^Extend/),
      expect.stringMatching(/^Draw a wire/),
      expect.stringMatching(/^Edit the cable/),
      'Show it on the sheet',
      expect.stringMatching(/^List of all commands/),
    ]);
    await keys('wire{Enter}');
    expect(screen.getByRole('combobox', { name: /^Wire from terminal L of/ })).toHaveFocus();
    await keys('terminal 2 s{Enter}');
    expect(store.getState().undoSteps.at(-1)!.label).toMatch(/^Wire /);
    expect(store.getState().document.wires).toHaveLength(home.wires.length);
  });

  it.each([
    ['room', /^Room 1: /, ['Copy the room', 'Take all of it in hand', 'Show it']],
    ['board', /^Board in/, ['Take all of it in hand', 'Show it']],
    ['way', /^Way 1/, ['Extend', 'Edit the rating', 'Edit the cable', 'Draw a wire', 'Copy what', 'Cut', 'Duplicate', 'Delete', 'Show it']],
    ['part', new RegExp(`^${lamp.ref}, lamp`), ['Extend', 'Edit the rating', 'Edit the cable', 'Draw a wire', 'Move a load', 'Copy what', 'Cut', 'Duplicate', 'Delete', 'Show it']],
  ] as const)('offers for a %s what fits it', async (_, line, expected) => {
    const { view } = open();
    act(() => view.getState().set({ outline: { ...view.getState().outline, open: everything() } }));
    const item = [...tree().querySelectorAll('[role=treeitem]')].find((each) => line.test(each.textContent ?? ''))!;
    await userEvent.click(item);
    await keys('{Enter}');
    const found = screen.getAllByRole('option').map((option) => option.textContent ?? '');
    expect(found.slice(0, -1).map((text, i) => text.startsWith(expected[i] ?? '?'))).toEqual(expected.map(() => true));
  });

  it('lets a reader walk and look, and change nothing', async () => {
    const { store, hands } = open();
    store.setState({ rights: { edit: false, record: false } });
    act(() => hands.take(lamp.id));
    await keys('{Enter}');
    expect(screen.getAllByRole('option').map((option) => option.textContent)).toEqual([
      expect.stringMatching(/^Copy what is in hand/),
      'Show it on the sheet',
      expect.stringMatching(/^List of all commands/),
    ]);
    await keys('{Escape}');
    await new Promise((resolve) => requestAnimationFrame(resolve));
    await keys('{Delete}');
    expect(store.getState().document).toBe(home);
  });
});

/** Keys of every item of the home's outline that can be unfolded down to parts. */
function everything(): Set<string> {
  const keysOf = new Set(['sheet']);
  for (const part of home.parts) keysOf.add(`part ${part.id}`).add(`board ${part.place ?? ''} ${part.board ?? ''}`);
  for (const part of home.parts) for (const place of home.places) keysOf.add(`room way ${part.id} ${place.id}`);
  return keysOf;
}

describe('findings are announced', () => {
  beforeEach(() => vi.useFakeTimers());

  it('politely, once the hands rest, and not again while nothing changes', () => {
    const earth = home.wires.find((wire) => wire.role === 'earth' && wire.to[0] === lamp.id)!;
    const broken = examine({ ...home, wires: home.wires.filter((wire) => wire !== earth) });
    const clean = examine(home);
    const { rerender } = render(<FindingsVoice examination={clean} />);
    const voice = screen.getByRole('log', { name: 'Findings' });
    expect(voice).toHaveAttribute('aria-live', 'polite');
    expect(voice).toBeEmptyDOMElement();
    act(() => void vi.advanceTimersByTime(1300));
    expect(voice.textContent).toMatch(/in all\.$|^No finding\.$/);
    rerender(<FindingsVoice examination={broken} />);
    act(() => void vi.advanceTimersByTime(600));
    rerender(<FindingsVoice examination={clean} />);
    act(() => void vi.advanceTimersByTime(600));
    rerender(<FindingsVoice examination={broken} />);
    expect(voice.textContent).not.toContain('New');
    act(() => void vi.advanceTimersByTime(1300));
    expect(voice.textContent).toMatch(/^New danger: .*earth/);
    vi.useRealTimers();
  });
});
