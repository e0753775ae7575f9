'use client';

import { useRef, useState } from 'react';
import { Button, WordButton } from '@/components/ui/button';
import { ErrorLine } from '@/components/ui/error-line';
import { SelectField } from '@/components/ui/field';
import type { Installation } from '@/diagram/document/schema';
import { showsOf, showsOptions, showsWords } from './words';
import type { Pictures } from './use-pictures';

interface AddPicturesProps {
  pictures: Pictures;
  places: Installation['places'];
}

/** The margin of the sheet: adding pictures, those on their way, and the last one that was removed. */
export function AddPictures({ pictures, places }: AddPicturesProps) {
  const [shows, setShows] = useState('board');
  const input = useRef<HTMLInputElement>(null);
  const { sending, removed, trouble } = pictures;
  return (
    <div className="flex flex-col gap-6">
      {pictures.mayEdit && (
        <section className="flex flex-col gap-3" aria-label="Add photographs">
          <h2 className="text-head font-bold">Add photographs</h2>
          <SelectField
            label="They show"
            options={showsOptions(places)}
            value={shows}
            onChange={(event) => setShows(event.target.value)}
          />
          <input
            ref={input}
            type="file"
            multiple
            accept="image/jpeg,image/png,image/webp,.heic,.heif"
            aria-label="Choose photographs"
            className="sr-only"
            tabIndex={-1}
            onChange={(event) => {
              pictures.add(event.target.files ?? [], showsOf(shows));
              event.target.value = '';
            }}
          />
          <div>
            <Button solid onClick={() => input.current?.click()}>
              Choose files
            </Button>
          </div>
          <p className="text-small text-grey">
            JPEG, PNG or WebP. Stored smaller, and without the place where they were taken. Files can be dropped on the
            sheet as well.
          </p>
        </section>
      )}
      {sending.length > 0 && (
        <section aria-label="On their way">
          <ul className="flex flex-col gap-3">
            {sending.map((one) => (
              <li key={one.id} className={`border-l-2 pl-3 ${one.state === 'failed' ? 'border-red' : 'border-grey'}`}>
                <p className="font-semibold break-words">{one.name}</p>
                {one.state === 'failed' ? (
                  <>
                    <p role="alert" className="text-red">
                      {one.message}
                    </p>
                    <div className="mt-1 flex gap-4">
                      {one.again && <WordButton onClick={() => pictures.retry(one.id)}>Try again</WordButton>}
                      <WordButton onClick={() => pictures.forget(one.id)}>Leave it out</WordButton>
                    </div>
                  </>
                ) : (
                  <p role="status" className="text-grey">
                    {one.state === 'sending' ? 'Being sent' : 'Waits'}
                  </p>
                )}
              </li>
            ))}
          </ul>
        </section>
      )}
      {trouble && <ErrorLine>{trouble}</ErrorLine>}
      {removed && (
        <section role="status" className="border-l-2 border-ink pl-3">
          <p>
            Removed: {removed.caption || showsWords(removed, places)}. It can be brought back while this sheet is open.
          </p>
          <WordButton onClick={() => void pictures.change(removed.id, { removed: false })}>Bring it back</WordButton>
        </section>
      )}
    </div>
  );
}
