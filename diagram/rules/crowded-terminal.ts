import { isBar } from '../document/kinds';
import { isControl, isPoint } from '../terminals/roles-of-parts';
import type { End, Part } from '../document/schema';
import type { Context } from './context';
import { newWireId, withEnd } from './readings/rewire';
import type { Remedy, Rule } from './types';
import { capital, say } from './readings/words';

const MOST = 2;

/** The wires in a joint behind the accessory, and one from there to the terminal. */
function behindJoint(context: Context, part: Part, mark: string, wires: readonly string[]): Remedy[] {
  const { graph } = context;
  const id = `${part.id}.joint.${mark}`;
  if (graph.parts.has(id)) return [];
  const joint: Part = {
    id,
    kind: 'joint',
    ...(part.place && { place: part.place }),
    ...(part.board && { board: part.board }),
  };
  const all = wires.map((wire) => graph.wires.get(wire)!);
  const moved = all.map((wire, i) => withEnd(wire, [part.id, mark], [id, String(i + 1)]));
  const link = {
    id: newWireId(context, id),
    from: [id, String(wires.length + 1)] as End,
    to: [part.id, mark] as End,
    role: all[0]!.role,
  };
  return [{ label: 'Join them in a connector behind it', patch: { set: { parts: [joint], wires: [...moved, link] } } }];
}

/** More than two conductors at one terminal of an accessory. */
export const crowdedTerminal: Rule = {
  meta: {
    id: 'crowded-terminal',
    severity: 'advice',
    group: 'polarity',
    title: 'Too many conductors under one screw',
    clauses: [{ document: 'IEC 60364-5-52', clause: '526.2', memory: true }],
    lesson:
      'A third conductor under a screw made for two sits on the others, not under the screw. It loosens, warms, and one day arcs.',
    remedy: 'Join them in a connector behind the accessory and lead one wire to the terminal.',
  },
  *check(context) {
    const { graph } = context;
    for (let node = 0; node < graph.size; node++) {
      const part = graph.partOf[node]!;
      if (isBar(part.kind) || !(isControl(part) || isPoint(part) || part.kind === 'plug')) continue;
      const wires: string[] = [];
      for (let k = graph.start[node]!; k < graph.start[node + 1]!; k++) {
        const { wire } = graph.edges[graph.around[k]!]!;
        if (wire) wires.push(wire.id);
      }
      if (wires.length <= MOST) continue;
      const name = say(context, part.id);
      yield {
        heading: `${wires.length} wires at one terminal of ${name}`,
        message: `${capital(name)} has ${wires.length} wires at terminal ${graph.markOf[node]}; it holds ${MOST} safely.`,
        parts: [part.id],
        wires,
        remedies: behindJoint(context, part, graph.markOf[node]!, wires),
      };
    }
  },
};
