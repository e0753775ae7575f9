import { findParallelJoints, meetsDevice } from '../../circuit/parallel-joints';
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
  const add = (edge: number, loop: number[], condition: string, switches: string[]) => {
    const entry = found.get(edge) ?? { edge, loop, conditions: [], switches };
    if (!entry.conditions.includes(condition)) entry.conditions.push(condition);
    found.set(edge, entry);
  };
  for (const { condition, lineLoops: always, stands } of context.evaluated) {
    for (const { edge, loop } of always) add(edge, loop, condition.name, []);
    const starts = condition.sources.map(({ line }) => line);
    for (const stand of stands) {
      if (stand.shorted) continue;
      for (const joint of findParallelJoints(graph, stand.closed, starts)) {
        if (!meetsDevice(graph, joint)) continue;
        const switches = joint.loop.flatMap((number) =>
          graph.edges[number]!.kind === 'select' ? [graph.edges[number]!.part!] : [],
        );
        add(joint.edge, joint.loop, condition.name, [...new Set(switches)].sort());
      }
    }
  }
  return [...found.values()];
});
