'use client';

import { SheetFrame } from '@/components/frame/sheet-frame';
import { jobTabs, teamTabs } from '@/components/frame/tabs';
import type { Supply } from '@/diagram/document/schema';
import type { JobView } from '@/lib/shared/jobs';
import type { PersonRole, PersonRow } from '@/lib/shared/people';
import { ArchiveJob } from './archive-job';
import { JobForm, JobFormActions } from './job-form';
import { useJobForm } from './use-job-form';

interface JobSheetProps {
  /** null: a new one */
  job: JobView | null;
  /** those it may be given to */
  apprentices: readonly PersonRow[];
  person: { initials: string; roles: readonly PersonRole[] };
  team: string;
  today: string;
}

/** The sheet on which a job is begun or put right; the title block fills as one types. */
export function JobSheet({ job, apprentices, person, team, today }: JobSheetProps) {
  const form = useJobForm(job);
  const { values } = form;
  const supply: Supply = {
    system: values.system,
    voltage: Number(values.voltage.replace(',', '.')) || 230,
    frequency: Number(values.frequency.replace(',', '.')) || 50,
  };
  return (
    <SheetFrame
      tabs={job ? jobTabs(job.id) : teamTabs(person.roles)}
      current="jobs"
      who={person.initials}
      kind={job ? 'Job' : 'New job'}
      titleBlock={{
        number: job?.number ?? '-',
        title: values.title || '-',
        client: values.client,
        address: values.address,
        team,
        drawnBy: job?.drawnBy ?? person.initials,
        drawnOn: today,
        checkedBy: job?.checkedBy ?? null,
        revision: job?.revision ?? '-',
        state: job ? (job.archived ? 'archived' : job.state) : 'new',
      }}
      practice={{ id: values.practice, supply }}
      foot={<JobFormActions form={form} isNew={job === null} />}
      marginLabel="About this job"
      margin={
        <div className="flex flex-col gap-8">
          <section>
            <h2 className="text-head font-bold">What the sheet needs to know</h2>
            <p className="mt-1">What you do not know may stay empty: whatever needs it then says so, and nothing is guessed.</p>
            <p className="mt-2 text-grey">Supply values decide short-circuit currents, disconnection and volt drop of every way.</p>
          </section>
          {job && <ArchiveJob job={job} />}
          {!job && (
            <section>
              <h2 className="text-head font-bold">What comes next</h2>
              <p className="mt-1">The survey: one row a room. From it the whole sheet is drafted.</p>
            </section>
          )}
        </div>
      }
    >
      <div className="px-4 py-4 lap:px-6">
        <h1 className="mb-4 text-title font-bold">{job ? `Job ${job.number}` : 'New job'}</h1>
        <JobForm form={form} apprentices={apprentices} />
      </div>
    </SheetFrame>
  );
}
