import 'server-only';
import pg from 'pg';
import { describeFault, log } from '@/lib/server/log';
import { CHANNEL, NoteSchema, type Note } from '@/lib/server/live/notes';

const FIRST_WAIT_MS = 200;
const LONGEST_WAIT_MS = 10_000;
/** how often the idle connection is asked whether it still answers: a dead network says nothing by itself */
const PROBE_MS = 30_000;

interface Hears {
  note(note: Note): void;
  /** the connection stands, for the first time or again: what was sent before was not heard */
  connected(): void;
}

function read(payload: string | undefined): Note | null {
  try {
    const note = NoteSchema.safeParse(JSON.parse(payload ?? ''));
    return note.success ? note.data : null;
  } catch {
    // Others may use the channel's name by hand; what is no note of ours is left alone.
    return null;
  }
}

/** The one connection of a process that listens. It comes back by itself, later and later, until it is stopped. */
export class Listener {
  private client: pg.Client | null = null;
  private timer: NodeJS.Timeout | undefined;
  private attempt = 0;
  private running = false;
  private lost = false;

  constructor(
    private readonly url: string,
    private readonly hears: Hears,
  ) {}

  start(): void {
    if (this.running) return;
    this.running = true;
    void this.connect();
  }

  private async connect(): Promise<void> {
    const client = new pg.Client({
      connectionString: this.url,
      application_name: 'ohmstead-listen',
      connectionTimeoutMillis: 5_000,
      keepAlive: true,
    });
    this.client = client;
    client.on('error', (error) => this.lose(client, error));
    client.on('end', () => this.lose(client, new Error('The connection that listens was closed.')));
    client.on('notification', ({ payload }) => {
      const note = read(payload);
      if (note) this.hears.note(note);
    });
    try {
      await client.connect();
      await client.query(`listen ${CHANNEL}`);
    } catch (error) {
      this.lose(client, error);
      return;
    }
    if (this.client !== client) return;
    this.attempt = 0;
    this.timer = setInterval(() => this.probe(client), PROBE_MS);
    this.timer.unref();
    if (this.lost) log('live.back');
    this.lost = false;
    this.hears.connected();
  }

  private probe(client: pg.Client): void {
    const late = setTimeout(() => this.lose(client, new Error('The connection that listens does not answer.')), 5_000);
    client
      .query('select 1')
      .catch((error) => this.lose(client, error))
      .finally(() => clearTimeout(late));
  }

  /** Lets a broken connection go and tries again later. Each connection is lost once, whatever it reports. */
  private lose(client: pg.Client, error: unknown): void {
    if (this.client !== client) return;
    this.client = null;
    clearInterval(this.timer);
    void client.end().catch(() => undefined); // it is broken already: this only frees what is left of it
    if (!this.running) return;
    if (!this.lost) log('live.lost', describeFault(error));
    this.lost = true;
    const wait = Math.min(LONGEST_WAIT_MS, FIRST_WAIT_MS * 2 ** this.attempt) * (0.75 + Math.random() / 2);
    this.attempt += 1;
    this.timer = setTimeout(() => void this.connect(), wait);
    this.timer.unref();
  }

  async stop(): Promise<void> {
    this.running = false;
    clearTimeout(this.timer);
    const { client } = this;
    this.client = null;
    await client?.end().catch(() => undefined);
  }
}
