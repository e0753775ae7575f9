'use client';

import { Button, buttonClass } from '@/components/ui/button';
import type { DocumentError } from '@/diagram/document/schema';
import { keepAsFile } from './save-state-view';
import { useSheet, type OpenDrawing } from './use-drawing';

const STRIP = 'flex flex-wrap items-center gap-x-4 gap-y-2 border-b border-l-4 border-red bg-paper px-4 py-2';

/** A strip below the head for what must not be overlooked: work that is refused, a browser that keeps nothing, a drawing that cannot be read whole. */
export function TroubleStrip({ drawing }: { drawing: OpenDrawing }) {
  const state = useSheet(drawing.store, (current) => current.saveState);
  const failure = useSheet(drawing.store, (current) => current.storageFailure);
  const problems = useSheet(drawing.store, (current) => current.problems);
  const refused = state.kind === 'kept' && state.why === 'refused' ? state : null;
  return (
    <>
      {problems.length > 0 && <NotWhole problems={problems} drawingId={drawing.store.getState().drawingId} />}
      {(failure || refused) && (
        <div role="alert" className={STRIP}>
          <p className="min-w-0 flex-1 basis-60 font-semibold text-red">
            {refused ? `Not saved: ${refused.message} Your work is kept on this device.` : failure}
          </p>
          {refused && <Button onClick={() => drawing.keeper.retry()}>Try again</Button>}
          {refused && <Button onClick={() => void drawing.keeper.setAside()}>Set it aside and go on</Button>}
          <Button onClick={() => keepAsFile(drawing)}>Get the file</Button>
        </div>
      )}
    </>
  );
}

/** What could not be read of the drawing, each by its place in the file, and the way to the file as it is stored. */
function NotWhole({ problems, drawingId }: { problems: readonly DocumentError[]; drawingId: string }) {
  return (
    <div role="alert" className={STRIP}>
      <details className="min-w-0 flex-1 basis-60">
        <summary className="cursor-pointer font-semibold text-red">
          This drawing could not be read whole: {problems.length === 1 ? '1 place' : `${problems.length} places`} of it. What
          could be read is shown, for reading; what is stored stays as it is.
        </summary>
        <ul className="mt-2 max-h-[30dvh] overflow-y-auto">
          {problems.map(({ path, message }, i) => (
            <li key={i}>
              <b>{path}</b>: {message}
            </li>
          ))}
        </ul>
      </details>
      <a className={buttonClass()} href={`/api/drawings/${drawingId}/json`} download>
        Get the file as it is stored
      </a>
    </div>
  );
}
