'use client';

import Link from 'next/link';
import { rehearsalHref } from '../address';
import { RehearsalProvider, stationIndex, useRehearsal, walkIn } from '../state';
import { Stations } from '../steps-list';
import type { ShownWalk } from './shown-walk';

function Steps({ walk: shown, jobId }: { walk: ShownWalk; jobId: string }) {
  const walk = useRehearsal(walkIn);
  const index = useRehearsal(stationIndex);
  const condition = useRehearsal((state) => state.answer?.condition);
  if (!walk) return <p className="mt-2 text-grey">Being walked.</p>;
  return (
    <section aria-label="Fault walk" className="mt-2 flex flex-col gap-3 border-t border-hair pt-2">
      <p className="text-grey">
        Fault walk, {condition}: step {index + 1} of {walk.stations.length}, by the arrows on the sheet
      </p>
      <Stations walk={walk} />
      <Link
        href={rehearsalHref(jobId, walk.faults, shown.condition)}
        className="text-ink underline underline-offset-[3px]"
      >
        Rehearse it
      </Link>
    </section>
  );
}

/** The steps of the walk that the sheet shows, in the note of its finding: each leads the sheet to it. */
export default function WalkSteps(props: { walk: ShownWalk; jobId: string }) {
  return (
    <RehearsalProvider value={props.walk.store}>
      <Steps {...props} />
    </RehearsalProvider>
  );
}
