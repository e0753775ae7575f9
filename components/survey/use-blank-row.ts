'use client';

import { useEffect, useRef, useState } from 'react';
import { newUuid } from '@/components/sheet/identity';
import type { SurveyRoom } from '@/diagram/document/schema';
import { emptyRoom } from '@/diagram/survey/columns';
import { nextOrder } from '@/diagram/survey/parse';

const freshId = () => `room-${newUuid().slice(0, 8)}`;

/** Before the page is alive: the server and the first paint must agree on a name. */
const FIRST = 'room-new';

/**
 * The row that is not there yet: it stands last, or after the row from which a new one was asked for, and becomes a room
 * with the first thing typed into it.
 */
export function useBlankRow(rooms: readonly SurveyRoom[]) {
  const [id, setId] = useState(FIRST);
  const [order, setOrder] = useState<number | null>(null);
  const current = useRef(FIRST);
  const next = () => {
    current.current = freshId();
    setId(current.current);
  };
  useEffect(next, []);
  return {
    row: emptyRoom(id, order ?? nextOrder(rooms)),
    /** its id now, also in the middle of a key that has just made a room of the one before */
    currentId: () => current.current,
    /** It has become a room: the next blank row stands last. */
    taken() {
      next();
      setOrder(null);
    },
    moveTo: setOrder,
  };
}
