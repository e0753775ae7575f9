'use client';

import { useEffect, useRef } from 'react';
import { nameOf } from '@/diagram/document/names';
import type { Scene } from '@/diagram/layout/scene';
import type { ActionContext } from './actions';
import { endPoint } from './canvas/pick';
import { useCoarse } from './canvas/use-coarse';
import { ChoosePanel } from './choose-panel';
import { DraftPanel } from './draft-panel';
import { EditPanel } from './edit-panel';
import { SlipPanel } from './extend/slip';
import { SlipFoot } from './extend/slip-foot';
import type { Slip } from './extend/use-slip';
import { AtFoot, Floating, type Box } from './floating';
import { ExportPanel } from './foot/export-panel';
import { LegendPanel } from './foot/legend-panel';
import { HistoryPanel } from './history-panel';
import type { MarkedNote } from './margin/notes';
import { RoomPanel } from './room-panel';
import { CommandList, FindList, WayList } from './sheet-lists';
import { TidyPanel } from './tidy/tidy-panel';
import { useSheet, type OpenDrawing } from './use-drawing';
import { useView } from './view';

interface PanelsProps {
  box: Box;
  drawing: OpenDrawing;
  context: ActionContext;
  scene: Scene;
  notes: readonly MarkedNote[];
  slip: Slip | null;
  onNote(note: MarkedNote): void;
  /** closes what is open and gives the focus back to the sheet */
  close(): void;
  focusSheet(): void;
}

/** px: below this the slip is the foot of the screen */
const NARROW = 760;

/** What comes next: beside its terminal, or as the foot of a screen that is touched or narrow. */
function SlipOnSheet({ box, drawing, scene, slip, focusSheet }: PanelsProps & { slip: Slip }) {
  const camera = useView((state) => state.camera);
  const document = useSheet(drawing.store, (state) => state.document);
  const foot = useRef<HTMLDivElement>(null);
  const coarse = useCoarse();
  // Opened from the outline it is typed into, whatever room the outline leaves to the canvas.
  const typed = useView((state) => state.outline.hand);
  const low = !typed && (coarse || box.width < NARROW);
  const at = endPoint(scene, slip.end);
  const place = `${at?.x} ${at?.y}`;
  useEffect(() => {
    // The terminal in hand stays in sight above the foot.
    if (low && at) camera?.clear(at, foot.current?.clientHeight ?? 0);
    // eslint-disable-next-line react-hooks/exhaustive-deps -- `place` stands for the point, which is a new one each time
  }, [low, camera, place]);
  const part = document.parts.find((candidate) => candidate.id === slip.end[0]);
  if (!part) return null;
  const name = `${nameOf(document, part)}:${slip.end[1]}`;
  if (low)
    return (
      <AtFoot>
        <div ref={foot}>
          <SlipFoot slip={slip} name={name} onLeave={focusSheet} />
        </div>
      </AtFoot>
    );
  return (
    <Floating box={box} at={at && camera ? camera.onScreen(at) : undefined} width={440}>
      <SlipPanel slip={slip} name={name} onLeave={focusSheet} />
    </Floating>
  );
}

/** What lies open on the sheet: one thing at a time. */
export function Panels(props: PanelsProps) {
  const { box, drawing, context, scene, notes, slip, onNote, close, focusSheet } = props;
  const { hands } = context;
  const mode = useView((state) => state.mode);
  const camera = useView((state) => state.camera);
  const practice = useSheet(drawing.store, (state) => state.document.practice);
  switch (mode.kind) {
    case 'extend':
      return slip && <SlipOnSheet {...props} slip={slip} />;
    case 'edit':
      return (
        <Floating box={box} at={camera?.onScreen(mode.at)} width={224}>
          <EditPanel key={mode.part ?? mode.cable} mode={mode} hands={hands} onDone={focusSheet} />
        </Floating>
      );
    case 'choose':
      return (
        <Floating box={box} at={camera?.onScreen(mode.at)} width={280}>
          <ChoosePanel mode={mode} hands={hands} onLeave={close} />
        </Floating>
      );
    case 'room':
      return (
        <Floating box={box} width={360}>
          <RoomPanel mode={mode} hands={hands} onLeave={close} />
        </Floating>
      );
    case 'commands':
      return (
        <Floating box={box} width={520}>
          <CommandList context={context} onLeave={close} />
        </Floating>
      );
    case 'find':
      return (
        <Floating box={box} width={480}>
          <FindList context={context} notes={notes} onLeave={close} onNote={onNote} />
        </Floating>
      );
    case 'load':
      return (
        <Floating box={box} width={480}>
          <WayList context={context} mode={mode} onLeave={close} />
        </Floating>
      );
    case 'history':
      return (
        <Floating box={box} width={480}>
          <HistoryPanel drawing={drawing} onLeave={close} />
        </Floating>
      );
    case 'export':
      return (
        <Floating box={box} width={520}>
          <ExportPanel drawing={drawing} hands={hands} scene={scene} onLeave={close} />
        </Floating>
      );
    case 'legend':
      return (
        <Floating box={box} width={680}>
          <LegendPanel scene={scene} practice={practice} onLeave={close} />
        </Floating>
      );
    case 'draft':
      return (
        <Floating box={box} width={360}>
          <DraftPanel mode={mode} hands={hands} onLeave={close} />
        </Floating>
      );
    case 'tidy':
      return (
        <Floating box={box} width={360}>
          <TidyPanel mode={mode} hands={hands} tidy={context.tidy} onLeave={close} />
        </Floating>
      );
    default:
      return null;
  }
}
