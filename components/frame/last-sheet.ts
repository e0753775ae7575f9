const KEY = 'ohmstead-last-sheet';
/** jobs remembered; the oldest go */
const KEEP = 50;

type Memory = [jobId: string, tabId: string][];

function read(): Memory {
  try {
    return JSON.parse(localStorage.getItem(KEY) ?? '[]') as Memory;
  } catch {
    // Storage is blocked or holds something foreign: a convenience is lost, no work.
    return [];
  }
}

/** Which sheet of a job's set was left last in this browser. */
export const lastSheet = (jobId: string): string | undefined => read().find(([id]) => id === jobId)?.[1];

export function rememberSheet(jobId: string, tabId: string): void {
  const memory: Memory = [[jobId, tabId], ...read().filter(([id]) => id !== jobId)];
  try {
    localStorage.setItem(KEY, JSON.stringify(memory.slice(0, KEEP)));
  } catch {
    // As above: without storage the register opens the overview.
  }
}
