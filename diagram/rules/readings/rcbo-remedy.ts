import type { PartOf, Wire } from '../../document/schema';
import { practices } from '../../practices';
import type { Context } from '../context';
import type { Remedy } from '../types';

/** A, additional protection: 415.1.1 */
const SENSITIVITY_A = 0.03;

/**
 * An rcbo in the place of a way's one-pole mcb, with the way's neutral led through it. Offered where that neutral leaves its
 * bar by one wire, so that there is no doubt which it is.
 */
export function rcboInPlace({ graph, ways, practice }: Context, device: string): Remedy[] {
  const mcb = graph.parts.get(device);
  const way = ways.find((each) => each.device === device);
  if (mcb?.kind !== 'mcb' || (mcb.poles ?? 1) !== 1 || !way) return [];
  const atBar = (id: string) => graph.parts.get(id)?.kind === 'neutral-bar';
  const leaving = way.wires
    .map((id) => graph.wires.get(id)!)
    .filter(({ role, from, to }) => role === 'neutral' && atBar(from[0]) !== atBar(to[0]));
  const id = `${device}.neutral`;
  if (leaving.length !== 1 || graph.wires.has(id)) return [];
  const [wire] = leaving as [Wire];
  const [bar, far] = atBar(wire.from[0]) ? [wire.from, wire.to] : [wire.to, wire.from];
  const { poles: _poles, kind: _kind, ...ratings } = mcb;
  const rcbo: PartOf<'rcbo'> = {
    ...ratings,
    kind: 'rcbo',
    poles: 1,
    sensitivity: SENSITIVITY_A,
    type: practices[practice].draft.rcdType,
    delay: 'none',
  };
  const through: Wire = { ...wire, from: [device, '4'], to: far };
  const link: Wire = { id, from: bar, to: [device, '3'], role: 'neutral', ...(wire.colour && { colour: wire.colour }) };
  return [
    {
      label: `Fit an rcbo of ${SENSITIVITY_A * 1000} mA, the neutral through it`,
      patch: { set: { parts: [rcbo], wires: [through, link] } },
    },
  ];
}
