import { render, screen } from '@testing-library/react';
import userEvent from '@testing-library/user-event';
import { beforeEach, describe, expect, it, vi } from 'vitest';
import { JobSheet } from '@/components/jobs/job-sheet';
import type { JobView } from '@/lib/shared/jobs';

const router = { push: vi.fn(), replace: vi.fn(), refresh: vi.fn() };
vi.mock('next/navigation', () => ({ useRouter: () => router }));

const job: JobView = {
  id: 'job-1',
  number: 'OH-1',
  title: 'Weir Cottage',
  client: 'M. Orrin',
  address: '',
  drawnBy: 'T. B.',
  checkedBy: null,
  revision: '-',
  state: 'draft',
  waits: '',
  due: null,
  findings: null,
  drawingId: 'drawing-1',
  archived: false,
  updatedAt: '',
  practice: 'IEC',
  supply: { system: 'TN-S', voltage: 230, frequency: 50, ze: 0.35, zeEarth: 0.2 },
  hoursWanted: 0,
  version: 3,
  rights: { edit: true, draw: true },
};

/** Answers of the server, one after the other; `null` is a network that is gone. */
const answers: ({ status: number; body: unknown } | null)[] = [];
const fetched = vi.fn();
beforeEach(() => {
  vi.clearAllMocks();
  answers.length = 0;
  vi.stubGlobal(
    'fetch',
    vi.fn(async (path: string, init: RequestInit) => {
      if (path.startsWith('/api/clients')) return Response.json([]);
      fetched(init.method, path, init.body && JSON.parse(String(init.body)));
      const next = answers.shift();
      if (!next) throw new TypeError('network');
      return Response.json(next.body, { status: next.status });
    }),
  );
});

function open(of: JobView | null) {
  render(<JobSheet job={of} apprentices={[]} person={{ initials: 'T. B.', roles: ['electrician'] }} team="Tillmere" today="2026-11-30" />);
}
const field = (name: string | RegExp) => screen.getByLabelText<HTMLInputElement>(name);

describe('a new job', () => {
  it('names each field that is wrong, asks the server for nothing and goes to the first', async () => {
    const user = userEvent.setup();
    open(null);
    await user.clear(field(/Voltage/));
    await user.click(screen.getByRole('button', { name: 'Begin the job' }));
    expect(field('Client')).toBeInvalid();
    expect(field('Client')).toHaveAccessibleDescription(/Name the client/);
    expect(field('Place')).toHaveAccessibleDescription(/Name the place/);
    expect(field(/Voltage/)).toHaveAccessibleDescription(/Volts as a number/);
    expect(field('Client')).toHaveFocus();
    expect(fetched).not.toHaveBeenCalled();
  });

  it('takes decimal commas, leaves unknown values out and opens the survey', async () => {
    const user = userEvent.setup();
    answers.push({ status: 201, body: { ...job, id: 'job-9' } });
    open(null);
    await user.type(field('Client'), 'M. Orrin');
    await user.type(field('Place'), 'Weir Cottage');
    await user.selectOptions(screen.getByRole('combobox', { name: 'Earthing' }), 'TT');
    await user.type(field(/Earth electrode/), '20,5');
    await user.click(screen.getByRole('button', { name: 'Begin the job' }));
    const [, , sent] = fetched.mock.calls[0]!;
    expect(sent.supply).toEqual({ system: 'TT', voltage: 230, frequency: 50, ra: 20.5 });
    expect(sent.due).toBeNull();
    expect(router.push).toHaveBeenCalledWith('/jobs/job-9/survey');
  });

  it('keeps what was typed when the network is gone, says so, and saves on the next try', async () => {
    const user = userEvent.setup();
    answers.push(null, { status: 201, body: job });
    open(null);
    await user.type(field('Client'), 'M. Orrin');
    await user.type(field('Place'), 'Weir Cottage');
    await user.click(screen.getByRole('button', { name: 'Begin the job' }));
    expect(await screen.findByRole('alert')).toHaveTextContent('the server did not answer');
    expect(field('Place')).toHaveValue('Weir Cottage');
    await user.click(screen.getByRole('button', { name: 'Begin the job' }));
    expect(router.push).toHaveBeenCalledWith('/jobs/job-1/survey');
  });

  it('puts a refusal of the server beside its field', async () => {
    const user = userEvent.setup();
    answers.push({ status: 400, body: { error: 'invalid', message: 'Nothing was changed.', fields: { 'supply.voltage': 'Too much.' } } });
    open(null);
    await user.type(field('Client'), 'M. Orrin');
    await user.type(field('Place'), 'Weir Cottage');
    await user.click(screen.getByRole('button', { name: 'Begin the job' }));
    expect(await screen.findByText('Too much.')).toBeInTheDocument();
    expect(field(/Voltage/)).toBeInvalid();
    expect(field(/Voltage/)).toHaveFocus();
  });
});

describe('an edited job', () => {
  it('sends the version it was made on and keeps what the form does not show', async () => {
    const user = userEvent.setup();
    answers.push({ status: 200, body: job });
    open(job);
    await user.type(field(/Address/), 'Weir Lane');
    await user.click(screen.getByRole('button', { name: 'Save' }));
    expect(fetched).toHaveBeenCalledWith('PATCH', '/api/jobs/job-1', expect.objectContaining({ version: 3, address: 'Weir Lane', supply: job.supply }));
  });

  it('shows both versions when somebody saved meanwhile, and goes on from theirs with mine', async () => {
    const user = userEvent.setup();
    answers.push(
      { status: 409, body: { error: 'conflict', message: 'Somebody else changed this job meanwhile.' } },
      { status: 200, body: { ...job, title: 'Weir House', version: 4 } },
      { status: 200, body: job },
    );
    open(job);
    await user.clear(field('Place'));
    await user.type(field('Place'), 'Weir Mill');
    await user.click(screen.getByRole('button', { name: 'Save' }));
    const row = await screen.findByRole('row', { name: /Place/ });
    expect(row).toHaveTextContent('Weir House');
    expect(row).toHaveTextContent('Weir Mill');
    await user.click(screen.getByRole('button', { name: 'Go on with mine' }));
    await user.click(screen.getByRole('button', { name: 'Save' }));
    expect(fetched).toHaveBeenLastCalledWith('PATCH', '/api/jobs/job-1', expect.objectContaining({ version: 4, title: 'Weir Mill' }));
  });

  it('asks before it goes into the archive; Esc leaves it', async () => {
    const user = userEvent.setup();
    answers.push({ status: 200, body: { ...job, archived: true } });
    open(job);
    await user.click(screen.getByRole('button', { name: 'Archive it' }));
    expect(screen.getByRole('alertdialog')).toBeInTheDocument();
    await user.keyboard('{Escape}');
    expect(screen.queryByRole('alertdialog')).not.toBeInTheDocument();
    expect(fetched).not.toHaveBeenCalled();
    await user.click(screen.getByRole('button', { name: 'Archive it' }));
    await user.click(screen.getByRole('button', { name: 'Archive it' }));
    expect(fetched).toHaveBeenCalledWith('PATCH', '/api/jobs/job-1', { version: 3, archived: true });
  });
});
