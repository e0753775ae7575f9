'use client';

import { useEffect, useLayoutEffect, useState, type ReactNode, type RefObject } from 'react';
import type { End } from '@/diagram/document/schema';
import { nameOf } from '@/diagram/document/names';
import type { ConnectionPage } from '@/diagram/layout/connections-scene';
import type { Point, Scene } from '@/diagram/layout/scene';
import { useSingleKeys } from '@/components/frame/single-keys';
import type { ActionContext } from './actions';
import { Canvas } from './canvas/canvas';
import { endPoint } from './canvas/pick';
import { EditPanel } from './edit-panel';
import { SlipPanel } from './extend/slip';
import type { Slip } from './extend/use-slip';
import { ExportPanel } from './foot/export-panel';
import { handWords } from './hand-words';
import { HistoryPanel } from './history-panel';
import { Leader } from './margin/leader';
import type { MarkedNote } from './margin/notes';
import { CommandList, FindList, WayList } from './sheet-lists';
import { RoomPanel } from './room-panel';
import { StartPanel } from './start-panel';
import { TidyPanel } from './tidy/tidy-panel';
import { useSheet, type OpenDrawing } from './use-drawing';
import { useKeyboard } from './use-keyboard';
import { REST, useView, useViewStore } from './view';

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
/** px: below this the slip is the foot of the screen */
const NARROW = 760;
const SLIP = 440;

/** Where a panel of this width stands so that the point it speaks of stays in sight. */
function beside(
  at: Point | undefined,
  box: { width: number; height: number },
  width: number,
): { left: number; top: number } {
  if (!at) return { left: Math.max(8, box.width - width - 12), top: 12 };
  const right = at.x + 48 + width <= box.width;
  const left = right ? Math.max(8, at.x + 48) : Math.max(8, at.x - 48 - width);
  return { left, top: Math.max(12, Math.min(box.height - 320, at.y - 40)) };
}

interface FloatingProps {
  box: { width: number; height: number };
  at?: Point | undefined;
  width: number;
  children: ReactNode;
}

/** A panel that lies on the sheet, beside the point it speaks of; a wide one is the foot of a narrow screen. */
function Floating({ box, at, width, children }: FloatingProps) {
  if (box.width < NARROW && width === SLIP)
    return (
      <div className="absolute inset-x-0 bottom-0 z-10 max-h-[70%] overflow-y-auto border-t-2 border-ink bg-paper">
        {children}
      </div>
    );
  const fits = Math.min(width, Math.max(200, box.width - 16));
  return (
    <div className="absolute z-10" style={{ ...beside(at, box, fits), width: fits }}>
      {children}
    </div>
  );
}

/** The size of the sheet on the screen, in px. */
function useBox(sheet: RefObject<HTMLDivElement | null>): { width: number; height: number } {
  const [box, setBox] = useState({ width: 0, height: 0 });
  useLayoutEffect(() => {
    const element = sheet.current;
    if (!element) return;
    const observer = new ResizeObserver(() => setBox({ width: element.clientWidth, height: element.clientHeight }));
    observer.observe(element);
    return () => observer.disconnect();
  }, [sheet]);
  return box;
}

/** The sheet itself: the canvas, what lies open on it, and the keys. One tab stop. */
export function SheetSurface(props: SurfaceProps) {
  const { sheet, drawing, context, scene, drawn, ghost, notes, slip, pages, place, onNote, focusSheet } = props;
  const { hands } = context;
  const view = useViewStore();
  const mode = useView((state) => state.mode);
  const camera = useView((state) => state.camera);
  const editing = useView((state) => state.editing);
  const document = useSheet(drawing.store, (state) => state.document);
  const selection = useSheet(drawing.store, (state) => state.selection);
  const mayEdit = useSheet(drawing.store, (state) => state.rights.edit) && editing;
  const onKeyDown = useKeyboard(context);
  const candidates = mode.kind === 'wire' ? hands.candidates(mode.from) : NONE;
  const target = mode.kind === 'wire' ? (candidates[mode.index] ?? null) : null;
  const slipAt = slip ? endPoint(scene, slip.end) : null;
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
  const part = slip && document.parts.find((candidate) => candidate.id === slip.end[0]);
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
      {empty && scene.face === 'overview' ? (
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
      <Leader box={sheet} scene={scene} notes={notes} />
      {slip && part && (
        <Floating box={box} at={slipAt && camera ? camera.onScreen(slipAt) : undefined} width={SLIP}>
          <SlipPanel slip={slip} name={`${nameOf(document, part)}:${slip.end[1]}`} onLeave={focusSheet} />
        </Floating>
      )}
      {mode.kind === 'edit' && (
        <Floating box={box} at={camera?.onScreen(mode.at)} width={224}>
          <EditPanel key={mode.part ?? mode.cable} mode={mode} hands={hands} onDone={focusSheet} />
        </Floating>
      )}
      {mode.kind === 'room' && (
        <Floating box={box} width={360}>
          <RoomPanel mode={mode} hands={hands} onLeave={close} />
        </Floating>
      )}
      {mode.kind === 'commands' && (
        <Floating box={box} width={520}>
          <CommandList context={context} onLeave={close} />
        </Floating>
      )}
      {mode.kind === 'find' && (
        <Floating box={box} width={480}>
          <FindList context={context} notes={notes} onLeave={close} onNote={onNote} />
        </Floating>
      )}
      {mode.kind === 'load' && (
        <Floating box={box} width={480}>
          <WayList context={context} mode={mode} onLeave={close} />
        </Floating>
      )}
      {mode.kind === 'history' && (
        <Floating box={box} width={480}>
          <HistoryPanel drawing={drawing} onLeave={close} />
        </Floating>
      )}
      {mode.kind === 'export' && (
        <Floating box={box} width={520}>
          <ExportPanel drawing={drawing} hands={hands} scene={scene} onLeave={close} />
        </Floating>
      )}
      {mode.kind === 'tidy' && (
        <Floating box={box} width={360}>
          <TidyPanel mode={mode} hands={hands} tidy={context.tidy} onLeave={close} />
        </Floating>
      )}
    </div>
  );
}
