import { render, screen } from '@testing-library/react';
import userEvent from '@testing-library/user-event';
import { beforeEach, expect, it, vi } from 'vitest';
import { EditPanel } from '@/components/sheet/edit-panel';
import { Hands } from '@/components/sheet/hands';
import { createDrawingStore } from '@/components/sheet/store';
import { createView } from '@/components/sheet/view';
import { smallHome } from '@/diagram/document/home';
import { counter } from '../../diagram/commands/counter';
import { FakeServer } from './fake-server';

const done = vi.fn();
const rating = () => screen.getByRole('textbox', { name: 'Rating of Q11' });

function open() {
  const store = createDrawingStore(new FakeServer(smallHome().document()).view(), () => undefined);
  const hands = new Hands({ store, view: createView('overview', null), newId: counter('n') });
  render(<EditPanel mode={{ kind: 'edit', part: 'Q11', at: { x: 0, y: 0 } }} hands={hands} onDone={done} />);
  const drawn = () => store.getState().document.parts.find(({ id }) => id === 'Q11');
  const type = async (text: string) => {
    const user = userEvent.setup();
    await user.clear(rating());
    await user.type(rating(), text);
    return user;
  };
  return { store, drawn, type };
}

beforeEach(() => done.mockClear());

it('takes what is written when the field is left by a tap elsewhere, as one step', async () => {
  const { store, drawn, type } = open();
  const user = await type('B32');
  await user.click(screen.getByRole('textbox', { name: 'Label' }));
  expect(drawn()).toMatchObject({ rating: 32, curve: 'B' });
  expect(store.getState().undoSteps).toHaveLength(1);
  await user.click(screen.getByRole('button', { name: 'Take it' }));
  expect(done).toHaveBeenCalledOnce();
  expect(store.getState().undoSteps).toHaveLength(1);
});

it('stays open with what it cannot read, and says why', async () => {
  const { store, drawn, type } = open();
  const before = drawn();
  const user = await type('B many');
  await user.click(screen.getByRole('button', { name: 'Take it' }));
  expect(done).not.toHaveBeenCalled();
  expect(rating()).toHaveValue('B many');
  expect(screen.getByRole('alert')).toHaveTextContent(store.getState().notice);
  expect(drawn()).toBe(before);
});

it('Esc leaves it as it was', async () => {
  const { drawn, type } = open();
  const before = drawn();
  const user = await type('B32');
  await user.keyboard('{Escape}');
  expect(done).toHaveBeenCalledOnce();
  await user.click(document.body);
  expect(drawn()).toBe(before);
});

it('Enter takes it once', async () => {
  const { store, drawn, type } = open();
  const user = await type('C20');
  await user.keyboard('{Enter}');
  await user.click(document.body);
  expect(drawn()).toMatchObject({ rating: 20, curve: 'C' });
  expect(store.getState().undoSteps).toHaveLength(1);
  expect(done).toHaveBeenCalledOnce();
});
