'use client';

import { useRouter } from 'next/navigation';
import { useCallback, useEffect, useMemo, useRef, useState } from 'react';
import { ReactFlowProvider } from 'reactflow';
import { SheetFrame } from '@/components/frame/sheet-frame';
import { jobTabs } from '@/components/frame/tabs';
import { Button } from '@/components/ui/button';
import type { Face, Installation } from '@/diagram/document/schema';
import { connectionPages } from '@/diagram/layout/connections-scene';
import type { Scene } from '@/diagram/layout/scene';
import type { Finding } from '@/diagram/rules/types';
import { findWays } from '@/diagram/terminals/ways';
import type { DrawingView } from '@/lib/shared/drawings';
import { FindingsVoice } from '@/components/outline/findings-voice';
import { OutlinePane } from '@/components/outline/outline-pane';
import { useTwoHands } from '@/components/outline/use-two-hands';
import { KEYS_HELP, type ActionContext } from './actions';
import { middle } from './canvas/pick';
import { useSlip } from './extend/use-slip';
import { SheetFoot } from './foot/sheet-foot';
import { notesOf, type MarkedNote } from './margin/notes';
import { SheetMargin } from './margin/sheet-margin';
import { useExamination } from './margin/use-examination';
import { SaveStateView } from './save-state-view';
import { useDrawn } from './scene/use-drawn';
import { SheetSurface } from './surface';
import { useTidy } from './tidy/use-tidy';
import { useDraftPreview } from './use-draft-preview';
import { TroubleStrip } from './trouble-strip';
import { useDrawing, useSheet, type Me } from './use-drawing';
import { useHands } from './use-hands';
import { createView, useView, useViewStore, ViewProvider } from './view';

interface SheetProps {
  view: DrawingView;
  /** the face of the view's document as its scene in JSON; null: it is worked out here */
  drawn: string | null;
  me: Me;
  face: Face;
  /** page of the connections face that the address asks for */
  place?: string | null;
  /** h on battery that the job asks for */
  hoursWanted: number;
  /** the survey asks to see its draft on the sheet before it is drawn */
  preview?: boolean;
}

const NO_FINDINGS: readonly Finding[] = [];

const NO_SCENE: Omit<Scene, 'face'> = {
  width: 1,
  height: 1,
  bands: [],
  frames: [],
  parts: [],
  runs: [],
  rings: [],
  dots: [],
  texts: [],
};
const UNDRAWN: Record<Face, Scene> = {
  overview: { ...NO_SCENE, face: 'overview' },
  connections: { ...NO_SCENE, face: 'connections' },
};

const stillLive = (document: Installation): string | undefined => {
  const inverter = document.parts.find((part) => part.kind === 'inverter');
  const main = document.parts.find((part) => part.kind === 'isolator');
  return inverter && main
    ? `Live from ${inverter.ref ?? 'the inverter'} when ${main.ref ?? 'the main switch'} is off.`
    : undefined;
};

function SheetOnView({ view, drawn: first, me, face, hoursWanted, preview = false }: SheetProps) {
  const router = useRouter();
  const drawing = useDrawing(view, me);
  const { store } = drawing;
  const viewStore = useViewStore();
  const document = useSheet(store, (state) => state.document);
  const rights = useSheet(store, (state) => state.rights);
  const titleBlock = useSheet(store, (state) => state.titleBlock);
  const ghostDocument = useView((state) => state.ghost);
  const condition = useView((state) => state.condition);
  const severities = useView((state) => state.severities);
  const room = useView((state) => state.room);
  const wantedPlace = useView((state) => state.place);
  const editing = useView((state) => state.editing);
  const sheet = useRef<HTMLDivElement>(null);
  const twoHands = useTwoHands(viewStore, sheet);
  const [help, setHelp] = useState(false);
  const { back: focusSheet, toSheet, openOutline } = twoHands;

  const pages = useMemo(() => (face === 'connections' ? connectionPages(document) : []), [document, face]);
  const page = pages.find((candidate) => candidate.place === wantedPlace) ?? pages[0] ?? null;
  const place = face === 'connections' ? (page?.place ?? null) : null;
  const drawn = useDrawn({ document, ghost: ghostDocument, face, place }, { scene: first, of: view.document });
  const scene = drawn.scene ?? UNDRAWN[face];
  const hands = useHands(store, viewStore, scene, drawn.of);
  // The drawing is shown first, then examined: the two would share the machine's time.
  const examined = useExamination(drawn.scene && document);
  const ghostExamined = useExamination(ghostDocument);
  const slip = useSlip(hands, hoursWanted, examined.examination);
  const notes = useMemo(
    () => notesOf(examined.examination?.findings ?? [], document, scene, { condition, severities, room }),
    [examined.examination, document, scene, condition, severities, room],
  );

  const takeNote = useCallback(
    (note: MarkedNote) => {
      viewStore.getState().set({ finding: note.key });
      store.getState().select({ parts: note.parts.slice(0, 1), wires: note.finding.wires, terminal: null });
      store.getState().say(`${note.letter}: ${note.finding.heading}`);
    },
    [viewStore, store],
  );

  const tidy = useTidy(hands, face);
  useDraftPreview(drawing, hands, preview, hoursWanted);
  const context = useMemo<ActionContext>(
    () => ({
      hands,
      tidy,
      toSheet,
      outline: openOutline,
      keys: () => setHelp(true),
      otherFace() {
        const id = store.getState().selection.parts[0];
        const at = hands.doc.parts.find((part) => part.id === id)?.place;
        const other = face === 'overview' ? `connections${at ? `?place=${encodeURIComponent(at)}` : ''}` : 'overview';
        router.push(`/jobs/${view.jobId}/${other}`);
      },
      schedule() {
        const id = store.getState().selection.parts[0];
        const way = id === undefined ? undefined : findWays(hands.doc).find(({ parts }) => parts.includes(id));
        router.push(`/jobs/${view.jobId}/schedules${way ? `?way=${encodeURIComponent(way.device)}` : ''}`);
      },
      nextNote(step) {
        if (notes.length === 0) return store.getState().say('No finding.');
        const index = notes.findIndex((note) => note.key === viewStore.getState().finding);
        const next = index < 0 ? (step > 0 ? 0 : notes.length - 1) : (index + step + notes.length) % notes.length;
        takeNote(notes[next]!);
      },
      page(step) {
        if (face === 'overview') {
          const rooms = scene.frames.filter((frame) => frame.kind === 'room').sort((a, b) => a.x - b.x);
          const held = rooms.findIndex((room) => room.place !== undefined && room.place === viewStore.getState().place);
          const room = rooms[Math.max(0, Math.min(rooms.length - 1, held + step))];
          if (!room) return;
          viewStore.getState().set({ place: room.place ?? null });
          viewStore.getState().camera?.across(room.x + room.width / 2);
        } else {
          const index = pages.findIndex((candidate) => candidate.place === place);
          const next = pages[(index + step + pages.length) % Math.max(1, pages.length)];
          if (next) viewStore.getState().set({ place: next.place });
        }
      },
    }),
    [hands, tidy, toSheet, openOutline, store, face, router, view.jobId, notes, viewStore, takeNote, scene, pages, place],
  );

  const held = useSheet(store, (state) => (state.selection.parts.length === 1 ? state.selection.parts[0] : undefined));
  const camera = useView((state) => state.camera);
  const heldPart = scene.parts.find((part) => part.id === held);
  useEffect(() => {
    // What is taken in hand, by whatever way, is in sight.
    if (heldPart) camera?.show(middle(heldPart));
  }, [camera, heldPart]);

  useEffect(() => {
    // Phones open for reading, so that a thumb moves nothing.
    if (matchMedia('(max-width: 640px)').matches) viewStore.getState().set({ editing: false });
  }, [viewStore]);

  const open = examined.examination?.findings.filter((finding) => !finding.silenced).length ?? 0;
  const { undo, redo } = store.getState();
  return (
    <SheetFrame
      tabs={jobTabs(view.jobId)}
      current={face}
      who={me.initials}
      kind={face === 'overview' ? 'Overview, single line' : `Connections, ${page?.name ?? 'no place yet'}`}
      saveState={<SaveStateView drawing={drawing} />}
      titleBlock={titleBlock}
      practice={{ id: document.practice, supply: document.supply }}
      stillLive={stillLive(document)}
      fit="screen"
      keys={KEYS_HELP}
      help={{ open: help, set: setHelp }}
      skip={{ label: 'To the outline: the drawing as a tree', word: 'outline o', go: openOutline }}
      strip={<TroubleStrip drawing={drawing} />}
      marginLabel={open === 1 ? '1 finding' : `${open} findings`}
      margin={
        <SheetMargin
          drawing={drawing}
          hands={hands}
          examined={examined}
          ghostExamined={ghostDocument ? ghostExamined.examination : undefined}
          notes={notes}
          me={me}
          rights={rights}
          terminals={face === 'connections' && page ? page : null}
          onTake={takeNote}
        />
      }
      tools={
        rights.edit && (
          <>
            <Button className={`min-h-11 ${editing ? '' : 'max-sm:hidden'}`} onClick={undo}>
              Undo
            </Button>
            <Button className="min-h-11 max-sm:hidden" onClick={redo}>
              Redo
            </Button>
            <Button
              className="min-h-11"
              solid={editing}
              aria-pressed={editing}
              onClick={() => viewStore.getState().set({ editing: !editing })}
            >
              Edit
            </Button>
          </>
        )
      }
      foot={<SheetFoot drawing={drawing} context={context} scene={scene} drawn={drawn.scene !== null} notes={notes} />}
    >
      <h1 className="sr-only">
        {face === 'overview' ? 'Overview' : `Connections, ${page?.name ?? 'no place yet'}`}: {titleBlock.title}
      </h1>
      <FindingsVoice examination={examined.examination} />
      <div className="absolute inset-0 flex">
        {twoHands.shown && (
          <OutlinePane
            context={context}
            findings={examined.examination?.findings ?? NO_FINDINGS}
            onReady={twoHands.ready}
            onClose={twoHands.closeOutline}
          />
        )}
        <div className="relative min-w-0 flex-1">
          <SheetSurface
            sheet={sheet}
            drawing={drawing}
            context={context}
            scene={scene}
            drawn={drawn.scene !== null}
            ghost={drawn.ghost}
            notes={notes}
            slip={slip}
            pages={pages}
            place={place}
            onNote={takeNote}
            focusSheet={focusSheet}
          />
        </div>
      </div>
    </SheetFrame>
  );
}

/** The drawing editor: one face of the drawing, with its margin and foot. */
export function Sheet(props: SheetProps) {
  const [view] = useState(() => createView(props.face, props.place ?? null));
  return (
    <ViewProvider value={view}>
      <ReactFlowProvider>
        <SheetOnView {...props} />
      </ReactFlowProvider>
    </ViewProvider>
  );
}
