import { z } from 'zod';

/** What the event stream of a drawing says. The names of the events are the keys. */
export const LiveEvents = {
  /** the newest revision; whoever is behind it asks for the changes since */
  rev: z.object({ rev: z.int().nonnegative() }),
  /** everybody who has the drawing open, whoever asks included */
  people: z.object({
    people: z.array(z.object({ id: z.string(), name: z.string(), initials: z.string() })),
  }),
} as const;

/** Somebody who has the drawing open. */
export type Peer = z.infer<typeof LiveEvents.people>['people'][number];
