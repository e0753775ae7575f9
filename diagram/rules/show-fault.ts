import type { Fault, FaultKind } from '../circuit/fault-types';
import type { Part } from '../document/schema';
import { isPoint } from '../terminals/roles-of-parts';
import type { Context } from './context';
import type { Finding } from './types';

/**
 * The fault walk that proves a finding: what to put in, and in which condition to look; nothing where the drawing is
 * the fault.
 */
export interface Shown {
  faults: Fault[];
  condition: string;
}

/** Which fault shows what a rule warns of; rules that no fault shows are left out. */
const SHOWS: Readonly<Record<string, FaultKind | 'supply-neutral' | 'as-drawn'>> = {
  'short-circuit': 'as-drawn',
  'missing-earth': 'line-to-case',
  'no-main-earth': 'line-to-case',
  'switched-earth': 'line-to-case',
  'no-rcd': 'line-to-case',
  'rcd-idle-on-backup': 'line-to-case',
  'no-earth-reference-on-backup': 'line-to-case',
  'slow-disconnection': 'line-to-case',
  'thin-earth': 'line-to-case',
  'wet-place-socket': 'line-to-case',
  'no-overcurrent': 'line-to-neutral',
  'undersized-cable': 'line-to-neutral',
  'weak-breaking-capacity': 'line-to-neutral',
  'switched-neutral': 'neutral-open',
  'fused-neutral': 'neutral-open',
  'borrowed-neutral': 'neutral-open',
  'backup-neutral-lost': 'neutral-open',
  'backup-neutral-behind-other-rcd': 'neutral-to-earth',
  'residual-imbalance': 'neutral-to-earth',
  'earth-neutral-joined': 'supply-neutral',
};

const hasCase = (part: Part): boolean => isPoint(part) && !('class' in part && part.class === 2);

/** Points that a finding speaks of: those it names, what its wires end at, then what hangs on the devices it names. */
function pointsOf({ graph, sections }: Context, finding: Finding): Part[] {
  const named = finding.parts.flatMap((id) => graph.parts.get(id) ?? []);
  const wired = finding.wires.flatMap((id) => {
    const wire = graph.wires.get(id);
    return wire ? [wire.from[0], wire.to[0]].map((end) => graph.parts.get(end)!) : [];
  });
  const behind = sections.filter(({ device }) => finding.parts.includes(device.id)).flatMap(({ points }) => points);
  return [...named, ...wired, ...behind].filter(isPoint);
}

const edgeWire = ({ graph }: Context, edge: number): string => graph.edges[edge]!.wire?.id ?? '';

/** Fed in that condition: a fault at a dead point shows nothing. */
function isFed({ evaluated }: Context, condition: string, part: Part): boolean {
  return evaluated.find((each) => each.condition.name === condition)?.points.get(part.id)?.source != null;
}

/**
 * The fault that shows what a finding warns of, at a place that the finding names, in the first condition in which it
 * holds
 * and the place is fed.
 * @returns null where no fault shows it
 */
export function showFault(context: Context, finding: Finding): Shown | null {
  const kind = SHOWS[finding.rule];
  if (kind === undefined) return null;
  const conditions =
    finding.conditions.length > 0 ? finding.conditions : context.evaluated.map(({ condition }) => condition.name);
  // The drawing holds the fault itself: nothing is put in. In one position of two-way switches only, no standing has
  // it.
  if (kind === 'as-drawn') {
    const isHere = ({ condition, crossed }: Context['evaluated'][number]) =>
      conditions.includes(condition.name) &&
      crossed.some(({ edge }) => finding.wires.includes(edgeWire(context, edge)));
    const here = context.evaluated.find(isHere);
    return here ? { faults: [], condition: here.condition.name } : null;
  }
  if (kind === 'supply-neutral') {
    const supply = context.parts('supply')[0];
    return supply ? { faults: [{ kind: 'neutral-open', at: supply.id }], condition: conditions[0]! } : null;
  }
  const needsCase = kind === 'line-to-case' || kind === 'neutral-to-earth';
  const fits = (part: Part) => !needsCase || hasCase(part);
  const named = pointsOf(context, finding).filter(fits);
  // A fault of the whole home (no main earth) is shown at any point of it.
  const candidates = named.length > 0 ? named : context.parts().filter((part) => isPoint(part) && fits(part));
  for (const condition of conditions)
    for (const part of candidates)
      if (isFed(context, condition, part)) return { faults: [{ kind, at: part.id }], condition };
  return null;
}
