'use client';

import { useMemo } from 'react';
import { SceneInSmall } from '@/components/frame/scene-in-small';
import type { Installation } from '@/diagram/document/schema';
import { buildScene } from '@/diagram/layout/build-scene';
import { focusCell } from '@/components/grid/focus';
import type { Survey } from './use-survey';

/** Sheet 2 in small: the row in hand and its room light together; a room that is chosen puts its row in hand. */
export function RoomsInSmall({ survey, document }: { survey: Survey; document: Installation }) {
  const scene = useMemo(() => (document.parts.length > 0 ? buildScene(document, 'overview') : null), [document]);
  const wrong = new Set(survey.problems.flatMap(({ room }) => room ?? []));
  return (
    <section aria-labelledby="rooms-in-small" className="min-w-0">
      <h2 id="rooms-in-small" className="font-bold">
        What the rows become <span className="ml-3 font-normal text-grey">{scene ? 'sheet 2 in small' : ''}</span>
      </h2>
      {scene ? (
        <SceneInSmall
          scene={scene}
          inHand={survey.inHand?.room}
          wrong={wrong}
          from="BOARD"
          onPlace={(place) => focusCell(place, 'name')}
          className="mt-2 max-h-[300px] w-full"
        />
      ) : (
        <p className="mt-2 text-grey">Nothing is drawn yet. The draft draws it from these rows.</p>
      )}
    </section>
  );
}
