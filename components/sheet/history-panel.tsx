'use client';

import { Button } from '@/components/ui/button';
import { clock } from './save-state';
import { useSheet, type OpenDrawing } from './use-drawing';

/** My own steps by name, the newest first: taken back in their order; what gave way to others can be brought back. */
export function HistoryPanel({ drawing, onLeave }: { drawing: OpenDrawing; onLeave(): void }) {
  const { store } = drawing;
  const undoSteps = useSheet(store, (state) => state.undoSteps);
  const redoSteps = useSheet(store, (state) => state.redoSteps);
  const aside = useSheet(store, (state) => state.aside);
  const { undo, redo, bringBack } = store.getState();
  const times = (count: number, step: () => void) => {
    for (let n = 0; n < count; n++) step();
  };
  return (
    <div
      role="dialog"
      aria-label="History of my steps"
      className="max-h-[60dvh] w-full overflow-y-auto border-y-2 border-ink bg-paper p-3"
      onKeyDown={(event) => event.key === 'Escape' && onLeave()}
    >
      <div className="mb-2 flex items-center gap-2">
        <h2 className="flex-1 text-head font-bold">My steps</h2>
        <Button onClick={undo} disabled={undoSteps.length === 0}>
          Take back
        </Button>
        <Button onClick={redo} disabled={redoSteps.length === 0}>
          Do again
        </Button>
        <Button onClick={onLeave} autoFocus>
          Close
        </Button>
      </div>
      <ol>
        {redoSteps.map((step, i) => (
          <li key={`again ${step.at} ${i}`} className="border-b border-hair">
            <button
              type="button"
              className="flex w-full cursor-pointer gap-3 py-1 text-left text-grey hover:underline"
              onClick={() => times(redoSteps.length - i, redo)}
            >
              <span className="w-12 shrink-0">{clock(step.at)}</span> taken back: {step.label}
            </button>
          </li>
        ))}
        {[...undoSteps].reverse().map((step, i) => (
          <li key={`done ${step.at} ${i}`} className="border-b border-hair">
            <button
              type="button"
              title="Take back this and all after it"
              className="flex w-full cursor-pointer gap-3 py-1 text-left hover:underline"
              onClick={() => times(i + 1, undo)}
            >
              <span className="w-12 shrink-0 text-grey">{clock(step.at)}</span> {step.label}
            </button>
          </li>
        ))}
      </ol>
      {undoSteps.length + redoSteps.length === 0 && <p className="text-grey">Nothing drawn in this window yet.</p>}
      {aside.length > 0 && (
        <>
          <h3 className="mt-4 mb-1 font-bold text-blue">Set aside for somebody else&apos;s change</h3>
          <ul>
            {aside.map((step, i) => (
              <li key={`${step.at} ${i}`} className="flex items-center gap-3 border-b border-hair py-1">
                <span className="w-12 shrink-0 text-grey">{clock(step.at)}</span>
                <span className="flex-1">{step.label}</span>
                <Button onClick={() => bringBack(step)}>Bring back</Button>
              </li>
            ))}
          </ul>
        </>
      )}
    </div>
  );
}
