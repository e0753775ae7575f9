'use client';

import { useRouter } from 'next/navigation';
import { useState } from 'react';
import { SheetFrame } from '@/components/frame/sheet-frame';
import { jobTabs } from '@/components/frame/tabs';
import type { KeyHelp } from '@/components/frame/types';
import { newUuid } from '@/components/sheet/identity';
import { SaveStateView } from '@/components/sheet/save-state-view';
import { TroubleStrip } from '@/components/sheet/trouble-strip';
import { useDrawing, useSheet, type Me } from '@/components/sheet/use-drawing';
import { addPlan, freeStorey, planSize } from '@/diagram/commands/floor-plan';
import type { DrawingView } from '@/lib/shared/drawings';
import type { UploadList, UploadView } from '@/lib/shared/uploads';
import { AddPictures } from './add-pictures';
import { ContactSheet } from './contact-sheet';
import { LargePicture } from './large-picture';
import { usePictures } from './use-pictures';

interface PhotographsSheetProps {
  view: DrawingView;
  me: Me;
  list: UploadList;
  today: string;
}

const KEYS: readonly KeyHelp[] = [
  { keys: ['Enter'], does: 'the photograph in hand, large' },
  { keys: ['←', '→'], does: 'the one before, the next' },
  { keys: ['Esc'], does: 'back to the sheet' },
];

/** The photographs of a job: board, meter, rooms, and the pictures that serve as floor plans. */
export function PhotographsSheet({ view, me, list, today }: PhotographsSheetProps) {
  const router = useRouter();
  const drawing = useDrawing(view, me);
  const { store } = drawing;
  const document = useSheet(store, (state) => state.document);
  const rights = useSheet(store, (state) => state.rights);
  const titleBlock = useSheet(store, (state) => state.titleBlock);
  const pictures = usePictures(view.jobId, list);
  const [inHand, setInHand] = useState<string | null>(null);
  const { uploads } = pictures;
  const index = uploads.findIndex(({ id }) => id === inHand);
  const open = uploads[index];
  const plans = new Set((document.plans ?? []).map(({ picture }) => picture));
  const count = uploads.length === 1 ? '1 photograph' : `${uploads.length} photographs`;

  const makePlan = ({ id, width, height }: UploadView) => {
    const doc = store.getState().document;
    const plan = { id: newUuid(), name: freeStorey(doc), picture: id, ...planSize(width, height) };
    const { label, patch } = addPlan(doc, plan);
    if (store.getState().run(label, patch)) router.push(`/jobs/${view.jobId}/plan?storey=${plan.id}`);
  };

  return (
    <SheetFrame
      tabs={jobTabs(view.jobId)}
      current="photographs"
      who={me.initials}
      kind="Photographs"
      saveState={<SaveStateView drawing={drawing} />}
      titleBlock={titleBlock}
      practice={{ id: document.practice, supply: document.supply }}
      keys={KEYS}
      strip={<TroubleStrip drawing={drawing} />}
      marginLabel={pictures.mayEdit ? 'Add photographs' : count}
      margin={<AddPictures pictures={pictures} places={document.places} />}
      foot={<p className="text-grey">{count}</p>}
    >
      <div
        className="min-h-full px-4 py-4 lap:px-6"
        onDragOver={(event) => pictures.mayEdit && event.preventDefault()}
        onDrop={(event) => {
          event.preventDefault();
          if (pictures.mayEdit) pictures.add(event.dataTransfer.files, { subject: 'other' });
        }}
      >
        <h1 className="mb-4 text-title font-bold">Photographs</h1>
        {uploads.length === 0 ? (
          <p className="max-w-[60ch]">
            No photograph yet.{' '}
            {pictures.mayEdit
              ? 'The board with its cover off, the meter and each room answer most questions that come up at the desk.'
              : 'Whoever draws this job can add some.'}
          </p>
        ) : (
          <ContactSheet
            uploads={uploads}
            places={document.places}
            today={today}
            plans={plans}
            onOpen={setInHand}
          />
        )}
      </div>
      {open && (
        <LargePicture
          key={open.id}
          upload={open}
          pictures={pictures}
          places={document.places}
          count={`${index + 1} of ${uploads.length}`}
          isPlan={plans.has(open.id)}
          onPlan={rights.edit ? () => makePlan(open) : undefined}
          onStep={(by) => setInHand(uploads[(index + by + uploads.length) % uploads.length]!.id)}
          onClose={() => setInHand((now) => (now === open.id ? null : now))}
        />
      )}
    </SheetFrame>
  );
}
