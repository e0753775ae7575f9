'use client';

import { useEffect, useRef, useState } from 'react';
import type { Peer } from '@/lib/shared/live';
import { useSheet, type OpenDrawing } from './use-drawing';

const SHOWN = 3;

/** "K. O. is here too", and what a screen reader is told when somebody comes or goes. */
export function presenceWords(before: readonly Peer[], now: readonly Peer[]): string {
  const without = (list: readonly Peer[], other: readonly Peer[]) =>
    list.filter(({ id }) => !other.some((peer) => peer.id === id)).map(({ name }) => name);
  const came = without(now, before);
  const went = without(before, now);
  const list = (names: string[]) => names.join(' and ');
  return [
    came.length > 0 && `${list(came)} ${came.length === 1 ? 'has' : 'have'} opened this drawing.`,
    went.length > 0 && `${list(went)} ${went.length === 1 ? 'has' : 'have'} left it.`,
  ]
    .filter(Boolean)
    .join(' ');
}

/** Who else has this drawing open: initials in the hand of people, beside the save state. */
export function PresenceView({ drawing }: { drawing: OpenDrawing }) {
  const peers = useSheet(drawing.store, (state) => state.peers);
  const [said, setSaid] = useState('');
  const before = useRef<readonly Peer[]>([]);
  useEffect(() => {
    const words = presenceWords(before.current, peers);
    before.current = peers;
    // A lost network empties the list for a moment: nobody has to be told of each flicker at once.
    const timer = setTimeout(() => setSaid(words), 1000);
    return () => clearTimeout(timer);
  }, [peers]);
  const more = peers.length - SHOWN;
  return (
    <>
      {peers.length > 0 && (
        <span
          className="flex items-baseline gap-2 whitespace-nowrap text-blue"
          title={`${peers.map(({ name }) => name).join(', ')} ${peers.length === 1 ? 'has' : 'have'} this drawing open too`}
        >
          <span className="max-sm:hidden">with</span>
          {peers.slice(0, SHOWN).map(({ id, initials }) => (
            <b key={id} className="border-b border-blue">
              {initials}
            </b>
          ))}
          {more > 0 && <span>and {more} more</span>}
        </span>
      )}
      <span role="status" className="sr-only">
        {said}
      </span>
    </>
  );
}
