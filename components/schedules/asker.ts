import type { Answer, Task } from './schedules.worker';

type Reply = { id: number; value: Answer } | { id: number; failure: string };
export type Outcome<T> = { value: T } | { failure: string };

/**
 * Asks a worker for one thing at a time. While it works only the newest question waits: typing fast asks for the last state,
 * not for each on the way.
 */
export class Asker {
  private worker: Worker | null = null;
  private next = 1;
  private running: { id: number; resolve: (outcome: Outcome<Answer> | null) => void } | null = null;
  private waiting: { task: Task; resolve: (outcome: Outcome<Answer> | null) => void } | null = null;

  /** @returns null where a newer question came before the answer */
  ask<T extends Answer>(task: Task): Promise<Outcome<T> | null> {
    return new Promise((resolve) => {
      this.waiting?.resolve(null);
      this.waiting = { task, resolve: resolve as (outcome: Outcome<Answer> | null) => void };
      this.start();
    });
  }

  private start(): void {
    if (this.running || !this.waiting) return;
    const { task, resolve } = this.waiting;
    this.waiting = null;
    this.running = { id: this.next++, resolve };
    this.ready().postMessage({ id: this.running.id, task });
  }

  private ready(): Worker {
    if (this.worker) return this.worker;
    const worker = new Worker(new URL('./schedules.worker.ts', import.meta.url), { type: 'module' });
    worker.onmessage = ({ data }: MessageEvent<Reply>) => this.finish(data.id, data);
    worker.onerror = (event) => {
      const { running } = this;
      this.close();
      running?.resolve({ failure: event.message || 'The schedules could not be loaded.' });
    };
    this.worker = worker;
    return worker;
  }

  private finish(id: number, outcome: Outcome<Answer>): void {
    const asked = this.running;
    if (asked?.id !== id) return;
    this.running = null;
    asked.resolve(this.waiting ? null : outcome);
    this.start();
  }

  close(): void {
    this.worker?.terminate();
    this.worker = null;
    this.running = null;
  }
}
