'use client';

import { useState, type ReactNode } from 'react';
import { Button, WordButton } from '@/components/ui/button';
import { ErrorLine } from '@/components/ui/error-line';
import { keepAsFile } from '@/components/sheet/save-state-view';
import { useSheet, type OpenDrawing } from '@/components/sheet/use-drawing';
import { partName } from '@/diagram/rehearsal/words';
import { ConditionsRow } from './conditions-row';
import { DeviceList } from './device-list';
import { HomeNow } from './home-now';
import { InHand } from './in-hand';
import { MissingValue } from './missing-value';
import { stationIn, useRehearsal, useRehearsalStore, walkIn } from './state';
import { StepsList } from './steps-list';
import { TouchPlot } from './touch-plot';

const NONE: readonly string[] = [];

interface MarginProps {
  drawing: OpenDrawing;
  /** which face is rehearsed */
  faces: ReactNode;
  onAgain(): void;
}

/** What the rehearsal shows, in words: the condition, the walk with its steps and plot, what is in hand, how the home stands. */
export function RehearsalMargin({ drawing, faces, onAgain }: MarginProps) {
  const store = useRehearsalStore();
  const document = useSheet(drawing.store, (state) => state.document);
  const answer = useRehearsal((state) => state.answer);
  const failure = useRehearsal((state) => state.failure);
  const hand = useRehearsal((state) => state.hand);
  const walk = useRehearsal(walkIn);
  const station = useRehearsal(stationIn);
  const [copied, setCopied] = useState(false);
  if (failure)
    return (
      <ErrorLine
        actions={
          <>
            <Button onClick={onAgain}>Try again</Button>
            <Button onClick={() => keepAsFile(drawing)}>Get the file</Button>
          </>
        }
      >
        This home could not be rehearsed. Nothing is lost.
        <span className="mt-1 block font-normal text-grey">{failure}</span>
      </ErrorLine>
    );
  if (document.parts.length === 0) return <p className="text-grey">Nothing is drawn yet.</p>;
  if (!answer) return <p className="text-grey">Being worked out.</p>;
  const nameOf = (id: string) => {
    const part = document.parts.find((each) => each.id === id);
    return part ? partName(document, part) : id;
  };
  const part = document.parts.find(({ id }) => id === hand);
  const figures = station?.figures ?? answer.figures;
  const outcome = answer.outcome;
  const cannot = outcome && 'cannot' in outcome ? outcome : null;
  const stops = cannot?.missing.find((each) => each.stops);
  const share = () => {
    void navigator.clipboard.writeText(window.location.href).then(
      () => setCopied(true),
      () => store.getState().set({ said: 'The browser does not let this page copy: take the address from its bar.' }),
    );
  };
  return (
    <div className="flex flex-col gap-5 max-lap:clear-both">
      <div className="flex flex-col gap-2">
        <div className="max-lap:hidden">
          <ConditionsRow />
        </div>
        {faces}
      </div>
      {cannot && (
        <section aria-label="Fault walk" className="flex flex-col gap-2">
          {stops ? (
            <MissingValue drawing={drawing} missing={stops}>
              {cannot.cannot}
            </MissingValue>
          ) : (
            <p className="border-l-2 border-red pl-[18px]">{cannot.cannot}</p>
          )}
          <Button className="self-start" onClick={() => store.getState().clearFaults()}>
            Take the fault out
          </Button>
        </section>
      )}
      {walk && (
        <>
          <StepsList walk={walk} nameOf={nameOf} />
          <TouchPlot walk={walk} name={nameOf(walk.faults.at(-1)!.at)} nominal={document.supply.voltage} />
          {walk.missing.map((missing) => (
            <MissingValue key={missing.words} drawing={drawing} missing={missing}>
              {`Left out of it for want of ${missing.words}.`}
            </MissingValue>
          ))}
        </>
      )}
      {part && <InHand document={document} part={part} answer={answer} figures={figures} />}
      {!walk && <HomeNow document={document} answer={answer} figures={figures} />}
      {!part && !walk && (
        <p className="text-grey">
          A click on a switch or device turns it; on a load it takes it in hand, and f puts a fault in there. Nothing of
          it is saved in the drawing.
        </p>
      )}
      <DeviceList document={document} answer={answer} figures={figures} opened={station?.opened ?? NONE} />
      <WordButton onClick={share}>{copied ? 'The link is copied' : 'Copy the link to this rehearsal'}</WordButton>
    </div>
  );
}
