import { render, screen, within } from '@testing-library/react';
import userEvent from '@testing-library/user-event';
import { beforeEach, describe, expect, it, vi } from 'vitest';
import { setSingleKeysOn } from '@/components/frame/single-keys';
import { Register, type RegisterProps } from '@/components/jobs/register';
import { JobQuerySchema, type JobPage, type JobRow } from '@/lib/shared/jobs';

const router = { push: vi.fn(), replace: vi.fn(), refresh: vi.fn() };
vi.mock('next/navigation', () => ({ useRouter: () => router }));

const job = (number: number, values: Partial<JobRow> = {}): JobRow => ({
  id: `job-${number}`,
  number: `OH-${number}`,
  title: `Weir Lane ${number}`,
  client: 'M. Orrin',
  drawnBy: 'R. A.',
  checkedBy: null,
  revision: '-',
  state: 'draft',
  waits: 'the survey',
  due: null,
  findings: null,
  drawingId: `drawing-${number}`,
  archived: false,
  updatedAt: '2026-11-30T00:00:00.000Z',
  ...values,
});
const pageOf = (rows: JobRow[], values: Partial<JobPage> = {}): JobPage => ({ rows, total: rows.length, page: 1, pages: 1, all: rows.length, ...values });
const rows = [job(1, { due: '2026-11-28' }), job(2, { findings: { danger: 1, defect: 0, advice: 2 } }), job(3, { state: 'issued', waits: 'nothing' })];

function open(values: Partial<RegisterProps> = {}) {
  const query = JobQuerySchema.parse({});
  render(
    <Register
      page={pageOf(rows)}
      query={query}
      mine={pageOf([rows[1]!])}
      dueCount={1}
      person={{ initials: 'T. B.', roles: ['electrician'] }}
      team="Tillmere"
      mayCreate
      today="2026-11-30"
      {...values}
    />,
  );
}
const row = (number: number) => screen.getByRole('button', { name: `OH-${number}` });

beforeEach(() => {
  vi.clearAllMocks();
  localStorage.clear();
  setSingleKeysOn(true);
});

describe('register by keyboard', () => {
  it('is one tab stop; arrows change the row', async () => {
    const user = userEvent.setup();
    open();
    expect(rows.map((_, i) => row(i + 1).tabIndex)).toEqual([0, -1, -1]);
    row(1).focus();
    await user.keyboard('{ArrowDown}{ArrowDown}');
    expect(row(3)).toHaveFocus();
    await user.keyboard('{Home}');
    expect(row(1)).toHaveFocus();
  });

  it('unfolds with Enter, goes along the set with arrows, opens with Enter again', async () => {
    const user = userEvent.setup();
    open();
    row(2).focus();
    await user.keyboard('{Enter}');
    expect(row(2)).toHaveAttribute('aria-expanded', 'true');
    expect(screen.getAllByRole('link', { name: /^[123] / }).map((link) => link.getAttribute('href'))).toEqual([
      '/jobs/job-2/survey',
      '/jobs/job-2/overview',
      '/jobs/job-2/connections',
    ]);
    await user.keyboard('{ArrowRight}{Enter}');
    expect(router.push).toHaveBeenCalledWith('/jobs/job-2/connections');
  });

  it('opens the sheet that was left last', async () => {
    const user = userEvent.setup();
    localStorage.setItem('ohmstead-last-sheet', JSON.stringify([['job-2', 'survey']]));
    open();
    row(2).focus();
    await user.keyboard('{Enter}{Enter}');
    expect(router.push).toHaveBeenCalledWith('/jobs/job-2/survey');
  });

  it('opens a sheet by its digit while the set lies open, and folds with Esc', async () => {
    const user = userEvent.setup();
    open();
    row(1).focus();
    await user.keyboard('1');
    expect(router.push).not.toHaveBeenCalled();
    await user.keyboard('{Enter}3');
    expect(router.push).toHaveBeenCalledWith('/jobs/job-1/connections');
    await user.keyboard('{Escape}');
    expect(row(1)).toHaveAttribute('aria-expanded', 'false');
    expect(row(1)).toHaveFocus();
  });

  it('begins a job with n, but not while one types, nor when single keys are off', async () => {
    const user = userEvent.setup();
    open();
    await user.type(screen.getByRole('searchbox'), 'n');
    expect(router.push).not.toHaveBeenCalled();
    screen.getByRole('searchbox').blur();
    await user.keyboard('n');
    expect(router.push).toHaveBeenCalledWith('/jobs/new');
    router.push.mockClear();
    setSingleKeysOn(false);
    await user.keyboard('n');
    expect(router.push).not.toHaveBeenCalled();
  });

  it('goes to the search with /', async () => {
    const user = userEvent.setup();
    open();
    await user.keyboard('/');
    expect(screen.getByRole('searchbox')).toHaveFocus();
    expect(screen.getByRole('searchbox')).toHaveValue('');
  });
});

describe('what the register asks for', () => {
  it('asks for what is typed after a pause, once', async () => {
    const user = userEvent.setup();
    open();
    await user.type(screen.getByRole('searchbox'), 'salt');
    await vi.waitFor(() => expect(router.replace).toHaveBeenCalledWith('/jobs?search=salt', { scroll: false }));
    expect(router.replace).toHaveBeenCalledTimes(1);
  });

  it('sorts by a heading and turns the order round', async () => {
    const user = userEvent.setup();
    open();
    const heading = screen.getByRole('columnheader', { name: /^Due/ });
    expect(heading).toHaveAttribute('aria-sort', 'ascending');
    await user.click(within(heading).getByRole('button'));
    expect(router.replace).toHaveBeenLastCalledWith('/jobs?direction=desc', { scroll: false });
    await user.click(screen.getByRole('button', { name: 'Place and client' }));
    expect(router.replace).toHaveBeenLastCalledWith('/jobs?sort=title', { scroll: false });
  });

  it('filters, and pages', async () => {
    const user = userEvent.setup();
    open({ page: pageOf(rows, { pages: 3, total: 60 }) });
    await user.click(screen.getByRole('radio', { name: 'Due this week 1' }));
    expect(router.replace).toHaveBeenLastCalledWith('/jobs?filter=due', { scroll: false });
    expect(screen.getByRole('button', { name: 'Page before' })).toBeDisabled();
    await user.click(screen.getByRole('button', { name: 'Next page' }));
    expect(router.replace).toHaveBeenLastCalledWith('/jobs?page=2', { scroll: false });
  });
});

describe('what the register says', () => {
  it('tells late, mine and findings in words', () => {
    open();
    expect(screen.getByRole('row', { name: /OH-1 / })).toHaveTextContent('28 Nov, late');
    expect(screen.getByRole('row', { name: /OH-2 / })).toHaveTextContent('you: the survey');
    expect(screen.getByTitle('1 danger, 2 advice')).toHaveTextContent('3');
    expect(screen.getByRole('row', { name: /OH-3 / })).toHaveTextContent('issued');
  });

  it('offers the first job where there is none, and only to those who may begin one', () => {
    open({ page: pageOf([]), mine: pageOf([]) });
    expect(screen.getByText('No job yet. The first begins with a client and a place.')).toBeInTheDocument();
    expect(screen.getByRole('link', { name: 'New job' })).toBeInTheDocument();
  });

  it('offers a reader no new job', () => {
    open({ page: pageOf([]), mine: pageOf([]), mayCreate: false });
    expect(screen.queryByRole('link', { name: /New job/ })).not.toBeInTheDocument();
  });

  it('names what nothing was found for, and clears it', async () => {
    const user = userEvent.setup();
    open({ page: pageOf([], { all: 41 }), query: JobQuerySchema.parse({ search: 'salt' }) });
    expect(screen.getByText('Nothing has "salt". 41 jobs in all.')).toBeInTheDocument();
    await user.click(screen.getByRole('button', { name: 'Clear' }));
    expect(router.replace).toHaveBeenLastCalledWith('/jobs', { scroll: false });
  });
});
