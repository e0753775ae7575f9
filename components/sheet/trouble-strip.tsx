'use client';

import { Button } from '@/components/ui/button';
import { keepAsFile } from './save-state-view';
import { useSheet, type OpenDrawing } from './use-drawing';

/** A strip below the head for what must not be overlooked: work that is refused, or a browser that keeps nothing. */
export function TroubleStrip({ drawing }: { drawing: OpenDrawing }) {
  const state = useSheet(drawing.store, (current) => current.saveState);
  const failure = useSheet(drawing.store, (current) => current.storageFailure);
  const refused = state.kind === 'kept' && state.why === 'refused' ? state : null;
  if (!failure && !refused) return null;
  return (
    <div
      role="alert"
      className="flex flex-wrap items-center gap-x-4 gap-y-2 border-b border-l-4 border-red bg-paper px-4 py-2"
    >
      <p className="min-w-0 flex-1 basis-60 font-semibold text-red">
        {refused ? `Not saved: ${refused.message} Your work is kept on this device.` : failure}
      </p>
      {refused && <Button onClick={() => drawing.keeper.retry()}>Try again</Button>}
      {refused && <Button onClick={() => void drawing.keeper.setAside()}>Set it aside and go on</Button>}
      <Button onClick={() => keepAsFile(drawing)}>Get the file</Button>
    </div>
  );
}
