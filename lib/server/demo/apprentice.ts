import 'server-only';
import { applyPatch, type Patch } from '@/diagram/document/patch';
import type { End, Installation, Part, Wire } from '@/diagram/document/schema';
import { quarryHouse } from '@/lib/server/demo/house';

const wire = (doc: Installation, id: string): Wire => doc.wires.find((one) => one.id === id)!;
const part = (doc: Installation, id: string): Part => doc.parts.find((one) => one.id === id)!;

/** The next terminal of a bar or joint that nothing is landed on. */
function freeOn(doc: Installation, bar: string): End {
  const used = doc.wires.flatMap(({ from, to }) => [from, to]).filter(([id]) => id === bar);
  return [bar, String(Math.max(...used.map(([, mark]) => Number(mark))) + 1)];
}

/** A mistake that somebody makes, and the rule that finds it. */
export interface Mistake {
  rule: string;
  patch: (doc: Installation) => Patch;
}

export const MISTAKES: readonly Mistake[] = [
  {
    // The switch is put in the neutral of a bedroom lamp: off, it is dark and still live.
    rule: 'switched-neutral',
    patch: (doc) => {
      const line = wire(doc, 'front-bedroom.lamp2:L');
      const neutral = wire(doc, 'front-bedroom.lamp2:N');
      const feed = wire(doc, 'front-bedroom.lamp2.switch:1');
      return {
        set: {
          wires: [
            { ...feed, to: ['front-bedroom.lamp2', 'L'] },
            {
              ...line,
              from: neutral.from,
              to: ['front-bedroom.lamp2.switch', '1'],
              role: 'neutral',
              colour: neutral.colour!,
            },
            { ...neutral, from: ['front-bedroom.lamp2.switch', '2'] },
          ],
        },
      };
    },
  },
  {
    // The neutral of a backed-up way is landed on the mains bar: it is gone when that rcd opens.
    rule: 'backup-neutral-lost',
    patch: (doc) => ({
      set: { wires: [{ ...wire(doc, 'back-bedroom.backup1.n:1'), from: freeOn(doc, 'rcd1.neutral-bar') }] },
    }),
  },
  {
    // The earth core of the oven's tail hangs free in the switch box.
    rule: 'missing-earth',
    patch: () => ({ remove: { wires: ['kitchen.heavy1:E'] } }),
  },
  {
    // A larger breaker on the cable of the bedroom outlets.
    rule: 'undersized-cable',
    patch: (doc) => ({ set: { parts: [{ ...part(doc, 'back-bedroom.way-outlets1'), rating: 25 } as Part] } }),
  },
  {
    // The inverter has no bond on battery: with the main switch off its neutral has no earth.
    rule: 'no-earth-reference-on-backup',
    patch: (doc) => ({ set: { parts: [{ ...part(doc, 'inverter'), bond: false } as Part] } }),
  },
  {
    // Two rows of outlets joined at their ends: neither breaker makes them dead.
    rule: 'mixed-feeds',
    patch: () => ({
      set: {
        wires: [
          {
            id: 'link',
            from: ['front-bedroom.outlet3', 'L'],
            to: ['middle-bedroom.outlet2', 'L'],
            role: 'line',
            cable: 'middle-bedroom.outlet2.cable',
            colour: 'BN',
          },
        ],
      },
    }),
  },
];

/** The apprentice's drawing of the house: the electrician's, with six mistakes. */
export function apprenticesHome(): Installation {
  const doc = MISTAKES.reduce((drawn, { patch }) => applyPatch(drawn, patch(drawn)), quarryHouse());
  return { ...doc, title: '3 Quarry Steps, for review' };
}
