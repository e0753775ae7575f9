'use client';

import { useRouter } from 'next/navigation';
import { useState } from 'react';
import { RefusalLine } from '@/components/frame/refusal-line';
import { Button } from '@/components/ui/button';
import { ConfirmBar } from '@/components/ui/confirm-bar';
import { callApi } from '@/lib/shared/api-client';
import type { ErrorAnswer } from '@/lib/shared/errors';
import type { JobView } from '@/lib/shared/jobs';

/** Puts a job into the archive, or takes it out again; nothing of it is lost either way. */
export function ArchiveJob({ job }: { job: JobView }) {
  const router = useRouter();
  const [asking, setAsking] = useState(false);
  const [busy, setBusy] = useState(false);
  const [refusal, setRefusal] = useState<ErrorAnswer | null>(null);
  const send = async (archived: boolean) => {
    setBusy(true);
    setRefusal(null);
    const answer = await callApi<JobView>('PATCH', `/api/jobs/${job.id}`, { version: job.version, archived });
    setBusy(false);
    setAsking(false);
    if (!answer.ok) return setRefusal(answer.refusal);
    router.push(archived ? '/jobs' : `/jobs?filter=all&search=${encodeURIComponent(job.number)}`);
    router.refresh();
  };
  return (
    <section>
      <h2 className="text-head font-bold">{job.archived ? 'This job is in the archive' : 'Archive the job'}</h2>
      <p className="mt-1 mb-2">
        {job.archived
          ? 'It may be read, not drawn in. Out of the archive it goes on where it stopped.'
          : 'It leaves the register and can be taken out again. Its drawing, revisions and history stay.'}
      </p>
      {asking ? (
        <ConfirmBar
          question={`Archive ${job.number}? Nobody can draw in it until it is taken out again.`}
          yes="Archive it"
          busy={busy}
          onYes={() => void send(true)}
          onNo={() => setAsking(false)}
        />
      ) : (
        <Button disabled={busy} onClick={() => (job.archived ? void send(false) : setAsking(true))}>
          {job.archived ? 'Take it out of the archive' : 'Archive it'}
        </Button>
      )}
      {refusal && (
        <div className="mt-2">
          <RefusalLine refusal={refusal} />
        </div>
      )}
    </section>
  );
}
