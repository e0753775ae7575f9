import type { Outbox } from './outbox';
import type { DrawingStore } from './store';

/** ms after a step until the history is written */
const DELAY = 300;

interface Place {
  drawingId: string;
  personId: string;
  windowId: string;
}

/** Keeps the history of this window, so that undo survives a reload. */
export class HistoryKeeper {
  private timer: ReturnType<typeof setTimeout> | undefined;

  constructor(
    private readonly store: () => DrawingStore,
    private readonly failed: (error: unknown) => void,
  ) {}

  /** Puts the history that an earlier load of this window left before what was done since. */
  async restore(outbox: Outbox, { drawingId, personId, windowId }: Place): Promise<void> {
    const history = await outbox.readHistory(drawingId, personId, windowId);
    if (!history) return;
    const { undoSteps, redoSteps } = this.store().getState();
    this.store().setState({
      undoSteps: [...history.undo, ...undoSteps],
      redoSteps: undoSteps.length > 0 ? redoSteps : history.redo,
      aside: history.aside,
    });
  }

  later(write: () => Promise<void>): void {
    clearTimeout(this.timer);
    this.timer = setTimeout(() => void write(), DELAY);
  }

  async write(outbox: Outbox | null, { drawingId, personId, windowId }: Place): Promise<void> {
    const { undoSteps, redoSteps, aside } = this.store().getState();
    try {
      await outbox?.writeHistory(drawingId, personId, windowId, {
        undo: [...undoSteps],
        redo: [...redoSteps],
        aside: [...aside],
      });
    } catch (error) {
      this.failed(error);
    }
  }

  stop(): void {
    clearTimeout(this.timer);
  }
}
