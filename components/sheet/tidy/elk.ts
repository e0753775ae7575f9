import type { ElkNode } from 'elkjs/lib/elk-api';

/** ms after which a layout is given up: some graphs never come to an end, and elkjs cannot be told to stop. */
export const ELK_LIMIT = 3000;

/** Lays a graph out in a worker of its own, which is ended with the answer or at the limit. Loaded on demand: it is 1.5 MB. */
export async function layOut(graph: ElkNode): Promise<ElkNode | null> {
  const { default: ELK } = await import('elkjs/lib/elk-api.js');
  const elk = new ELK({ workerFactory: () => new Worker(new URL('./elk.worker.ts', import.meta.url)) });
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
