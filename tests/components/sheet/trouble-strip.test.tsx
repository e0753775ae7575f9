import { render, screen } from '@testing-library/react';
import userEvent from '@testing-library/user-event';
import { describe, expect, it } from 'vitest';
import { createDrawingStore } from '@/components/sheet/store';
import { TroubleStrip } from '@/components/sheet/trouble-strip';
import { draftedHome } from '../../diagram/commands/drafted';
import { FakeServer } from './fake-server';

const open = (problems: { path: string; message: string }[]) => {
  const view = { ...new FakeServer(draftedHome(1)).view(), problems };
  const store = createDrawingStore(view, () => undefined);
  render(<TroubleStrip drawing={{ store, keeper: null as never }} />);
  return view;
};

describe('a drawing that could not be read whole', () => {
  it('says what is wrong by its place, and leads to what is stored', async () => {
    const view = open([
      { path: 'parts.3.kind', message: 'no such kind: E2 is left out of what is shown' },
      { path: 'schema', message: 'expected 1: taken as 1' },
    ]);
    await userEvent.click(screen.getByText(/could not be read whole: 2 places/));
    expect(screen.getAllByRole('listitem').map(({ textContent }) => textContent)).toEqual([
      'parts.3.kind: no such kind: E2 is left out of what is shown',
      'schema: expected 1: taken as 1',
    ]);
    expect(screen.getByRole('link', { name: 'Get the file as it is stored' })).toHaveAttribute('href', `/api/drawings/${view.id}/json`);
  });

  it('says nothing of a drawing that is whole', () => {
    open([]);
    expect(screen.queryByRole('alert')).toBeNull();
  });
});
