export type Failure = { failure: string };
/** What a worker answers: the value and what else it says, or why it could not. */
export type Reply<Answer> = { id: number } & (Answer | Failure);

/** The part of a worker that is used here; a test brings its own. */
export interface LineWorker<Message, Answer> {
  postMessage(message: { id: number } & Message): void;
  terminate(): void;
  onmessage: ((event: MessageEvent<Reply<Answer>>) => void) | null;
  onerror: ((event: ErrorEvent) => void) | null;
}

interface Asked<Task, Answer> {
  id: number;
  task: Task;
  resolve: (outcome: Answer | Failure | null) => void;
}

/**
 * Asks a worker, one task at a time. Of those that wait only the newest is done; an answer that is no longer asked for is
 * null, unless late ones are wanted as well. A worker that fails is made anew for the next task.
 */
export class WorkerLine<Task, Message extends object, Answer extends object> {
  private worker: LineWorker<Message, Answer> | null = null;
  private running: Asked<Task, Answer> | null = null;
  private waiting: Asked<Task, Answer> | null = null;
  private next = 1;

  /**
   * @param tell what the worker is told of a task; `fresh` when it has been told nothing yet
   * @param unloaded said where the worker cannot be loaded and the browser gives no reason
   * @param late whether an answer is worth having though a newer task waits by then
   */
  constructor(
    private readonly makeWorker: () => LineWorker<Message, Answer>,
    private readonly tell: (task: Task, fresh: boolean) => Message,
    private readonly unloaded: string,
    private readonly late = false,
  ) {}

  ask(task: Task): Promise<Answer | Failure | null> {
    return new Promise((resolve) => {
      this.waiting?.resolve(null);
      this.waiting = { id: this.next++, task, resolve };
      this.start();
    });
  }

  private start(): void {
    if (this.running || !this.waiting) return;
    const asked = this.waiting;
    this.running = asked;
    this.waiting = null;
    const fresh = this.worker === null;
    this.ready().postMessage({ id: asked.id, ...this.tell(asked.task, fresh) });
  }

  private ready(): LineWorker<Message, Answer> {
    if (this.worker) return this.worker;
    const worker = this.makeWorker();
    worker.onmessage = ({ data }) => this.finish(data);
    worker.onerror = (event) => {
      const asked = this.running;
      this.close();
      asked?.resolve({ failure: event.message || this.unloaded });
      this.start();
    };
    this.worker = worker;
    return worker;
  }

  private finish({ id, ...outcome }: Reply<Answer>): void {
    const asked = this.running;
    if (asked?.id !== id) return;
    this.running = null;
    // Where a newer task waits, this answer is about what is no longer on the sheet.
    asked.resolve(this.waiting && !this.late ? null : (outcome as Answer | Failure));
    this.start();
  }

  close(): void {
    this.worker?.terminate();
    this.worker = null;
    this.running = null;
  }
}
