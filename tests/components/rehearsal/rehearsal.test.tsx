import { render, screen, waitFor, within } from '@testing-library/react';
import userEvent from '@testing-library/user-event';
import { beforeEach, describe, expect, it, vi } from 'vitest';
import { RehearsalSheet } from '@/components/rehearsal/rehearsal-sheet';
import type { Rehearser } from '@/components/rehearsal/rehearser';
import { Home, smallHome } from '@/diagram/document/home';
import { emptyDocument, type Installation } from '@/diagram/document/schema';
import { failingOnce, inProcess, InProcess, viewOf } from './in-process';

vi.mock('next/navigation', () => ({ useRouter: () => ({ push: vi.fn() }) }));

const backedUp = (): Installation =>
  new Home({ supply: { system: 'TT', ra: 20, zln: 0.4 } })
    .place('study', 'room', { name: 'Study' })
    .backup()
    .way('Q11', 'study')
    .lamp('E1', 'S1', 'Q11')
    .way('Q12', 'study', {}, { bars: '2' })
    .lamp('E2', 'S2', 'Q12')
    .document();

const me = { id: '00000000-0000-4000-8000-0000000000ff', initials: 'T. B.' };

async function open(document: Installation, query = '', more: { edit?: boolean; make?: () => Rehearser } = {}) {
  window.history.replaceState(null, '', `/jobs/j/rehearsal${query ? `?${query}` : ''}`);
  render(
    <RehearsalSheet
      view={viewOf(document, more.edit ?? true)}
      me={me}
      query={query}
      makeRehearser={more.make ?? inProcess}
    />,
  );
  const user = userEvent.setup();
  return { user, search: () => decodeURIComponent(window.location.search) };
}
const ready = () => waitFor(() => expect(screen.getByRole('application')).toHaveAttribute('aria-busy', 'false'));
const margin = () => within(screen.getByRole('complementary'));
const sheet = () => screen.getByRole('application');
const live = () => screen.getAllByRole('status').map(({ textContent }) => textContent);

beforeEach(() => {
  InProcess.told = [];
});

describe('the rehearsal sheet', () => {
  it('takes the mains away: says so, writes it into the address, and a reload keeps it', async () => {
    const { user, search } = await open(backedUp());
    await ready();
    await user.click(margin().getByRole('radio', { name: 'outage' }));
    await waitFor(() => expect(live()).toContain('Outage. Dark: E1. G1 on battery.'));
    expect(search()).toBe('?supply=dead');
    expect(margin().getByText(/^Battery: G1 gives/)).toBeVisible();
    expect(margin().getByText('E1.')).toBeVisible();
    // The drawing is asked about, never told again: nothing of the rehearsal goes into it.
    expect(InProcess.told.filter(({ document }) => document)).toHaveLength(1);
  });

  it('turns a switch by arrows and Enter, and by the list without the drawing', async () => {
    const { user, search } = await open(backedUp(), 'hand=S1');
    await ready();
    sheet().focus();
    await user.keyboard('{Enter}');
    await waitFor(() => expect(live()).toContain('S1 off. Dark: E1.'));
    expect(search()).toContain('set=S1~open');
    await user.click(margin().getByText(/switches and devices/));
    await user.click(margin().getByRole('button', { name: 'Q12 is closed: turn it' }));
    await waitFor(() => expect(live()).toContain('Q12 open. Dark: E2.'));
    await user.click(margin().getByRole('button', { name: 'All as drawn' }));
    await waitFor(() => expect(live().join()).toContain('Fed again: E1 and E2.'));
    expect(search()).not.toContain('set=');
  });

  it('puts a fault in by f, steps through it with the arrows, and Esc takes it out', async () => {
    const { user, search } = await open(backedUp(), 'condition=outage&hand=E2');
    await ready();
    sheet().focus();
    await user.keyboard('f');
    const choice = margin().getByRole('group', { name: 'A fault at E2' });
    expect(
      within(choice)
        .getAllByRole('button')
        .map(({ textContent }) => textContent),
    ).toEqual(['line to case', 'line to neutral', 'neutral open', 'neutral to earth']);
    expect(within(choice).getByRole('button', { name: 'line to case' })).toHaveFocus();
    await user.keyboard('{Enter}');
    expect(await margin().findByRole('heading', { name: /Fault walk: line to case at E2/ })).toBeVisible();
    expect(search()).toContain('fault=line-to-case~E2');
    expect(margin().getByText('step 2 of 4')).toBeVisible();
    sheet().focus();
    await user.keyboard('{ArrowRight}');
    expect(margin().getByText('step 3 of 4')).toBeVisible();
    expect(live().join()).toMatch(/Step 3 of 4, 40 ms: Q5 opens\. It sees .* astray; 30 mA suffice\./);
    expect(search()).toContain('step=3');
    // What no drawing tells, the walk says that it takes for granted.
    expect(margin().getByText('Taken for granted, as no drawing tells it:')).toBeVisible();
    expect(margin().getByText(/^a sinusoidal residual current at Q5/)).toBeVisible();
    await user.keyboard('{ArrowLeft}{ArrowLeft}{ArrowLeft}');
    expect(margin().getByText('step 1 of 4')).toBeVisible();
    await user.keyboard('{Escape}');
    await waitFor(() => expect(margin().queryByRole('heading', { name: /Fault walk/ })).toBeNull());
    expect(search()).not.toContain('fault=');
  });

  it('has the curve of the touch voltage as a table, too, and the margin holds the facts as text', async () => {
    const { user } = await open(backedUp(), 'fault=line-to-case~E1');
    await ready();
    const plot = within(margin().getByRole('figure'));
    await user.click(plot.getByText('The same as a table'));
    const rows = plot.getAllByRole('row').map(({ textContent }) => textContent);
    expect(rows).toHaveLength(5);
    expect(rows[1]).toBe('beforebefore0 V');
    expect(rows[2]).toMatch(/^0line touches the case of E12\d\d V$/);
    expect(rows[4]).toMatch(/still0 V$/);
    expect(plot.getByText(/50 V may stand\. Limit: Table 41\.1, TT/)).toBeVisible();
  });

  it('takes a second fault after the first', async () => {
    const { user, search } = await open(backedUp(), 'condition=main-off&fault=neutral-to-earth~E2&hand=E2');
    await ready();
    await user.click(margin().getByRole('button', { name: 'line to case' }));
    expect(
      await margin().findByRole('heading', { name: /neutral to earth at E2, then line to case at E2/ }),
    ).toBeVisible();
    expect(search()).toContain('fault=neutral-to-earth~E2,line-to-case~E2');
  });

  it('says what stays live with a part open, and how it is made dead', async () => {
    await open(backedUp(), 'hand=Q11');
    await ready();
    expect(margin().getByRole('heading', { name: 'What stays live with Q11 open?' })).toBeVisible();
    expect(
      margin().getByText('In Study E2, S2 and joint in Study stay live from the supply through Q12.'),
    ).toBeVisible();
    expect(margin().getByRole('heading', { name: 'To make Q11 dead' })).toBeVisible();
    expect(margin().getByText('Battery terminals are never dead.')).toBeVisible();
  });

  it('has no outage and no main off without a backup source', async () => {
    await open(smallHome().document());
    await ready();
    expect(
      margin()
        .getAllByRole('radio')
        .map((radio) => (radio as HTMLInputElement).value),
    ).toEqual(['mains']);
  });

  it('goes through the conditions by c', async () => {
    const { user } = await open(backedUp());
    await ready();
    for (const name of ['outage', 'main off', 'isolated', 'mains']) {
      await user.keyboard('c');
      await waitFor(() => expect(margin().getByRole('radio', { name })).toBeChecked());
      await waitFor(() => expect(live().join().toLowerCase()).toContain(`${name}.`));
    }
  });

  it('asks for a value that a walk wants, and walks on when it is typed: that alone becomes part of the drawing', async () => {
    const doc = smallHome({ supply: { system: 'TT', zln: 0.4 } }).document();
    const { user } = await open(doc, 'fault=line-to-case~E1');
    await ready();
    expect(margin().getByText('Cannot be walked without the resistance of the earth electrode.')).toBeVisible();
    await user.click(margin().getByRole('button', { name: 'Type it' }));
    const field = margin().getByRole('textbox', { name: 'the resistance of the earth electrode' });
    await user.type(field, 'twenty{Enter}');
    expect(margin().getByText('Type a number above 0, in ohm.')).toBeVisible();
    await user.clear(field);
    await user.type(field, '20{Enter}');
    expect(await margin().findByRole('heading', { name: /Fault walk/ })).toBeVisible();
    expect(InProcess.told.at(-1)!.document!.supply.ra).toBe(20);
  });

  it('lets a reader rehearse, and offers no typing', async () => {
    const doc = smallHome({ supply: { system: 'TT', zln: 0.4 } }).document();
    const { user } = await open(doc, 'fault=line-to-case~E1&hand=S1', { edit: false });
    await ready();
    expect(margin().queryByRole('button', { name: 'Type it' })).toBeNull();
    await user.click(margin().getByRole('radio', { name: 'off' }));
    await waitFor(() => expect(live()).toContain('S1 off. Dark: E1.'));
  });

  it('says that nothing happens where nothing does', async () => {
    const doc = smallHome({ rcd: false }).cut('JE11', 'E1:E').document();
    await open(doc, 'fault=line-to-case~E1&step=9');
    await ready();
    expect(
      margin().getByText(/^No device opens\. 0\.0 A, case at 2[23]\d V until somebody touches it\.$/),
    ).toBeVisible();
  });

  it('has a way on from an empty drawing', async () => {
    await open(emptyDocument('Kiln Row 3', 'IEC', { system: 'TN-S', voltage: 230, frequency: 50 }));
    expect(await screen.findByRole('link', { name: 'Start from the survey' })).toBeVisible();
  });

  it('owns up to a failure, and tries again', async () => {
    const { user } = await open(backedUp(), '', { make: failingOnce() });
    expect(await screen.findByText(/could not be rehearsed\. Nothing is lost\./)).toBeVisible();
    expect(screen.getByRole('button', { name: 'Get the file' })).toBeVisible();
    await user.click(screen.getByRole('button', { name: 'Try again' }));
    await ready();
    expect(margin().getByText(/^Mains: the supply gives/)).toBeVisible();
  });
});
