import { LiveEvents, type Peer } from '@/lib/shared/live';

/** What a window makes of the event stream of its drawing. */
export interface LiveHears {
  /** the newest revision of the server */
  rev(rev: number): void;
  /** everybody who has the drawing open, this person included */
  people(people: readonly Peer[]): void;
  /** whether the stream stands: while it does not, somebody has to ask now and then */
  standing(stands: boolean): void;
}

export interface Live {
  /** A sheet of the drawing is on the screen, until the answer is called. */
  attend(): () => void;
  close(): void;
}

/** ms that a window may lie behind others, or between two sheets, before it lets its stream go: a browser has few */
const LINGER = 10_000;
const FIRST_WAIT = 4_000;
const LONGEST_WAIT = 60_000;

function read<K extends keyof typeof LiveEvents>(name: K, event: MessageEvent<string>) {
  const { data } = LiveEvents[name].safeParse(JSON.parse(event.data));
  return data as (typeof LiveEvents)[K]['_output'] | undefined;
}

/**
 * Follows a drawing while a sheet of it is looked at. The browser comes back by itself from a lost network; a refusal
 * (signed out, too many windows, no such stream) is tried again later and later.
 */
export function followDrawing(drawingId: string, hears: LiveHears): Live {
  let source: EventSource | null = null;
  let attending = 0;
  let attempt = 0;
  let timer: ReturnType<typeof setTimeout> | undefined;

  const drop = () => {
    source?.close();
    source = null;
    hears.standing(false);
    hears.people([]);
  };
  const open = () => {
    if (typeof EventSource === 'undefined') return;
    const own = new EventSource(`/api/drawings/${drawingId}/events`);
    source = own;
    own.onopen = () => {
      attempt = 0;
      hears.standing(true);
    };
    own.onerror = () => {
      hears.standing(false);
      hears.people([]);
      if (own !== source || own.readyState !== EventSource.CLOSED) return;
      source = null;
      const wait = Math.min(LONGEST_WAIT, FIRST_WAIT * 2 ** attempt) * (0.75 + Math.random() / 2);
      attempt += 1;
      timer = setTimeout(settle, wait);
    };
    own.addEventListener('rev', (event) => {
      const said = read('rev', event);
      if (said) hears.rev(said.rev);
    });
    own.addEventListener('people', (event) => {
      const said = read('people', event);
      if (said) hears.people(said.people);
    });
  };
  const wanted = () => attending > 0 && document.visibilityState === 'visible';
  const settle = () => {
    clearTimeout(timer);
    if (wanted()) {
      if (!source) open();
    } else if (source) timer = setTimeout(drop, LINGER);
  };

  document.addEventListener('visibilitychange', settle);
  return {
    attend() {
      attending += 1;
      settle();
      return () => {
        attending -= 1;
        settle();
      };
    },
    close() {
      clearTimeout(timer);
      document.removeEventListener('visibilitychange', settle);
      drop();
    },
  };
}
