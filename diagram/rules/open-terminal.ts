import { polesOf } from '../document/kinds';
import type { Part } from '../document/schema';
import { COMMON_PRACTICE } from './clauses';
import type { Context } from './context';
import { hasWire } from './readings/earth-gaps';
import { openRegions } from './readings/open-regions';
import { potentials } from './readings/potentials';
import type { Remedy, Rule } from './types';
import { capital, say } from './readings/words';

/** Terminals without which a part does not work; sets of which one must be complete are given as alternatives. */
function needed(part: Part): readonly (readonly string[])[] {
  switch (part.kind) {
    case 'mcb':
    case 'rcbo':
      if (part.spare) return [];
      return part.kind === 'mcb' && polesOf(part) === 1
        ? [['1', '2']]
        : part.kind === 'mcb'
          ? [
              ['1', '2'],
              ['3', '4'],
            ]
          : [['1', '2', '3', '4']];
    case 'fuse':
    case 'switch':
    case 'regulator':
      return [['1', '2']];
    case 'isolator':
    case 'switch-2pole':
      return [
        ['1', '2'],
        ['3', '4'],
      ];
    case 'rcd':
    case 'meter':
    case 'switch-cross':
      return [['1', '2', '3', '4']];
    case 'switch-2way':
      return [
        ['C', '1'],
        ['C', '2'],
      ];
    case 'changeover':
      return [polesOf(part) === 2 ? ['A1', 'A3', 'B1', 'B3', '2', '4'] : ['A1', 'B1', '2']];
    case 'inverter':
      return [['in.L', 'in.N', 'out.L', 'out.N', 'bat.+', 'bat.-']];
    case 'battery':
      return [['+', '-']];
    case 'supply':
    case 'plug':
      return [['L', 'N']];
    case 'spd':
      return [['L', 'N', 'E']];
    default:
      return [];
  }
}

/**
 * True when an open line or open neutral is told already at this terminal: it lies in the dead stretch, or at the end of the
 * live one beside it, in the place of a part that the finding names.
 */
function isTold(context: Context, part: Part, missing: readonly string[]): boolean {
  const { graph } = context;
  const { line, neutral } = potentials(context);
  return openRegions(context).some((region) => {
    const near = [...region.gap, ...region.points].some((id) => graph.parts.get(id)!.place === part.place);
    return missing.every((mark) => {
      const node = graph.node(part.id, mark)!;
      const ends = (region.side === 'L' ? line : neutral)[node] === 1 || part.kind === 'supply';
      return region.nodes.has(node) || (ends && near);
    });
  });
}

/** A breaker with nothing behind it may be meant as spare. */
function asSpare(context: Context, part: Part): Remedy[] {
  if (part.kind !== 'mcb' && part.kind !== 'rcbo') return [];
  const behind = ['2', '4'].map((mark) => context.graph.node(part.id, mark)).filter((node) => node !== undefined);
  return behind.some((node) => hasWire(context, node))
    ? []
    : [{ label: 'Mark it as spare', patch: { set: { parts: [{ ...part, spare: true }] } } }];
}

/** A terminal that must be connected for the part to work, and is not. */
export const openTerminal: Rule = {
  meta: {
    id: 'open-terminal',
    severity: 'defect',
    group: 'polarity',
    title: 'A terminal that must be wired is not',
    clauses: [COMMON_PRACTICE],
    lesson:
      'A part with half its wires is either unfinished or wired from memory. The screw that is empty on the drawing is empty on the wall.',
    remedy: 'Wire the terminal, or mark the way as spare.',
  },
  *check(context) {
    const { graph } = context;
    const wired = (part: Part, mark: string) => hasWire(context, graph.node(part.id, mark)!);
    for (const part of graph.parts.values()) {
      const sets = needed(part);
      if (sets.length === 0) continue;
      const marks = [...new Set(sets.flat())];
      const touched = marks.filter((mark) => wired(part, mark));
      if (touched.length === 0) continue;
      // A pole is complete or not used at all; one pole at least must be complete.
      const whole = sets.some((set) => set.every((mark) => wired(part, mark)));
      const halves = sets.flatMap((set) =>
        set.some((mark) => wired(part, mark)) ? set.filter((mark) => !wired(part, mark)) : [],
      );
      const missing =
        part.kind === 'switch-2way' ? (whole ? [] : sets[0]!.filter((mark) => !wired(part, mark))) : halves;
      const serving = part.kind === 'plug' && part.in === undefined;
      if (missing.length === 0 || serving || isTold(context, part, missing)) continue;
      yield {
        heading: `${capital(say(context, part.id))} is not wired whole`,
        message: `Terminal ${missing.join(' and ')} of ${say(context, part.id)} ${missing.length === 1 ? 'has' : 'have'} no wire: as drawn it cannot do its work.`,
        parts: [part.id],
        remedies: asSpare(context, part),
      };
    }
  },
};
