'use client';

import { useEffect, useState, type RefObject } from 'react';
import type { End } from '@/diagram/document/schema';
import type { ConnectionPage } from '@/diagram/layout/connections-scene';
import type { Scene } from '@/diagram/layout/scene';
import { useSingleKeys } from '@/components/frame/single-keys';
import type { ActionContext } from './actions';
import { Canvas } from './canvas/canvas';
import { GuidesLayer } from './canvas/guides-layer';
import { LocksLayer } from './canvas/locks-layer';
import { useBox } from './floating';
import type { Slip } from './extend/use-slip';
import { handWords } from './hand-words';
import { Leader } from './margin/leader';
import type { MarkedNote } from './margin/notes';
import { Panels } from './panels';
import { StartPanel } from './start-panel';
import { useSheet, type OpenDrawing } from './use-drawing';
import { useKeyboard } from './use-keyboard';
import { REST, useView, useViewStore } from './view';
import { WalkOnSheet } from './walk-on-sheet';

interface SurfaceProps {
  sheet: RefObject<HTMLDivElement | null>;
  drawing: OpenDrawing;
  context: ActionContext;
  scene: Scene;
  /** the scene is worked out: in the browser, a moment after the paper */
  drawn: boolean;
  ghost: Scene | null;
  notes: readonly MarkedNote[];
  slip: Slip | null;
  pages: readonly ConnectionPage[];
  place: string | null;
  onNote(note: MarkedNote): void;
  focusSheet(): void;
}

const NONE: readonly End[] = [];

/** The sheet itself: the canvas, what lies open on it, and the keys. One tab stop. */
export function SheetSurface(props: SurfaceProps) {
  const { sheet, drawing, context, scene, drawn, ghost, notes, slip, pages, place, onNote, focusSheet } = props;
  const { hands } = context;
  const view = useViewStore();
  const mode = useView((state) => state.mode);
  const editing = useView((state) => state.editing);
  const document = useSheet(drawing.store, (state) => state.document);
  const selection = useSheet(drawing.store, (state) => state.selection);
  const mayEdit = useSheet(drawing.store, (state) => state.rights.edit) && editing;
  const onKeyDown = useKeyboard(context);
  const candidates = mode.kind === 'wire' ? hands.candidates(mode.from) : NONE;
  const target = mode.kind === 'wire' ? (candidates[mode.index] ?? null) : null;
  const [ready, setReady] = useState(false);
  const box = useBox(sheet);
  const empty = document.parts.length === 0;

  // The first paint comes from the server and hears no key yet; then what was left unsent on this device is found.
  useEffect(() => {
    void drawing.keeper.ready.then(() => setReady(true));
  }, [drawing]);

  // Keys of the sheet act from anywhere but fields: the page opens with the focus nowhere.
  useSingleKeys({ '/': () => view.getState().setMode({ kind: 'find' }) });

  const close = () => {
    view.getState().setMode(REST);
    focusSheet();
  };
  return (
    <div
      ref={sheet}
      role="application"
      aria-roledescription="drawing"
      aria-label={`${scene.face === 'overview' ? 'Overview' : 'Connections'} of ${document.title}. Arrows follow the conductors, question mark lists the keys.`}
      aria-busy={!ready}
      tabIndex={0}
      className="absolute inset-0 outline-offset-[-2px]"
      onKeyDown={onKeyDown}
      onFocus={(event) => event.target === sheet.current && context.toSheet()}
      onPaste={(event) => {
        if (event.target !== sheet.current) return;
        event.preventDefault();
        void hands.clipboard.paste(event.clipboardData.getData('text/plain'));
      }}
      onPointerDown={(event) => {
        // A panel that was opened from the outline gives the hands back to it; the canvas itself takes them over.
        if (!(event.target as Element).closest('[role=dialog]')) context.toSheet();
      }}
    >
      <p className="sr-only" aria-live="polite">
        {handWords(document, selection)}
      </p>
      {empty && !ghost && scene.face === 'overview' ? (
        <StartPanel jobId={drawing.store.getState().jobId} hands={hands} mayEdit={mayEdit} />
      ) : (
        drawn && (
          <div aria-hidden="true" className="absolute inset-0">
            <Canvas scene={scene} ghost={ghost} notes={notes} hands={hands} candidates={candidates} target={target} />
          </div>
        )
      )}
      {empty && scene.face === 'connections' && (
        <p className="absolute top-4 left-4">Nothing is drawn yet. The overview is where a drawing begins.</p>
      )}
      {pages.length > 1 && (
        <nav
          aria-label="Pages by place"
          className="absolute top-2 left-2 z-[6] flex max-w-[calc(100%-16px)] gap-1 overflow-x-auto bg-paper lap:flex-wrap"
        >
          {pages.map((candidate) => (
            <button
              key={candidate.place}
              type="button"
              aria-current={candidate.place === place ? 'page' : undefined}
              className="shrink-0 cursor-pointer border border-rule px-2 py-[2px] text-small aria-[current]:border-ink aria-[current]:font-bold pointer-coarse:min-h-11"
              onClick={() => view.getState().set({ place: candidate.place })}
            >
              {candidate.name}
            </button>
          ))}
        </nav>
      )}
      <GuidesLayer scene={scene} drawing={drawing} />
      <LocksLayer scene={scene} drawing={drawing} />
      <WalkOnSheet drawing={drawing} scene={scene} />
      <Leader box={sheet} scene={scene} notes={notes} />
      <Panels
        box={box}
        drawing={drawing}
        context={context}
        scene={scene}
        notes={notes}
        slip={slip}
        onNote={onNote}
        close={close}
        focusSheet={focusSheet}
      />
    </div>
  );
}
