import type { Installation } from '@/diagram/document/schema';
import type { Question, Rehearsed } from '@/diagram/rehearsal/rehearse';

/** What the worker is told: a document the first time and whenever it has changed, then questions about it. */
export interface Told {
  id: number;
  document?: Installation;
  question: Question;
}

export type Reply = { id: number; value: Rehearsed } | { id: number; failure: string };
export type Outcome = { value: Rehearsed } | { failure: string };

/** The part of a worker that is used here; a test brings its own. */
export interface RehearseWorker {
  postMessage(message: Told): void;
  terminate(): void;
  onmessage: ((event: MessageEvent<Reply>) => void) | null;
  onerror: ((event: ErrorEvent) => void) | null;
}

interface Asked {
  id: number;
  document: Installation;
  question: Question;
  resolve: (outcome: Outcome | null) => void;
}

/** Asks a worker one question at a time. Of those that wait only the newest is put; the others are answered with null. */
export class Rehearser {
  private worker: RehearseWorker | null = null;
  private running: Asked | null = null;
  private waiting: Asked | null = null;
  private next = 1;
  /** the document that the worker has */
  private told: Installation | null = null;

  constructor(private readonly makeWorker: () => RehearseWorker) {}

  ask(document: Installation, question: Question): Promise<Outcome | null> {
    return new Promise((resolve) => {
      this.waiting?.resolve(null);
      this.waiting = { id: this.next++, document, question, resolve };
      this.start();
    });
  }

  private start(): void {
    if (this.running || !this.waiting) return;
    const asked = this.waiting;
    this.running = asked;
    this.waiting = null;
    const worker = this.ready();
    const { id, document, question } = asked;
    worker.postMessage(document === this.told ? { id, question } : { id, document, question });
    this.told = document;
  }

  private ready(): RehearseWorker {
    if (this.worker) return this.worker;
    const worker = this.makeWorker();
    worker.onmessage = ({ data }) => {
      const asked = this.running;
      if (asked?.id !== data.id) return;
      this.running = null;
      asked.resolve('failure' in data ? { failure: data.failure } : { value: data.value });
      this.start();
    };
    worker.onerror = (event) => {
      const asked = this.running;
      this.close();
      asked?.resolve({ failure: event.message || 'The rehearsal could not be loaded.' });
      this.start();
    };
    this.worker = worker;
    return worker;
  }

  close(): void {
    this.worker?.terminate();
    this.worker = null;
    this.running = null;
    this.told = null;
  }
}

export const browserRehearser = (): Rehearser =>
  new Rehearser(
    () => new Worker(new URL('./rehearse.worker.ts', import.meta.url), { type: 'module' }) as unknown as RehearseWorker,
  );
