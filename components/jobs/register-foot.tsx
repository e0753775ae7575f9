'use client';

import { useState } from 'react';
import { ButtonLink, WordButton } from '@/components/ui/button';
import { Key } from '@/components/ui/key';
import { saveFile } from '@/components/ui/save-file';
import type { JobQuery } from '@/lib/shared/jobs';
import { registerCsv } from './register-csv';

const sortWords: Record<JobQuery['sort'], [asc: string, desc: string]> = {
  number: ['number', 'number, newest first'],
  title: ['place', 'place, from Z'],
  client: ['client', 'client, from Z'],
  state: ['state', 'state, issued first'],
  due: ['due, late first', 'due, latest first'],
  updated: ['change, oldest first', 'change, newest first'],
};

/** The register's own strip: a new job, the order of the rows, the table as a file. */
export function RegisterFoot({ query, mayCreate, today }: { query: JobQuery; mayCreate: boolean; today: string }) {
  const [refusal, setRefusal] = useState('');
  const [busy, setBusy] = useState(false);
  const exportRows = async () => {
    setBusy(true);
    setRefusal('');
    const answer = await registerCsv(query);
    setBusy(false);
    if (answer.ok) saveFile(`jobs-${today}.csv`, answer.data);
    else setRefusal(answer.offline ? 'No file: the server did not answer.' : answer.refusal.message);
  };
  return (
    <div className="flex flex-col gap-1">
      {mayCreate && (
        <p className="flex items-center gap-3 text-[14px] font-bold">
          <ButtonLink href="/jobs/new" className="border-0! px-0! text-[14px]! font-bold">
            + New job
          </ButtonLink>
          <span className="pointer-coarse:hidden">
            <Key>n</Key>
          </span>
        </p>
      )}
      <p className="text-small text-grey max-sm:hidden">
        Sorted by {sortWords[query.sort][query.direction === 'asc' ? 0 : 1]}. A heading sorts; pressed again it turns round.
      </p>
      <p className="flex flex-wrap gap-4">
        <WordButton disabled={busy} onClick={() => void exportRows()}>
          Register as CSV
        </WordButton>
        {refusal && (
          <span role="alert" className="text-red">
            {refusal}
          </span>
        )}
      </p>
    </div>
  );
}
