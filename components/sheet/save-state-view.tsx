'use client';

import { saveFile } from '@/components/ui/save-file';
import { WordButton } from '@/components/ui/button';
import { PresenceView } from './presence-view';
import { saveWords } from './save-state';
import { useSheet, type OpenDrawing } from './use-drawing';

/** Hands the drawing over as a file, whatever the network and the browser's storage do. */
export function keepAsFile({ store }: OpenDrawing): void {
  const { document, titleBlock } = store.getState();
  saveFile(`${titleBlock.number || 'drawing'}.json`, `${JSON.stringify(document, null, 2)}\n`, 'application/json');
}

/** "Saved 14:02", at the upper right of every sheet of a job. */
export function SaveStateView({ drawing }: { drawing: OpenDrawing }) {
  const state = useSheet(drawing.store, (current) => current.saveState);
  const calm = state.kind === 'saved' || state.kind === 'saving';
  return (
    <span className="flex flex-wrap items-baseline justify-end gap-x-3">
      <PresenceView drawing={drawing} />
      <span role="status" className={calm ? '' : 'font-bold text-red'}>
        {saveWords(state)}
      </span>
      {state.kind === 'kept' && state.why !== 'signed-out' && (
        <WordButton onClick={() => drawing.keeper.retry()}>Try again</WordButton>
      )}
      {state.kind === 'kept' && state.why === 'signed-out' && (
        <a className="text-ink underline underline-offset-[3px]" href="/signin" target="_blank" rel="noreferrer">
          Sign in again
        </a>
      )}
      {state.kind === 'unkept' && <WordButton onClick={() => keepAsFile(drawing)}>Get the file</WordButton>}
    </span>
  );
}
