'use client';

import Link from 'next/link';
import { useParams } from 'next/navigation';
import { rehearsalHref } from '@/components/rehearsal/address';
import type { FaultWalk } from '@/diagram/circuit/fault-types';
import { nameOf } from '@/diagram/document/names';
import type { Installation } from '@/diagram/document/schema';

/** 0.018 as "18 ms", 2.4 as "2.4 s". */
const timeText = (seconds: number): string =>
  seconds === 0
    ? '0'
    : seconds < 1
      ? `${Number((seconds * 1000).toPrecision(2))} ms`
      : `${Number(seconds.toPrecision(2))} s`;

/** The fault walk that shows a danger, step by step. */
export function ProofView({ walk, document }: { walk: FaultWalk; document: Installation }) {
  const names = (ids: readonly string[]) =>
    ids.flatMap((id) => document.parts.find((part) => part.id === id) ?? []).map((part) => nameOf(document, part));
  const live = names(walk.live);
  const jobId = useParams<{ jobId?: string }>()?.jobId;
  return (
    <div className="mt-2 border-t border-hair pt-2">
      <p className="text-small text-grey">Fault walk, {walk.condition}</p>
      <ol className="mt-1 flex flex-col gap-1">
        {walk.steps.map((step, i) => (
          <li key={i}>
            <b>t = {timeText(step.t)}</b> {step.event}
            <span className="block text-grey">
              {Number(step.faultAmps.toPrecision(3))} A, case at {Math.round(step.touchVolts)} V
            </span>
          </li>
        ))}
      </ol>
      {!walk.cleared && (
        <p className="mt-1 font-bold text-red">
          No device opens: {Math.round(walk.touchVolts)} V stands at the case until somebody touches it.
        </p>
      )}
      {live.length > 0 && (
        <p className="mt-1">
          Stays live: {live.slice(0, 8).join(', ')}
          {live.length > 8 ? ` and ${live.length - 8} more` : ''}.
        </p>
      )}
      {jobId && (
        <Link
          href={rehearsalHref(jobId, walk.faults, walk.condition)}
          className="mt-1 inline-block text-ink underline underline-offset-[3px]"
        >
          Rehearse it
        </Link>
      )}
    </div>
  );
}
