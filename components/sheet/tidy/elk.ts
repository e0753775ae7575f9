import type { ELK, ElkNode } from 'elkjs/lib/elk-api';

/** ms after which a layout is given up: some graphs never come to an end, and elkjs cannot be told to stop. */
export const ELK_LIMIT = 3000;

let standby: Promise<ELK> | null = null;

/** Loaded on demand: it is 1.5 MB. */
async function begin(): Promise<ELK> {
  const { default: Elk } = await import('elkjs/lib/elk-api.js');
  return new Elk({ workerFactory: () => new Worker(new URL('./elk.worker.ts', import.meta.url)) });
}

/** Has a worker stand by: to load it takes as long as many a layout. */
export function standBy(): void {
  standby ??= begin();
  // Who asks for a layout hears why there is none.
  standby.catch(() => undefined);
}

/** Ends the worker that stands by. */
export function standDown(): void {
  void standby?.then(
    (elk) => elk.terminateWorker(),
    () => undefined,
  );
  standby = null;
}

/** Lays a graph out in the worker that stands by, or in a new one; it is ended with the answer or at the limit. */
export async function layOut(graph: ElkNode): Promise<ElkNode | null> {
  const taken = standby ?? begin();
  standby = null;
  const elk = await taken;
  let timer: ReturnType<typeof setTimeout> | undefined;
  const late = new Promise<null>((resolve) => {
    timer = setTimeout(() => resolve(null), ELK_LIMIT);
  });
  try {
    return await Promise.race([elk.layout(graph), late]);
  } finally {
    clearTimeout(timer);
    elk.terminateWorker();
  }
}
