import type { Context } from '../context';
import { once } from './once';

/** A joint through which one conductor hangs on two devices. */
export interface LineLoop {
  edge: number;
  loop: number[];
  conditions: string[];
  /** two-way and cross switches that must stand so; empty where it is always so */
  switches: string[];
}

/** Loops of line conductors that pass a device, whatever the switches do or in some position of them. */
export const lineLoops = once((context: Context): LineLoop[] => {
  const { graph } = context;
  const found = new Map<number, LineLoop>();
  for (const { condition, lineLoops: loops } of context.evaluated) {
    for (const { edge, loop } of loops) {
      // Changeovers that stand side by side on one way close a loop as well, of that way alone.
      if (!loop.some((number) => graph.edges[number]!.kind === 'device' || graph.edges[number]!.kind === 'bypass')) continue;
      const through = [edge, ...loop].map((number) => graph.edges[number]!).filter(({ kind }) => kind === 'select');
      const switches = [...new Set(through.map(({ part }) => part!))].sort();
      const entry = found.get(edge) ?? { edge, loop, conditions: [], switches };
      if (!entry.conditions.includes(condition.name)) entry.conditions.push(condition.name);
      found.set(edge, entry);
    }
  }
  return [...found.values()];
});
