import { WorkerLine, type Failure, type LineWorker } from '@/lib/shared/worker-line';
import type { Answer, Task } from './schedules.worker';

export type Outcome<T> = { value: T } | Failure;
type ScheduleWorker = LineWorker<{ task: Task }, { value: Answer }>;

/** Asks the schedules' worker: typing fast asks for the last state, not for each on the way. */
export class Asker {
  private readonly line = new WorkerLine<Task, { task: Task }, { value: Answer }>(
    () => new Worker(new URL('./schedules.worker.ts', import.meta.url), { type: 'module' }) as unknown as ScheduleWorker,
    (task) => ({ task }),
    'The schedules could not be loaded.',
  );

  /** @returns null where a newer question came before the answer */
  ask<T extends Answer>(task: Task): Promise<Outcome<T> | null> {
    return this.line.ask(task) as Promise<Outcome<T> | null>;
  }

  close(): void {
    this.line.close();
  }
}
