'use client';

import type { Installation } from '@/diagram/document/schema';
import { shortDate } from '@/lib/shared/dates';
import type { UploadView } from '@/lib/shared/uploads';
import { Picture } from './picture';
import { altOf, showsWords } from './words';

interface ContactSheetProps {
  uploads: readonly UploadView[];
  places: Installation['places'];
  today: string;
  /** ids of pictures that lie behind a floor plan */
  plans: ReadonlySet<string>;
  onOpen(id: string): void;
}

/** All pictures of a job in small, as prints laid on the paper. */
export function ContactSheet({ uploads, places, today, plans, onOpen }: ContactSheetProps) {
  return (
    <ul className="grid grid-cols-[repeat(auto-fill,minmax(min(100%,200px),1fr))] gap-x-5 gap-y-6">
      {uploads.map((upload) => (
        <li key={upload.id}>
          <figure>
            <button
              type="button"
              data-picture={upload.id}
              aria-label={`${altOf(upload, places)}: open it large`}
              className="flex aspect-[4/3] w-full cursor-pointer items-center justify-center border border-rule bg-desk p-2 hover:border-ink"
              onClick={() => onOpen(upload.id)}
            >
              <Picture upload={upload} size="small" alt="" className="size-full object-contain" />
            </button>
            <figcaption className="mt-2">
              <span className="block break-words">{upload.caption || showsWords(upload, places)}</span>
              <span className="block text-small text-grey">
                {upload.caption && `${showsWords(upload, places)}, `}
                {upload.by.initials} {shortDate(upload.at, today)}
                {plans.has(upload.id) && ', behind a floor plan'}
              </span>
            </figcaption>
          </figure>
        </li>
      ))}
    </ul>
  );
}
