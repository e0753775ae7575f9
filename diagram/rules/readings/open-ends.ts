import { isBar, polesOf } from '../../document/kinds';
import type { Part } from '../../document/schema';
import { isOvercurrent } from '../../terminals/roles-of-parts';
import type { Context } from '../context';
import { hasWire } from './earth-gaps';
import { once } from './once';
import { openRegions } from './open-regions';
import { potentials } from './potentials';

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
    // A stretch that begins at a joint has lost its wire from some device: the one whose live end hangs in the air.
    const headless = region.gap.every((id) => isBar(graph.parts.get(id)!.kind)) && (isOvercurrent(part) || part.kind === 'rcd' || part.kind === 'isolator');
    return missing.every((mark) => {
      const node = graph.node(part.id, mark)!;
      const ends = (region.side === 'L' ? line : neutral)[node] === 1 || part.kind === 'supply';
      return region.nodes.has(node) || (ends && (near || headless));
    });
  });
}

/** Terminals of a part that must be wired and are not; none where nothing is wired at all. */
function missingAt(context: Context, part: Part): string[] {
  const wired = (mark: string) => hasWire(context, context.graph.node(part.id, mark)!);
  const sets = needed(part);
  if (!sets.flat().some(wired)) return [];
  if (part.kind !== 'switch-2way') return sets.flatMap((set) => (set.some(wired) ? set.filter((mark) => !wired(mark)) : []));
  return sets.some((set) => set.every(wired)) ? [] : sets[0]!.filter((mark) => !wired(mark));
}

/** Parts with terminals that must be wired and are not, where no open line or open neutral says so already. */
export const openEnds = once((context: Context): { part: Part; missing: string[] }[] =>
  [...context.graph.parts.values()].flatMap((part) => {
    if (part.kind === 'plug' && part.in === undefined) return [];
    const missing = missingAt(context, part);
    return missing.length === 0 || isTold(context, part, missing) ? [] : [{ part, missing }];
  }),
);
