'use client';

import { useLayoutEffect, useRef, useState } from 'react';
import { Button } from '@/components/ui/button';
import { Segmented } from '@/components/ui/segmented';
import type { RoomFeed } from '@/diagram/commands/copy-room';
import { copyInHand } from './copying';
import type { Hands } from './hands';
import type { Mode } from './view';

const FEEDS: readonly { value: RoomFeed; label: string }[] = [
  { value: 'same', label: 'same ways' },
  { value: 'new', label: 'new ways' },
];

/** The first name of its kind that no room has: "Bedroom 2" after "Bedroom". */
function freeName(name: string, taken: ReadonlySet<string>): string {
  const [, stem = name, number] = /^(.*?)(?:\s+(\d+))?$/.exec(name.trim()) ?? [];
  for (let n = Number(number ?? 1) + 1; ; n++) if (!taken.has(`${stem} ${n}`.toLowerCase())) return `${stem} ${n}`;
}

/** Asks for the new room's name and how it is fed; one Enter copies the room. */
export function RoomPanel({ mode, hands, onLeave }: { mode: Extract<Mode, { kind: 'room' }>; hands: Hands; onLeave(): void }) {
  const room = hands.doc.places.find((place) => place.id === mode.place);
  const [name, setName] = useState(() =>
    freeName(room?.name ?? 'Room', new Set(hands.doc.places.map((place) => place.name.toLowerCase()))),
  );
  const [feed, setFeed] = useState<RoomFeed>('same');
  const [error, setError] = useState('');
  const field = useRef<HTMLInputElement>(null);
  useLayoutEffect(() => field.current?.select(), []);
  if (!room) return null;
  return (
    <form
      role="dialog"
      aria-label={`Copy ${room.name} whole`}
      className="flex flex-col gap-3 border-2 border-ink bg-paper p-3"
      onKeyDown={(event) => {
        event.stopPropagation();
        if (event.key === 'Escape') onLeave();
      }}
      onSubmit={(event) => {
        event.preventDefault();
        const refused = copyInHand(hands, { place: room.id, name, feed });
        if (refused === null) onLeave();
        else setError(refused);
      }}
    >
      <h2 className="text-head font-bold">Copy {room.name} whole</h2>
      <label className="block">
        <span className="block text-small text-grey">Name of the new room</span>
        <input
          ref={field}
          dir="auto"
          value={name}
          maxLength={80}
          aria-invalid={error ? true : undefined}
          onChange={(event) => {
            setName(event.target.value);
            setError('');
          }}
          className="w-full border-b border-ink bg-transparent px-1 font-bold outline-offset-0 aria-invalid:border-b-2 aria-invalid:border-red pointer-coarse:min-h-11"
          autoComplete="off"
        />
        {error && (
          <span role="alert" className="block text-small text-red">
            {error}
          </span>
        )}
      </label>
      <Segmented<RoomFeed> label="Wired to" showLabel segments={FEEDS} value={feed} onChange={(value) => setFeed(value)} />
      <p className="text-small text-grey">
        {feed === 'same'
          ? 'Looped on from the old room. A fixed appliance gets a way of its own.'
          : 'Each way is drawn anew, with a breaker like the old one.'}
      </p>
      <div className="flex gap-2">
        <Button type="submit" solid>
          Copy the room
        </Button>
        <Button onClick={onLeave}>Leave</Button>
      </div>
    </form>
  );
}
