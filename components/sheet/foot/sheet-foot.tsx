'use client';

import dynamic from 'next/dynamic';
import { useMemo } from 'react';
import { Button } from '@/components/ui/button';
import type { Scene } from '@/diagram/layout/scene';
import type { ActionContext } from '../actions';
import { handWords } from '../hand-words';
import { useCoarse } from '../canvas/use-coarse';
import type { MarkedNote } from '../margin/notes';
import { leaveWalk, walkShown } from '../margin/showing';
import { useSheet, type OpenDrawing } from '../use-drawing';
import { useView, useViewStore, type Mode } from '../view';
import { CoreLegend } from './core-legend';
import { Strip } from './strip';

const WalkFoot = dynamic(() => import('@/components/rehearsal/on-sheet/walk-foot'), { ssr: false });

interface FootProps {
  drawing: OpenDrawing;
  context: ActionContext;
  scene: Scene;
  /** the scene is worked out */
  drawn: boolean;
  notes: readonly MarkedNote[];
}

/** Rooms grow where they stand, as nothing moves by itself; then they may come to lie over each other. */
function roomsOverlap(scene: Scene): boolean {
  const rooms = scene.frames.filter((frame) => frame.kind === 'room').sort((a, b) => a.x - b.x);
  return rooms.some((room, i) => {
    const next = rooms[i + 1];
    return (
      next !== undefined &&
      room.x + room.width > next.x &&
      room.y < next.y + next.height &&
      next.y < room.y + room.height
    );
  });
}

interface Standing {
  mayEdit: boolean;
  /** the person may, though the sheet may be open for reading now */
  mayDraw: boolean;
  crowded: boolean;
  coarse: boolean;
}

/** What the hands may do next, in words: the foot's own line. */
function hint(mode: Mode, held: string, { mayEdit, mayDraw, crowded, coarse }: Standing): string {
  switch (mode.kind) {
    case 'extend':
      if (coarse) return 'Tap another terminal to join it, or place what comes next.';
      return 'Type to narrow, Enter to place. The ghost stands where the part would lie.';
    case 'wire':
      return 'Arrows choose where the wire ends, Enter draws it, Esc leaves.';
    case 'move':
      return `Arrows move by 2.5 mm: ${mode.dx}, ${mode.dy}. Enter leaves it there, Esc as it was.`;
    case 'tidy':
      return mode.moved === 0 ? 'All stands in its place.' : 'The dashed drawing is how it would stand.';
    case 'draft':
      return 'The dashed drawing is what the survey would draw.';
    case 'choose':
      return 'Two terminals lie close together: which one is meant?';
    default:
      if (crowded && mayEdit && !held) return 'Rooms lie over each other: tidy makes room.';
      if (held) return held;
      if (mayEdit && coarse) return 'Tap a terminal to take it; hold a part to move it; fingers pan.';
      if (mayEdit) return 'Arrows or a click take a part; e extends it.';
      return mayDraw ? 'Reading: Edit lets you draw.' : 'You may read this drawing.';
  }
}

export function SheetFoot({ drawing, context, scene, drawn, notes }: FootProps) {
  const view = useViewStore();
  const mode = useView((state) => state.mode);
  const editing = useView((state) => state.editing);
  const document = useSheet(drawing.store, (state) => state.document);
  const selection = useSheet(drawing.store, (state) => state.selection);
  const notice = useSheet(drawing.store, (state) => state.notice);
  const mayDraw = useSheet(drawing.store, (state) => state.rights.edit);
  const mayEdit = mayDraw && editing;
  const undoable = useSheet(drawing.store, (state) => state.undoSteps.at(-1)?.label);
  const { undo } = drawing.store.getState();
  const coarse = useCoarse();
  const walk = useView(walkShown);
  const crowded = useMemo(() => roomsOverlap(scene), [scene]);
  const said =
    drawn || document.parts.length === 0
      ? hint(mode, handWords(document, selection), { mayEdit, mayDraw, crowded, coarse })
      : `Drawing ${document.parts.length} parts`;
  if (walk) return <WalkFoot walk={walk} onLeave={() => leaveWalk(view)} />;
  return (
    <div className="flex h-full flex-col gap-x-4 gap-y-1 sm:flex-row">
      {scene.face === 'overview' ? <Strip scene={scene} notes={notes} /> : <CoreLegend practice={document.practice} />}
      <div className="flex min-w-0 flex-1 flex-col justify-between gap-1">
        <p className={`leading-[15px] ${notice ? 'truncate' : 'line-clamp-2'}`} title={said}>
          {said}
        </p>
        <p role="status" className="truncate text-small leading-[14px] text-grey empty:hidden" title={notice}>
          {notice}
        </p>
        <div className="flex flex-wrap gap-x-3 text-small leading-[14px] pointer-coarse:flex-nowrap pointer-coarse:gap-x-4 pointer-coarse:overflow-x-auto">
          {mayEdit && (
            <button
              type="button"
              className="min-h-6 cursor-pointer underline underline-offset-2 disabled:text-grey disabled:no-underline pointer-coarse:min-h-11"
              disabled={!undoable}
              onClick={undo}
              title={undoable}
            >
              undo
            </button>
          )}
          <FootWord className="lap:hidden" onClick={() => context.outline()}>
            outline
          </FootWord>
          <FootWord onClick={() => view.getState().setMode({ kind: 'history' })}>history</FootWord>
          <FootWord onClick={() => view.getState().setMode({ kind: 'commands' })}>commands</FootWord>
          <FootWord onClick={() => view.getState().setMode({ kind: 'find' })}>find</FootWord>
          {mayEdit && <FootWord onClick={() => context.tidy()}>tidy</FootWord>}
          <FootWord onClick={() => view.getState().setMode({ kind: 'legend' })}>legend</FootWord>
          <FootWord onClick={() => view.getState().setMode({ kind: 'export' })}>print</FootWord>
        </div>
      </div>
      {mayEdit && selection.terminal && mode.kind === 'rest' && (
        <Button className="min-h-11 self-start lap:hidden" solid onClick={() => context.hands.extend()}>
          What comes next
        </Button>
      )}
    </div>
  );
}

function FootWord({ onClick, className = '', children }: { onClick(): void; className?: string; children: string }) {
  return (
    <button
      type="button"
      className={`min-h-6 cursor-pointer underline underline-offset-2 pointer-coarse:min-h-11 ${className}`}
      onClick={onClick}
    >
      {children}
    </button>
  );
}
