import type { ReactNode } from 'react';
import { SheetFrame } from '@/components/frame/sheet-frame';
import { teamTabs } from '@/components/frame/tabs';
import { Stamp } from '@/components/ui/stamp';
import type { PersonRole } from '@/lib/shared/people';
import { SEVERITIES, SEVERITY } from './words';

interface RulesSheetProps {
  person: { initials: string; roles: readonly PersonRole[] };
  team: string;
  today: string;
  /** what the sheet is called in the title block */
  title: string;
  margin?: ReactNode;
  find?: boolean;
  children: ReactNode;
}

/** How the catalogue is to be read: severities, and clauses that were not open in front of the author. */
function HowToRead() {
  return (
    <section>
      <h2 className="text-head font-bold">How to read a rule</h2>
      <dl className="mt-2 flex flex-col gap-2">
        {SEVERITIES.map((severity) => (
          <div key={severity}>
            <dt className="inline">
              <Stamp shape={SEVERITY[severity].shape}>{severity}</Stamp>
            </dt>{' '}
            <dd className="inline text-grey">{SEVERITY[severity].means}</dd>
          </div>
        ))}
      </dl>
      <p className="mt-3">Clauses are pointers for the reader. Where a country&apos;s code differs, the code wins.</p>
      <p className="mt-2 text-grey">From memory: the text of the clause was not open when the rule was written.</p>
    </section>
  );
}

/** A sheet of the rule catalogue. */
export function RulesSheet({ person, team, today, title, margin, find, children }: RulesSheetProps) {
  return (
    <SheetFrame
      tabs={teamTabs(person.roles)}
      current="rules"
      who={person.initials}
      kind="Rules"
      find={find}
      titleBlock={{
        number: '-',
        title,
        client: '',
        address: '',
        team,
        drawnBy: '',
        drawnOn: today,
        checkedBy: null,
        revision: '-',
        state: 'live',
      }}
      marginLabel="How to read"
      margin={
        <div className="flex flex-col gap-8">
          {margin}
          <HowToRead />
        </div>
      }
    >
      {children}
    </SheetFrame>
  );
}
