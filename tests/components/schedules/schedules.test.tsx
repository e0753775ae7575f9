import { act, fireEvent, render, screen, waitFor, within } from '@testing-library/react';
import userEvent from '@testing-library/user-event';
import { beforeEach, describe, expect, it, vi } from 'vitest';
import { SchedulesSheet } from '@/components/schedules/schedules-sheet';
import { createDrawingStore, type DrawingStore } from '@/components/sheet/store';
import { emptyDocument, type Installation } from '@/diagram/document/schema';
import type { ScheduleId } from '@/diagram/schedules/types';
import { workOut } from '@/diagram/schedules/work-out';
import { triedRemedies } from '@/diagram/schedules/outcomes';
import { quarryHouse } from '@/lib/server/demo/house';
import type { DrawingView } from '@/lib/shared/drawings';

const push = vi.fn();
vi.mock('next/navigation', () => ({ useRouter: () => ({ push, replace: vi.fn() }) }));
// Pictures need a real browser; their words and figures do not.
vi.mock('next/dynamic', () => ({ default: () => () => null }));

let store: DrawingStore;
let failure: string | null = null;
const again = vi.fn();
vi.mock('@/components/sheet/use-drawing', async (original) => ({
  ...(await original<object>()),
  useDrawing: () => ({ store, keeper: null }),
}));
// The page's worker, without the worker: the same functions, at once.
vi.mock('@/components/schedules/use-worked', async () => {
  const { useMemo } = await import('react');
  return {
    useWorked: (document: Installation) => {
      const worked = useMemo(() => workOut(document), [document]);
      return { worked: failure ? null : worked, stale: false, failure, again };
    },
    useRemedies: (document: Installation, finding: Parameters<typeof triedRemedies>[1] | null, way: string | null) =>
      useMemo(() => (finding ? triedRemedies(document, finding, way) : null), [document, finding, way]),
  };
});

const house = quarryHouse();

function open({ document = house, edit = true, schedule = 'ways' as ScheduleId, way = null as string | null } = {}) {
  const view: DrawingView = {
    id: '00000000-0000-4000-8000-000000000000',
    jobId: 'job',
    rev: 0,
    state: 'open',
    rights: { edit, record: edit },
    document,
    titleBlock: {
      number: 'OH-1',
      title: 'Quarry Steps',
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
  store = createDrawingStore(view, () => undefined);
  render(<SchedulesSheet view={view} me={{ id: 'me', initials: 'T. B.' }} schedule={schedule} way={way} />);
}

/** A cell by the place it stands at: names are looked up by one test, as that is slow in a table of this size. */
function cell(row: string, column: string, table = 'ways'): HTMLInputElement {
  const found = document.querySelector<HTMLInputElement>(`[data-cell="${table}/${row}:${column}"]`);
  if (!found) throw new Error(`There is no cell ${column} of ${row}.`);
  return found;
}
const head = (row: string, table?: string): HTMLElement => cell(row, '#', table);
const margin = () => within(document.querySelector('aside')!);
/** The box that asks what it would be worth to leave a load off. */
const load = (ref: string) =>
  [...document.querySelectorAll<HTMLElement>('fieldset label')]
    .find((label) => label.textContent?.startsWith(`${ref} `))
    ?.querySelector('input') ?? null;
const OVEN = 'kitchen.way-heavy1';
const cable = (id: string) => store.getState().document.cables.find((each) => each.id === id)!;

beforeEach(() => {
  push.mockClear();
  again.mockClear();
  failure = null;
});

describe('the schedule of ways', () => {
  it('writes a size into the drawing, says what it does, and one undo takes it back', async () => {
    const user = userEvent.setup();
    open();
    await user.click(cell(OVEN, 'csa'));
    await user.keyboard('1.5{Enter}');
    expect([cable('kitchen.heavy1.run').csa, cable('kitchen.heavy1.tail').csa]).toEqual([1.5, 1.5]);
    expect(store.getState().undoSteps.map(({ label }) => label)).toEqual(['Way 5: 2.5 to 1.5 mm2']);
    // Enter has gone on to the next way.
    expect(document.activeElement).toBe(cell('bath.way-lamps1', 'csa'));
    await user.click(cell(OVEN, 'csa'));
    expect(margin().getByRole('heading', { name: 'Q8 does not protect its cable' })).toBeInTheDocument();
    expect(margin().getByText('since Way 5: 2.5 to 1.5 mm2')).toBeInTheDocument();
    expect(screen.getByText('12.3 < In')).toBeInTheDocument();
    expect(screen.getByText(/1 not in order/)).toBeInTheDocument();

    // What each remedy gives stands beside it; taking it is one more step.
    expect(margin().getByRole('row', { name: /^as drawn 16 12\.3/ })).toBeInTheDocument();
    await user.click(margin().getByRole('button', { name: 'Pull 2.5 mm2' }));
    expect(cable('kitchen.heavy1.run').csa).toBe(2.5);
    expect(margin().queryByRole('heading', { name: 'Q8 does not protect its cable' })).toBeNull();

    await user.keyboard('{Control>}z{/Control}');
    await user.keyboard('{Control>}z{/Control}');
    expect(JSON.stringify(store.getState().document)).toBe(JSON.stringify(house));
  });

  it('keeps a text that cannot be read in its cell, in words that name the field, and Esc takes it back', async () => {
    const user = userEvent.setup();
    open();
    await user.click(cell(OVEN, 'length'));
    await user.keyboard('900{Tab}');
    const run = cell(OVEN, 'length');
    expect(run).toHaveValue('900');
    expect(run).toBeInvalid();
    expect(run).toHaveAccessibleDescription(/Metres, 1 to 500/);
    expect(store.getState().document).toBe(house);
    await user.click(run);
    await user.keyboard('{Escape}');
    expect(run).toHaveValue('15');
    expect(run).toBeValid();
    expect(screen.queryByText('Metres, 1 to 500')).toBeNull();
  });

  it('takes back typing with Esc, and with Esc again leaves the cell for its row, where letters act', async () => {
    const user = userEvent.setup();
    open();
    await user.click(cell(OVEN, 'label'));
    await user.keyboard('Hob{Escape}');
    expect(cell(OVEN, 'label')).toHaveValue('Kitchen oven');
    await user.keyboard('g');
    expect(push).not.toHaveBeenCalled();
    await user.keyboard('{Escape}{Escape}');
    expect(document.activeElement).toBe(head(OVEN));
    await user.keyboard('{ArrowDown}');
    expect(document.activeElement).toBe(head('bath.way-lamps1'));
    expect(store.getState().selection.parts).toEqual(['bath.way-lamps1']);
    await user.keyboard('g');
    expect(push).toHaveBeenCalledWith('/jobs/job/overview');
  });

  it('changes several rows at once, one undo for all', async () => {
    const user = userEvent.setup();
    open();
    await user.click(cell('living-room.way-outlets1', 'laying'));
    await user.keyboard('{Shift>}{ArrowDown}{ArrowDown}{/Shift}');
    expect(screen.getByText(/3 in hand/)).toBeInTheDocument();
    await user.keyboard('C, 4{Enter}');
    const laid = ['living-room.outlet1.cable', 'kitchen.outlet1.cable', 'kitchen.heavy1.run'].map((id) => {
      const { method, grouped } = cable(id);
      return [method, grouped];
    });
    expect(laid).toEqual([
      ['C', 4],
      ['C', 4],
      ['C', 4],
    ]);
    expect(store.getState().undoSteps.map(({ label }) => label)).toEqual(['3 ways: how it is laid C, 4']);
    act(() => store.getState().undo());
    expect(JSON.stringify(store.getState().document)).toBe(JSON.stringify(house));
  });

  it('copies the cell above with Ctrl D, and down over the rows in hand', async () => {
    const user = userEvent.setup();
    open();
    await user.click(cell('bath.way-lamps1', 'length'));
    await user.keyboard('{Control>}d{/Control}');
    expect(cable('bath.lamps1.run').length).toBe(15);
    await user.click(cell('veranda.way-lamps1', 'rating'));
    await user.keyboard('{Shift>}{ArrowDown}{ArrowDown}{/Shift}{Control>}d{/Control}');
    expect(
      [cell('living-room.way-lamps1', 'rating'), cell('living-room.way-outlets1', 'rating')].map(({ value }) => value),
    ).toEqual(['B10', 'B10']);
    expect(store.getState().undoSteps.map(({ label }) => label)).toEqual(['Way 6: 14 to 15 m', '2 ways: rating B10']);
  });

  it('takes a block from a spreadsheet as one change, or none of it, and gives a column back', async () => {
    const user = userEvent.setup();
    open();
    await user.click(cell('living-room.way-outlets1', 'csa'));
    await user.paste('4\t11\n6\t13\n');
    const runs = ['living-room.outlet1.cable', 'kitchen.outlet1.cable'].map((id) => [cable(id).csa, cable(id).length]);
    expect(runs).toEqual([
      [4, 11],
      [6, 13],
    ]);
    expect(store.getState().undoSteps.map(({ label }) => label)).toEqual(['Paste 4 cells']);
    await user.paste('4\t11\n4\tfar\n');
    expect(cable('kitchen.outlet1.cable').csa).toBe(6);
    expect(screen.getByText('Nothing was pasted. Way 4, "far". Metres, 1 to 500')).toBeInTheDocument();
    await user.keyboard('{Shift>}{ArrowDown}{/Shift}');
    const setData = vi.fn();
    fireEvent.copy(cell('living-room.way-outlets1', 'csa'), { clipboardData: { setData } });
    expect(setData).toHaveBeenCalledWith('text/plain', '4\n6');
  });

  it('says the whole row at its head, and what a missing figure waits for in the margin', async () => {
    const user = userEvent.setup();
    open({ document: { ...house, supply: { ...house.supply, ra: undefined } } });
    const oven = head(OVEN);
    expect(cell(OVEN, 'csa')).toHaveAccessibleName('Way 5, cable, mm²');
    expect(oven).toHaveAccessibleName(/name Kitchen oven, .*cable, mm² 2\.5, run, metres 15/);
    await user.click(oven);
    expect(margin().getByText(/^Zs needs the ohms of the electrode/)).toBeInTheDocument();
  });

  it('opens with the way in hand that the address names', async () => {
    open({ way: 'kitchen.way-heavy1' });
    await waitFor(() => expect(document.activeElement).toBe(head(OVEN)));
    expect(screen.getByRole('heading', { name: /^Way 5: time against current/ })).toBeInTheDocument();
    expect(screen.getByText(/^1\.71 % is lost up to E7/)).toBeInTheDocument();
  });

  it('lists all that is found, the gravest first, each with a row that it is about', () => {
    const thin = house.cables.map((each) => (/heavy1\.run$/.test(each.id) ? { ...each, csa: 1.5 } : each));
    open({ document: { ...house, cables: thin } });
    const found = margin().getAllByRole('listitem').map(({ textContent }) => textContent);
    expect(found).toContain('Way 5 Q8 does not protect its cable danger');
    expect(found.at(-1)).toMatch(/advice$/);
    expect(found).toContainEqual(expect.stringMatching(/^Way 13 With Q0 off, G1 is still there advice$/));
  });

  it('goes through the rows that are not in order', async () => {
    const user = userEvent.setup();
    const thin = house.cables.map((each) => (/heavy1\.run$/.test(each.id) ? { ...each, csa: 1.5 } : each));
    open({ document: { ...house, cables: thin } });
    await user.click(head('veranda.way-lamps1'));
    await user.keyboard('n');
    expect(document.activeElement).toBe(head(OVEN));
    await user.keyboard('{F8}');
    expect(document.activeElement).toBe(head('bath.way-heavy1'));
  });
});

describe('the other schedules', () => {
  it('are turned to, keeping what is in hand on the drawing', async () => {
    const user = userEvent.setup();
    open({ schedule: 'loads' });
    await user.click(cell('kitchen.heavy1', 'watts', 'loads'));
    await user.keyboard('3500{Enter}');
    expect(store.getState().document.parts.find(({ id }) => id === 'kitchen.heavy1')).toMatchObject({ watts: 3500 });
    await user.click(head('kitchen.heavy1', 'loads'));
    await user.click(screen.getByRole('radio', { name: 'designations' }));
    expect(head('kitchen.heavy1', 'designations')).toHaveAttribute('aria-pressed', 'true');
  });

  it('ask what it is worth to leave a load off, and take it off the backup with its neutral', async () => {
    const user = userEvent.setup();
    open({ schedule: 'backup' });
    expect(screen.getByText('All that stays on, 344 W, lasts 4 h 24; 4 h wanted.')).toBeInTheDocument();
    await user.click(load('M1')!);
    expect(screen.getByText('Without M1: 289 W, 5 h 20.')).toBeInTheDocument();
    expect(store.getState().undoSteps).toEqual([]);
    await user.click(screen.getByRole('button', { name: 'Take it off the backup' }));
    const [step] = store.getState().undoSteps;
    expect(step!.label).toMatch(/^Move .*fan.* to /);
    expect(load('M1')).toBeNull();
    const { findings } = workOut(store.getState().document);
    expect(findings.filter(({ severity }) => severity === 'danger')).toEqual([]);
  });

  it('have a file each', () => {
    open({ schedule: 'backup' });
    const links = screen.getAllByRole('link', { name: /as CSV$/ }).map((link) => link.getAttribute('href'));
    expect(links).toEqual(
      ['sources', 'batteries', 'backup'].map(
        (id) => `/api/drawings/00000000-0000-4000-8000-000000000000/csv?table=${id}`,
      ),
    );
  });
});

describe('states', () => {
  it('lets a reader read, with no field and no remedy, and keep the files', () => {
    open({ edit: false });
    expect(screen.queryByRole('textbox')).toBeNull();
    expect(screen.getByText(/You may read this drawing\. Ask T\. B\. to draw in it\./)).toBeInTheDocument();
    expect(screen.getByRole('link', { name: 'Ways as CSV' })).toBeInTheDocument();
  });

  it('says of an empty drawing where ways come from', () => {
    open({ document: emptyDocument('Nothing', 'IEC', { system: 'TN-S', voltage: 230, frequency: 50 }) });
    expect(screen.getByText('No way yet: extend from the line bar.')).toBeInTheDocument();
    expect(screen.getByRole('link', { name: 'To sheet 2' })).toHaveAttribute('href', '/jobs/job/overview');
  });

  it('says when it could not be worked out, and offers to try again', async () => {
    failure = 'out of memory';
    open();
    expect(screen.getByRole('heading', { name: 'This sheet could not be read. Nothing is lost.' })).toBeInTheDocument();
    await userEvent.click(screen.getByRole('button', { name: 'Try again' }));
    expect(again).toHaveBeenCalled();
  });
});
