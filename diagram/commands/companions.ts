import type { End, Installation, Part } from '../document/schema';
import { endKey, type Walk } from './walk';

/** Where the neutral and the earth belong that go with a line conductor. */
export interface Feed {
  L: End;
  N: End | null;
  E: End | null;
}

const OUT_NEUTRAL: Partial<Record<Part['kind'], readonly (readonly [string, string])[]>> = {
  // the outgoing neutral that belongs to each outgoing line terminal
  supply: [['L', 'N']],
  meter: [['4', '3']],
  isolator: [['2', '4']],
  rcd: [['2', '4']],
  rcbo: [['2', '4']],
  mcb: [['2', '4']],
  'switch-2pole': [['2', '4']],
  changeover: [['2', '4']],
  inverter: [['out.L', 'out.N']],
};

/**
 * Finds what goes with a line terminal by following it towards the source: in a cable, that cable's own neutral and earth
 * cores; in the board, the neutral bar behind the same device, and the earth bar. So a way keeps its own neutral.
 */
export function companionsOf(doc: Installation, walk: Walk, line: End): Feed {
  const parts = new Map(doc.parts.map((part) => [part.id, part]));
  const wires = new Map(doc.wires.map((wire) => [wire.id, wire]));
  let N: End | null = null;
  let E: End | null = null;
  let at: End | null = line;
  while (at && (!N || !E)) {
    const step = walk.get(endKey(at));
    const part = parts.get(at[0]);
    if (part && !N) N = neutralBeside(doc, part, at[1]);
    if (part && !E) E = earthBeside(doc, part);
    const wire = step?.wire ? wires.get(step.wire) : undefined;
    if (wire?.cable) {
      const outward = wire.to[0] === at[0] && wire.to[1] === at[1];
      for (const core of doc.wires) {
        if (core.cable !== wire.cable) continue;
        const here = outward ? core.to : core.from;
        if (core.role === 'neutral') N ??= here;
        if (core.role === 'earth') E ??= here;
      }
    }
    at = step?.from ?? null;
  }
  return { L: line, N, E: E ?? anyEarth(doc) };
}

function neutralBeside(doc: Installation, part: Part, mark: string): End | null {
  const pair = OUT_NEUTRAL[part.kind]?.find(([out]) => out === mark);
  if (!pair || (part.kind === 'mcb' && (part.poles ?? 1) === 1)) return null;
  if (part.kind === 'isolator' && part.poles === 1) return null;
  return barAt(doc, [part.id, pair[1]], 'neutral-bar') ?? [part.id, pair[1]];
}

/** The bar of a kind that a terminal is wired to. */
function barAt(doc: Installation, [part, mark]: End, kind: Part['kind']): End | null {
  for (const { from, to } of doc.wires) {
    const other = from[0] === part && from[1] === mark ? to : to[0] === part && to[1] === mark ? from : null;
    if (other && doc.parts.some((bar) => bar.id === other[0] && bar.kind === kind)) return other;
  }
  return null;
}

/** An accessory that has an earth terminal hands its own earth on. */
function earthBeside(doc: Installation, part: Part): End | null {
  if (part.kind !== 'socket' && part.kind !== 'lamp' && part.kind !== 'fan' && part.kind !== 'appliance') return null;
  const wired = doc.wires.some(
    ({ from, to }) => (from[0] === part.id && from[1] === 'E') || (to[0] === part.id && to[1] === 'E'),
  );
  return wired ? [part.id, 'E'] : null;
}

function anyEarth(doc: Installation): End | null {
  const bar = doc.parts.find((part) => part.kind === 'earth-bar');
  return bar ? [bar.id, '1'] : null;
}
