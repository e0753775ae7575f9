'use client';

import { useRef, useLayoutEffect, useState, type FormEvent } from 'react';
import { Button, buttonClass } from '@/components/ui/button';
import { TextField } from '@/components/ui/field';
import { saveFile } from '@/components/ui/save-file';
import type { Installation } from '@/diagram/document/schema';
import type { Scene } from '@/diagram/layout/scene';
import { PAPER_SIZES } from '@/diagram/paper/iso-sheet';
import type { ErrorAnswer } from '@/lib/shared/errors';
import type { RevisionView } from '@/lib/shared/drawings';
import type { Hands } from '../hands';
import { keepAsFile } from '../save-state-view';
import { useSheet, type OpenDrawing } from '../use-drawing';
import { importCommand, type NoDrawing } from './import-file';
import { saveBlob, svgToPng } from './picture';

const DPI = [150, 300, 600] as const;

interface ExportPanelProps {
  drawing: OpenDrawing;
  hands: Hands;
  scene: Scene;
  onLeave(): void;
}

/** Copies what is in sight to the clipboard, as it stands on the screen: for a message, not for the file. */
async function copySight(): Promise<string> {
  const element = document.querySelector<HTMLElement>('.sheet-flow');
  if (!element) return 'Nothing is in sight.';
  const { toBlob } = await import('html-to-image');
  const blob = await toBlob(element, {
    backgroundColor: getComputedStyle(document.documentElement).getPropertyValue('--paper'),
  });
  if (!blob) return 'The picture could not be made.';
  await navigator.clipboard.write([new ClipboardItem({ 'image/png': blob })]);
  return 'What is in sight lies on the clipboard.';
}

/** Print, export, import, record: always from the saved document. */
export function ExportPanel({ drawing, hands, scene, onLeave }: ExportPanelProps) {
  const saved = useSheet(drawing.store, (state) => state.saveState.kind === 'saved');
  const rights = useSheet(drawing.store, (state) => state.rights);
  const number = useSheet(drawing.store, (state) => state.titleBlock.number);
  const [dpi, setDpi] = useState<number>(300);
  const [shapes, setShapes] = useState(false);
  const [said, setSaid] = useState('');
  const [refused, setRefused] = useState<NoDrawing | null>(null);
  const [note, setNote] = useState('');
  const first = useRef<HTMLAnchorElement>(null);
  useLayoutEffect(() => first.current?.focus(), []);

  const { drawingId } = drawing.store.getState();
  const query = `face=${scene.face}${scene.place !== undefined ? `&place=${encodeURIComponent(scene.place)}` : ''}`;
  const name = `${number || 'drawing'}-${scene.face}`;
  const lettering = shapes ? '&lettering=outlines' : '';
  const url = (kind: 'pdf' | 'svg', more = '') => `/api/drawings/${drawingId}/${kind}?${query}${more}`;

  const svg = async (more = ''): Promise<string | null> => {
    const response = await fetch(url('svg', more)).catch(() => null);
    if (response?.ok) return response.text();
    setSaid('The sheet could not be fetched. Try again when the network is back.');
    return null;
  };
  const png = async () => {
    setSaid('Drawing the picture.');
    const text = await svg();
    if (!text) return;
    const picture = await svgToPng(text, dpi);
    if ('refused' in picture) setSaid(picture.refused);
    else {
      saveBlob(`${name}-${dpi}dpi.png`, picture);
      setSaid('');
    }
  };
  const read = async (file: File | undefined) => {
    if (!file) return;
    const outcome = importCommand(hands.doc, file.name, await file.text());
    setRefused('errors' in outcome ? outcome : null);
    hands.view.getState().set({ ghost: null });
    if (!('errors' in outcome) && hands.do(outcome)) {
      hands.view.getState().camera?.all();
      onLeave();
    }
  };
  const show = (readable: Installation) => {
    hands.view.getState().set({ ghost: readable });
    hands.view.getState().camera?.all();
    setSaid('Dashed on the sheet: what could be read of the file. It is gone when this is closed.');
  };
  const record = async (event: FormEvent) => {
    event.preventDefault();
    const response = await fetch(`/api/drawings/${drawingId}/revisions`, {
      method: 'POST',
      headers: { 'content-type': 'application/json' },
      body: JSON.stringify({ note }),
    }).catch(() => null);
    const body = (await response?.json().catch(() => null)) as RevisionView | ErrorAnswer | null;
    if (response?.ok && body && 'letter' in body) {
      setSaid(`Recorded as revision ${body.letter}.`);
      setNote('');
      drawing.store.setState({ titleBlock: { ...drawing.store.getState().titleBlock, revision: body.letter } });
    } else setSaid(body && 'message' in body ? body.message : 'The revision was not recorded. Try again.');
  };

  return (
    <div
      role="dialog"
      aria-label="Print, export, import, record"
      className="flex max-h-[76dvh] flex-col gap-4 overflow-y-auto border-y-2 border-ink bg-paper p-4"
      onKeyDown={(event) => {
        event.stopPropagation();
        if (event.key === 'Escape') onLeave();
      }}
    >
      <section>
        <h2 className="text-head font-bold">On paper</h2>
        {!saved && <p className="text-red">What is not saved yet is not in these files.</p>}
        <div className="mt-2 flex flex-wrap gap-2">
          {PAPER_SIZES.map((paper, i) => (
            <a
              key={paper}
              ref={i === 0 ? first : undefined}
              className={buttonClass({ solid: i === 1 })}
              href={url('pdf', `&paper=${paper}${lettering}`)}
              target="_blank"
              rel="noreferrer"
            >
              PDF {paper}
            </a>
          ))}
          <Button
            onClick={async () => {
              const text = await svg(lettering);
              if (text) saveFile(`${name}.svg`, text, 'image/svg+xml');
            }}
          >
            SVG
          </Button>
          <label className="flex min-h-11 items-center gap-2">
            <input type="checkbox" checked={shapes} onChange={(event) => setShapes(event.target.checked)} />
            text as outlines
          </label>
          <Button onClick={() => void png()}>PNG</Button>
          <label className="flex items-center gap-2">
            <span className="text-grey">dots per inch</span>
            <select
              value={dpi}
              onChange={(event) => setDpi(Number(event.target.value))}
              className="border-b border-ink bg-paper pointer-coarse:min-h-11"
            >
              {DPI.map((value) => (
                <option key={value}>{value}</option>
              ))}
            </select>
          </label>
          <Button
            onClick={() => void copySight().then(setSaid, () => setSaid('The browser does not give its clipboard.'))}
          >
            Picture of what I see
          </Button>
        </div>
      </section>
      <section>
        <h2 className="text-head font-bold">The document</h2>
        <div className="mt-2 flex flex-wrap items-center gap-2">
          <Button onClick={() => keepAsFile(drawing)}>JSON</Button>
          {hands.mayEdit && (
            <label className={`${buttonClass()} has-focus-visible:outline-2 has-focus-visible:outline-blue`}>
              Read a JSON file
              <input
                type="file"
                accept="application/json,.json"
                className="sr-only"
                onChange={(event) => void read(event.target.files?.[0])}
              />
            </label>
          )}
          <span className="text-small text-grey">One undo takes an import back.</span>
        </div>
        {refused && <Refused refused={refused} onShow={show} />}
      </section>
      {rights.record && (
        <form onSubmit={(event) => void record(event)}>
          <h2 className="text-head font-bold">Record a revision</h2>
          <div className="mt-2 flex items-end gap-2">
            <div className="flex-1">
              <TextField
                label="What this revision is"
                value={note}
                maxLength={200}
                onChange={(event) => setNote(event.target.value)}
              />
            </div>
            <Button type="submit" disabled={note.trim() === '' || !saved}>
              Record
            </Button>
          </div>
        </form>
      )}
      <div className="flex items-center gap-4">
        <Button onClick={onLeave}>Close</Button>
        <p role="status">{said}</p>
      </div>
    </div>
  );
}

/** What is wrong with a file, each fault by its place; what could be read of it may be looked at, and is not taken. */
function Refused({ refused: { errors, readable }, onShow }: { refused: NoDrawing; onShow(readable: Installation): void }) {
  return (
    <div role="alert" className="mt-2 border-l-4 border-red pl-3">
      <p className="font-bold text-red">Nothing was changed. The file is no whole drawing:</p>
      <ul>
        {errors.slice(0, 8).map((error) => (
          <li key={`${error.path} ${error.message}`}>
            <b>{error.path}</b>: {error.message}
          </li>
        ))}
      </ul>
      {errors.length > 8 && <p className="text-grey">and {errors.length - 8} more</p>}
      {readable && (
        <Button className="mt-2" onClick={() => onShow(readable)}>
          Show what could be read: {readable.parts.length} parts
        </Button>
      )}
    </div>
  );
}
