'use client';

import { useEffect, useRef } from 'react';
import { Button } from '@/components/ui/button';
import type { JobView } from '@/lib/shared/jobs';
import { valuesOf, type JobFormField, type JobFormValues } from './form-values';

const names: Record<JobFormField, string> = {
  title: 'Place',
  client: 'Client',
  clientPhone: 'Telephone',
  clientEmail: 'E-mail',
  address: 'Address',
  practice: 'Practice',
  system: 'Earthing',
  voltage: 'Voltage',
  frequency: 'Frequency',
  ze: 'Ze',
  zln: 'ZLN',
  ra: 'RA',
  hoursWanted: 'Hours wanted',
  due: 'Due',
  given: 'Given to',
};

/** A value as one reads it; of the people it is given to, how many. */
const show = (field: JobFormField, value: string): string =>
  field === 'given' ? `${value.split(' ').filter(Boolean).length} apprentices` : value || '-';

interface VersionConflictProps {
  mine: JobFormValues;
  theirs: JobView;
  onMine(): void;
  onTheirs(): void;
}

/** Two people edited one job: both versions side by side, nothing written over in silence. */
export function VersionConflict({ mine, theirs, onMine, onTheirs }: VersionConflictProps) {
  const box = useRef<HTMLElement>(null);
  useEffect(() => box.current?.scrollIntoView?.({ block: 'nearest' }), []);
  const saved = valuesOf(theirs);
  const differing = (Object.keys(names) as JobFormField[]).filter((field) => saved[field] !== mine[field]);
  return (
    <section ref={box} role="alert" className="border-l-4 border-red bg-row py-3 pr-3 pl-4">
      <h2 className="text-head font-bold text-red">Somebody saved this job while you typed</h2>
      {differing.length === 0 ? (
        <p className="mt-1">They typed the same as you.</p>
      ) : (
        <table className="mt-2 w-full max-w-xl border-collapse">
          <thead>
            <tr className="text-left text-small text-grey">
              <th className="border-b border-ink pr-4 font-normal">Field</th>
              <th className="border-b border-ink pr-4 font-normal">Saved now</th>
              <th className="border-b border-ink font-normal">Yours</th>
            </tr>
          </thead>
          <tbody>
            {differing.map((field) => (
              <tr key={field}>
                <th scope="row" className="border-b border-hair py-1 pr-4 text-left font-normal">
                  {names[field]}
                </th>
                <td className="border-b border-hair pr-4">{show(field, saved[field])}</td>
                <td className="border-b border-hair font-bold">{show(field, mine[field])}</td>
              </tr>
            ))}
          </tbody>
        </table>
      )}
      <div className="mt-3 flex gap-2">
        <Button onClick={onMine}>Go on with mine</Button>
        <Button onClick={onTheirs}>Take what is saved</Button>
      </div>
    </section>
  );
}
