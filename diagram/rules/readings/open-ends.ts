import { isBar, polesOf } from '../../document/kinds';
import type { Part } from '../../document/schema';
import { isControl, isOvercurrent } from '../../terminals/roles-of-parts';
import type { Context } from '../context';
import { branches } from './branches';
import { hasWire } from './earth-gaps';
import { once } from './once';
import { openRegions, type OpenRegion } from './open-regions';
import { potentials } from './potentials';
import { truthTables } from './switch-sets';

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
 * True when an open line or open neutral is told already at this terminal: it lies in the dead stretch, or at the end
 * of the
 * live one beside it, in the place of a part that the finding names.
 */
function isTold(context: Context, part: Part, missing: readonly string[], taken: Set<OpenRegion>): boolean {
  const { graph } = context;
  const { line, neutral } = potentials(context);
  const at = (mark: string) => graph.node(part.id, mark)!;
  const beside = openRegions(context).some((region) => {
    const near = [...region.gap, ...region.points].some((id) => graph.parts.get(id)!.place === part.place);
    // A stretch that begins at a joint has lost its wire from some device: the one whose live end hangs in the air.
    const isDevice = isOvercurrent(part) || part.kind === 'rcd' || part.kind === 'isolator';
    const headless = isDevice && region.gap.every((id) => isBar(graph.parts.get(id)!.kind));
    return missing.every((mark) => {
      const node = at(mark);
      const ends = (region.side === 'L' ? line : neutral)[node] === 1 || part.kind === 'supply';
      return region.nodes.has(node) || (ends && (near || headless));
    });
  });
  if (beside || !isControl(part) || !missing.every((mark) => line[at(mark)] === 1)) return beside;
  // A live switch whose lamp, or whose fellow of a two-way set, hangs dead in another room: one lost wire, told once.
  const far = openRegions(context).find(
    (region) =>
      !taken.has(region) &&
      region.side === 'L' &&
      region.points.some((id) => branches(context).get(id) === branches(context).get(part.id)) &&
      region.gap.every((id) => isControl(graph.parts.get(id)!) || isBar(graph.parts.get(id)!.kind)),
  );
  if (far) taken.add(far);
  return far !== undefined;
}

/**
 * Terminals of a part that must be wired and are not; none where nothing is wired at all.
 * @param every of a two-way switch both strappers too, which it can do without
 */
function missingAt(context: Context, part: Part, every = false): string[] {
  const wired = (mark: string) => hasWire(context, context.graph.node(part.id, mark)!);
  const sets = needed(part);
  if (!sets.flat().some(wired)) return [];
  if (part.kind !== 'switch-2way' || every)
    return sets.flatMap((set) => (set.some(wired) ? set.filter((mark) => !wired(mark)) : []));
  return sets.some((set) => set.every(wired)) ? [] : sets[0]!.filter((mark) => !wired(mark));
}

/**
 * True at either end of a strapper that is lost between two switches of a set: that they do not work together is told.
 */
const isLostStrapper = (context: Context, { id, kind }: Part): boolean =>
  (kind === 'switch-cross' || kind === 'switch-2way') &&
  truthTables(context).some(
    ({ switches, idle }) =>
      idle.length > 0 &&
      switches.includes(id) &&
      switches.some((other) => other !== id && missingAt(context, context.graph.parts.get(other)!, true).length > 0),
  );

/** Parts with terminals that must be wired and are not, where no open line or open neutral says so already. */
export const openEnds = once((context: Context): { part: Part; missing: string[] }[] => {
  const taken = new Set<OpenRegion>();
  return [...context.graph.parts.values()].flatMap((part) => {
    if (part.kind === 'plug' && part.in === undefined) return [];
    const missing = missingAt(context, part);
    if (missing.length === 0 || isTold(context, part, missing, taken) || isLostStrapper(context, part)) return [];
    return [{ part, missing }];
  });
});
