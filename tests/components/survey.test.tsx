import { act, fireEvent, render, screen, waitFor, within } from '@testing-library/react';
import userEvent from '@testing-library/user-event';
import { beforeEach, describe, expect, it, vi } from 'vitest';
import { useStore } from 'zustand';
import { SurveySheet } from '@/components/survey/survey-sheet';
import type { SurveyDocument } from '@/components/survey/use-survey-document';
import { createDrawingStore, type DrawingStore } from '@/components/sheet/store';
import { emptyDocument, type SurveyRoom } from '@/diagram/document/schema';
import { emptyRoom } from '@/diagram/survey/columns';
import type { DrawingView } from '@/lib/shared/drawings';

const push = vi.fn();
vi.mock('next/navigation', () => ({ useRouter: () => ({ push, replace: vi.fn() }) }));

let store: DrawingStore;
// The document comes from a store of the test's own: no outbox, no network.
vi.mock('@/components/survey/use-survey-document', () => ({
  useSurveyDocument: (): SurveyDocument => {
    const { document, rights, titleBlock, run, undo, redo } = useStore(store);
    return { drawing: { store, keeper: null as never }, document, rights, titleBlock, run, undo, redo };
  },
}));

const room = (id: string, order: number, values: Partial<SurveyRoom> = {}): SurveyRoom => ({ ...emptyRoom(id, order), name: id, ...values });

function view(rooms: SurveyRoom[], edit = true): DrawingView {
  const supply = { system: 'TN-S', voltage: 230, frequency: 50 } as const;
  return {
    id: 'drawing',
    jobId: 'job',
    rev: 0,
    state: 'open',
    rights: { edit, record: edit },
    document: { ...emptyDocument('Weir Cottage', 'IEC', supply), ...(rooms.length > 0 && { survey: rooms }) },
    titleBlock: {
      number: 'OH-1',
      title: 'Weir Cottage',
      client: '',
      address: '',
      team: 'Tillmere',
      drawnBy: 'T. B.',
      drawnOn: '2026-11-30',
      checkedBy: null,
      revision: '-',
      state: 'draft',
    },
  };
}

function open(rooms: SurveyRoom[], edit = true) {
  const drawing = view(rooms, edit);
  store = createDrawingStore(drawing, () => undefined);
  render(<SurveySheet view={drawing} me={{ id: 'me', initials: 'T. B.' }} hoursWanted={4} />);
}

const table = () => within(screen.getByRole('table', { name: 'Survey, room by room' }));
const cell = (name: string) => table().getByRole<HTMLInputElement>('textbox', { name });
const rows = () => store.getState().document.survey ?? [];

beforeEach(() => push.mockClear());

describe('survey by keyboard', () => {
  it('types a room into the blank row and goes on to the next cell with Tab', async () => {
    const user = userEvent.setup();
    open([]);
    await user.click(cell('New room, name'));
    await user.keyboard('Back bedroom{Tab}');
    expect(rows()).toMatchObject([{ name: 'Back bedroom', kind: 'sleeping' }]);
    expect(cell('Back bedroom, kind')).toHaveFocus();
    await user.keyboard('{Tab}{Tab}3x9{Tab}1 60{Tab}2{Tab}oven 3 kW{Tab}');
    expect(rows()).toMatchObject([{ lamps: 3, lampWatts: 9, fans: 1, fanWatts: 60, outlets: 2, heavy: [{ what: 'oven', watts: 3000 }] }]);
    expect(cell('Back bedroom, lamps, number and watts')).toHaveValue('3 × 9');
  });

  it('goes down a column with Enter and ends in the blank row', async () => {
    const user = userEvent.setup();
    open([room('Hall', 0), room('Study', 1)]);
    await user.click(cell('Hall, outlets'));
    await user.keyboard('1{Enter}2{Enter}');
    expect(rows().map(({ outlets }) => outlets)).toEqual([1, 2]);
    expect(cell('New room, outlets')).toHaveFocus();
  });

  it('puts a new room after the one in hand with Shift Enter', async () => {
    const user = userEvent.setup();
    open([room('Hall', 0), room('Study', 1)]);
    await user.click(cell('Hall, outlets'));
    await user.keyboard('{Shift>}{Enter}{/Shift}');
    await waitFor(() => expect(cell('New room, name')).toHaveFocus());
    await user.keyboard('Kitchen{Enter}');
    expect(rows().map(({ name }) => name)).toEqual(['Hall', 'Kitchen', 'Study']);
  });

  it('takes the cell above with Ctrl D, watts and all', async () => {
    const user = userEvent.setup();
    open([room('Hall', 0, { lamps: 2, lampWatts: 12 }), room('Study', 1)]);
    await user.click(cell('Study, lamps, number and watts'));
    await user.keyboard('{Control>}d{/Control}');
    expect(rows()[1]).toMatchObject({ lamps: 2, lampWatts: 12 });
  });

  it('takes typing back with Esc, and a change back with Ctrl Z', async () => {
    const user = userEvent.setup();
    open([room('Hall', 0)]);
    await user.click(cell('Hall, outlets'));
    await user.keyboard('7{Escape}');
    expect(cell('Hall, outlets')).toHaveValue('');
    await user.keyboard('3{Enter}');
    expect(rows()[0]!.outlets).toBe(3);
    await user.keyboard('{Control>}z{/Control}');
    expect(rows()[0]!.outlets).toBe(0);
  });
});

describe('survey errors', () => {
  it('keeps a text that cannot be read in its cell, says so in the margin and takes it back', async () => {
    const user = userEvent.setup();
    open([room('Hall', 0, { hours: 3 })]);
    await user.click(cell('Hall, hours wanted'));
    await user.keyboard('many{Enter}');
    expect(cell('Hall, hours wanted')).toHaveValue('many');
    expect(cell('Hall, hours wanted')).toBeInvalid();
    expect(rows()[0]!.hours).toBe(3);
    expect(screen.getByText(/Hours are 0 to 72/)).toBeInTheDocument();
    await user.click(screen.getByRole('button', { name: 'Take it back' }));
    expect(cell('Hall, hours wanted')).toHaveValue('3');
    expect(cell('Hall, hours wanted')).toBeValid();
  });

  it('shows "3 of 2" where more stays on than there is, offers the remedy, and F8 goes there', async () => {
    const user = userEvent.setup();
    open([room('Hall', 0, { lamps: 1 }), room('Kitchen', 1, { lamps: 2, keepLamps: 3 })]);
    expect(cell('Kitchen, lamps that stay on')).toHaveValue('3 of 2');
    await user.click(cell('Hall, name'));
    await user.keyboard('{F8}');
    expect(cell('Kitchen, lamps that stay on')).toHaveFocus();
    expect(cell('Kitchen, lamps that stay on')).toHaveValue('3');
    await user.click(screen.getByRole('button', { name: 'Make it 2' }));
    expect(rows()[1]!.keepLamps).toBe(2);
    expect(screen.queryByRole('button', { name: 'Make it 2' })).not.toBeInTheDocument();
  });

  it('leaves a wrong row out of the sums', () => {
    open([room('Hall', 0, { lamps: 2, lampWatts: 10 }), room('Kitchen', 1, { lamps: 2, lampWatts: 10, keepLamps: 3 })]);
    expect(screen.getByRole('region', { name: 'Running totals' })).toHaveTextContent('Connected20 W');
  });
});

describe('survey from a spreadsheet', () => {
  const paste = (text: string) =>
    act(() => {
      const clipboardData = { getData: () => text };
      fireEvent.paste(cell('New room, name'), { clipboardData });
    });

  it('takes pasted rows as one change that one undo takes back', () => {
    open([room('Hall', 0)]);
    paste('Name\tLamps\tFans\tOutlets\nStudy\t2x9\t1x55\t3\nBath\t2 x 7\t\t\nLoft\t1x9\t\t1');
    expect(rows().map(({ name, lamps }) => [name, lamps])).toEqual([['Hall', 0], ['Study', 2], ['Bath', 2], ['Loft', 1]]);
    expect(store.getState().undoSteps.map(({ label }) => label)).toEqual(['Paste 3 rooms']);
    act(() => store.getState().undo());
    expect(rows().map(({ name }) => name)).toEqual(['Hall']);
  });

  it('marks the pasted cell that cannot be read, with what stood there', () => {
    open([]);
    paste('Name\tOutlets\nStudy\tplenty');
    expect(cell('Study, outlets')).toHaveValue('plenty');
    expect(cell('Study, outlets')).toBeInvalid();
  });

  it('leaves a single word to the field', () => {
    open([room('Hall', 0)]);
    paste('Study');
    expect(rows()).toHaveLength(1);
  });
});

describe('drafting from the survey', () => {
  it('drafts with Ctrl Enter from a cell, what is typed in it included, and opens the overview', async () => {
    const user = userEvent.setup();
    open([room('Hall', 0, { lamps: 1 })]);
    await user.click(cell('Hall, outlets'));
    await user.keyboard('2{Control>}{Enter}{/Control}');
    const { document, undoSteps } = store.getState();
    expect(document.parts.filter((part) => part.kind === 'socket')).toHaveLength(2);
    expect(undoSteps.at(-1)!.label).toBe('Draft 1 room');
    expect(push).toHaveBeenCalledWith('/jobs/job/overview');
  });

  it('says in words what the draft would draw, and shows it on sheet 2 before it does', () => {
    open([room('Hall', 0, { lamps: 1 })]);
    expect(screen.getByRole('link', { name: 'Preview' })).toHaveAttribute('href', '/jobs/job/overview?preview=draft');
    expect(screen.getByText(/\d+ new parts, \d+ new wires/)).toBeInTheDocument();
    expect(store.getState().document.parts).toHaveLength(0);
  });

  it('asks for no draft when the drawing is in step', async () => {
    const user = userEvent.setup();
    open([room('Hall', 0, { lamps: 1 })]);
    await user.click(screen.getByRole('button', { name: 'Draft 1 room' }));
    expect(screen.getByRole('heading', { name: 'Sheet 2 is in step' })).toBeInTheDocument();
  });

  it('lets a reader read and change nothing', async () => {
    const user = userEvent.setup();
    open([room('Hall', 0, { lamps: 1 })], false);
    expect(table().queryByRole('textbox', { name: /New room/ })).not.toBeInTheDocument();
    await user.click(cell('Hall, outlets'));
    await user.keyboard('5{Enter}');
    expect(rows()[0]!.outlets).toBe(0);
    expect(screen.queryByRole('button', { name: /^Draft/ })).not.toBeInTheDocument();
  });
});
