export const median = (values: readonly number[]): number => [...values].sort((a, b) => a - b)[Math.floor(values.length / 2)]!;

/** ms that a run takes, the median of several. */
export function milliseconds(run: () => unknown, times: number): number {
  const taken: number[] = [];
  for (let i = 0; i < times; i++) {
    const start = performance.now();
    run();
    taken.push(performance.now() - start);
  }
  return median(taken);
}
