'use client';

import { Button, WordButton } from '@/components/ui/button';
import { Key } from '@/components/ui/key';
import type { Fault } from '@/diagram/circuit/fault-types';
import { FAULT_NAMES } from '@/diagram/rehearsal/fault-places';
import type { Walk } from '@/diagram/rehearsal/walk';
import { timeText } from '@/diagram/rehearsal/words';
import { stationIndex, useRehearsal, useRehearsalStore } from './state';

interface StepsProps {
  walk: Walk;
  nameOf: (id: string) => string;
}

/** What a walk takes for granted, said before anybody leans on it. */
export function Assumptions({ walk }: { walk: Walk }) {
  if (walk.assumes.length === 0) return null;
  return (
    <div className="text-grey">
      <p>Taken for granted, as no drawing tells it:</p>
      <ul className="ml-4 list-disc">
        {walk.assumes.map((words) => (
          <li key={words}>{words}</li>
        ))}
      </ul>
    </div>
  );
}

/** The steps of a walk, the one in hand thick. */
export function StepsList({ walk, nameOf }: StepsProps) {
  const store = useRehearsalStore();
  const now = useRehearsal(stationIndex);
  const { step, clearFaults } = store.getState();
  const said = ({ kind, at }: Fault) => `${FAULT_NAMES[kind]} at ${nameOf(at)}`;
  return (
    <section aria-label="Fault walk" className="flex flex-col gap-3">
      <div>
        <h2 className="text-head font-bold">Fault walk: {walk.faults.map(said).join(', then ')}</h2>
        <div className="mt-1 flex flex-wrap items-center gap-x-2 gap-y-1 text-grey">
          <span>
            step {now + 1} of {walk.stations.length}
          </span>
          <Button aria-label="Step back" disabled={now === 0} onClick={() => step(now - 1)}>
            ←
          </Button>
          <Button aria-label="Step on" disabled={now === walk.stations.length - 1} onClick={() => step(now + 1)}>
            →
          </Button>
          <WordButton onClick={clearFaults}>Take the fault out</WordButton>
          <Key>Esc</Key>
        </div>
      </div>
      <Stations walk={walk} />
    </section>
  );
}

/** The stations of a walk as a list to step by, what they come to, and what they rest on. */
export function Stations({ walk }: { walk: Walk }) {
  const store = useRehearsalStore();
  const now = useRehearsal(stationIndex);
  const { step } = store.getState();
  return (
    <>
      <ol className="flex flex-col gap-3">
        {walk.stations.map((station, i) => {
          const inHand = i === now;
          return (
            <li key={i}>
              <button
                type="button"
                aria-current={inHand ? 'step' : undefined}
                className={`block w-full cursor-pointer py-[2px] text-left hover:bg-row pointer-coarse:min-h-11 ${inHand ? 'border-l-4 border-red pl-4' : 'border-l border-rule pl-[19px]'}`}
                onClick={() => step(i)}
              >
                <span className={`block text-head font-bold ${inHand ? 'text-red' : ''}`}>
                  <span className="mr-2">{i + 1}</span>
                  {station.t !== null && station.kind !== 'still' && station.kind !== 'holds' && (
                    <span className="mr-2 whitespace-nowrap">t = {timeText(station.t)}</span>
                  )}
                  {station.heading}
                </span>
                <span className="block">{station.text}</span>
              </button>
            </li>
          );
        })}
      </ol>
      {walk.remark && <p>{walk.remark}</p>}
      <Assumptions walk={walk} />
    </>
  );
}
