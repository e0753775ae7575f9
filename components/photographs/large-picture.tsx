'use client';

import { useEffect, useRef, useState, type KeyboardEvent } from 'react';
import { Button } from '@/components/ui/button';
import { SelectField, TextField } from '@/components/ui/field';
import type { Installation } from '@/diagram/document/schema';
import type { UploadView } from '@/lib/shared/uploads';
import { Picture } from './picture';
import type { Pictures } from './use-pictures';
import { altOf, showsOf, showsOptions, showsValue, showsWords } from './words';

interface LargePictureProps {
  upload: UploadView;
  pictures: Pictures;
  places: Installation['places'];
  /** "2 of 5" */
  count: string;
  /** the picture lies behind a floor plan: removing it would leave the plan bare */
  isPlan: boolean;
  /** absent where it cannot become one */
  onPlan?: () => void;
  onStep(by: number): void;
  onClose(): void;
}

/** One picture as large as the window allows, with its words. */
export function LargePicture({ upload, pictures, places, count, isPlan, onPlan, onStep, onClose }: LargePictureProps) {
  const dialog = useRef<HTMLDialogElement>(null);
  const [caption, setCaption] = useState(upload.caption);
  useEffect(() => dialog.current?.showModal(), []);
  const keep = () => {
    if (caption.trim() !== upload.caption) void pictures.change(upload.id, { caption: caption.trim() });
  };
  const onKeyDown = (event: KeyboardEvent) => {
    if ((event.target as Element).matches('input, select')) return;
    if (event.key === 'ArrowRight') onStep(1);
    else if (event.key === 'ArrowLeft') onStep(-1);
  };
  const name = upload.caption || showsWords(upload, places);
  return (
    <dialog
      ref={dialog}
      aria-label={name}
      className="m-auto max-h-[96dvh] w-[min(1200px,calc(100vw-16px))] overflow-y-auto border-2 border-ink bg-paper p-4 text-ink backdrop:bg-ink/60"
      onClose={() => {
        keep();
        onClose();
      }}
      onKeyDown={onKeyDown}
    >
      <div className="flex items-center gap-2 pb-3">
        <h2 className="min-w-0 flex-1 truncate text-head font-bold">{name}</h2>
        <span className="whitespace-nowrap text-grey max-sm:sr-only">{count}</span>
        <Button onClick={() => onStep(-1)}>Back</Button>
        <Button onClick={() => onStep(1)}>Next</Button>
        <Button onClick={() => dialog.current?.close()}>Close</Button>
      </div>
      <div
        className="max-h-[70dvh] w-full border border-rule bg-desk"
        style={{ aspectRatio: `${upload.width} / ${upload.height}` }}
      >
        <Picture upload={upload} size="large" alt={altOf(upload, places)} className="size-full object-contain" />
      </div>
      {pictures.mayEdit && (
        <div className="mt-3 flex flex-wrap items-end gap-x-6 gap-y-3">
          <div className="min-w-0 flex-1 basis-60">
            <TextField
              label="Caption"
              value={caption}
              maxLength={200}
              onChange={(event) => setCaption(event.target.value)}
              onBlur={keep}
              onKeyDown={(event) => event.key === 'Enter' && keep()}
            />
          </div>
          <div className="basis-44">
            <SelectField
              label="It shows"
              options={showsOptions(places)}
              value={showsValue(upload)}
              onChange={(event) => void pictures.change(upload.id, { place: null, ...showsOf(event.target.value) })}
            />
          </div>
          <div className="flex flex-wrap gap-2 pb-1">
            {onPlan && !isPlan && <Button onClick={onPlan}>Draw on it as a floor plan</Button>}
            <Button
              tone="red"
              disabled={isPlan}
              title={isPlan ? 'It lies behind a floor plan. Take the plan away first.' : undefined}
              onClick={async () => {
                if (await pictures.change(upload.id, { removed: true })) dialog.current?.close();
              }}
            >
              Remove
            </Button>
          </div>
          {isPlan && <p className="w-full text-small text-grey">It lies behind a floor plan; take the plan away before the picture.</p>}
          {pictures.trouble && (
            <p role="alert" className="w-full text-red">
              {pictures.trouble}
            </p>
          )}
        </div>
      )}
    </dialog>
  );
}
