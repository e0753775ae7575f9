import { isBar, terminalsOf } from '@/diagram/document/kinds';
import { REFERENCE } from '@/diagram/circuit/network';
import type { Fault } from '@/diagram/circuit/fault-types';
import type { Installation, Part } from '@/diagram/document/schema';
import type { TestNetwork } from './networks';

/**
 * A home in one state written down as a network by the words of the model, apart from the graph and the assembly of the
 * product: what is compared with it has nothing in common with it but the document.
 */

/** ohm/km at 20 degC, class 1 and 2 copper: IEC 60228 Table 1 and 2 */
const OHM_PER_KM: Record<number, number> = { 1.5: 12.1, 2.5: 7.41, 4: 4.61, 6: 3.08, 10: 1.83, 35: 0.524 };
/** copper at 70 degC: 1 + 0.00393 x 50 */
const HOT = 1.1965;
const CONTACT = 1e-6;
const INSULATION = 1e9;

export interface State {
  condition: 'mains' | 'outage' | 'main-off';
  /** ids of devices that stand open */
  opened: ReadonlySet<string>;
  faults: readonly Fault[];
  /** the inverter has taken over by itself */
  tookOver?: boolean;
}

export interface Written {
  network: TestNetwork;
  node(part: string, mark: string): number;
}

const POLES: Partial<Record<Part['kind'], [string, string][]>> = {
  fuse: [['1', '2']],
  meter: [
    ['1', '4'],
    ['2', '3'],
  ],
  switch: [['1', '2']],
  regulator: [['1', '2']],
};
const BOTH: [string, string][] = [
  ['1', '2'],
  ['3', '4'],
];

export function networkOf(doc: Installation, name: string, { condition, opened, faults, tookOver = false }: State): Written {
  const index = new Map<string, number>();
  for (const part of doc.parts)
    for (const mark of isBar(part.kind) ? [''] : terminalsOf(part)) index.set(`${part.id} ${mark}`, index.size);
  const bars = new Set(doc.parts.filter(({ kind }) => isBar(kind)).map(({ id }) => id));
  const node = (part: string, mark: string): number => {
    const found = index.get(`${part} ${bars.has(part) ? '' : mark}`);
    if (found === undefined) throw new Error(`${part} has no ${mark}`);
    return found;
  };
  const branches: TestNetwork['branches'] = [];
  const pushed = new Map<number, number>();
  const push = (at: number, amps: number) => pushed.set(at, (pushed.get(at) ?? 0) + amps);
  const join = (a: number, b: number, ohm: number, reactance = 0) => void branches.push({ a, b, ohm, reactance });
  const { supply } = doc;
  const cut = new Set(faults.flatMap(({ wire }) => wire ?? []));
  const lostNeutral = faults.some(({ kind, wire, at }) => kind === 'neutral-open' && !wire && at === 'SUP');

  for (const wire of doc.wires) {
    if (cut.has(wire.id)) continue;
    const cable = doc.cables.find(({ id }) => id === wire.cable);
    const csa = cable && (wire.role === 'earth' ? (cable.cpc ?? cable.csa) : cable.csa);
    const ohm = cable ? (OHM_PER_KM[csa!]! * cable.length * HOT) / 1000 : CONTACT;
    join(node(...wire.from), node(...wire.to), ohm);
  }
  const load = (part: string, watts: number, pf: number, marks: [string, string]) => {
    const z = (supply.voltage ** 2 * pf) / watts;
    join(node(part, marks[0]), node(part, marks[1]), z * pf, z * Math.sqrt(1 - pf * pf));
  };
  for (const part of doc.parts) {
    const poles = POLES[part.kind] ?? ('poles' in part && part.poles === 1 ? BOTH.slice(0, 1) : BOTH);
    switch (part.kind) {
      case 'fuse':
      case 'meter':
      case 'switch':
      case 'regulator':
      case 'isolator':
      case 'mcb':
      case 'rcd':
      case 'rcbo': {
        const off = opened.has(part.id) || (condition === 'main-off' && part.id === 'Q1');
        if (!off) for (const [a, b] of poles) join(node(part.id, a), node(part.id, b), CONTACT);
        break;
      }
      case 'lamp':
      case 'fan':
      case 'appliance':
        if (part.watts) load(part.id, part.watts, part.pf ?? 1, ['L', 'N']);
        break;
      case 'socket':
        if (part.load) load(part.id, part.load, 1, ['L', 'N']);
        break;
      case 'electrode':
        join(node(part.id, 'E'), REFERENCE, supply.ra!);
        break;
      case 'supply': {
        // Settled points of the model: half of Ze in the protective conductor, the rest in the line; zln less that in
        // the neutral.
        const tt = supply.system === 'TT';
        const line = tt ? supply.zln! / 2 : supply.ze! / 2;
        if (condition !== 'outage') {
          join(node(part.id, 'L'), REFERENCE, line);
          push(node(part.id, 'L'), supply.voltage / line);
        }
        if (supply.system === 'TN-C-S') {
          join(node(part.id, 'N'), node(part.id, 'E'), CONTACT);
          if (!lostNeutral) join(node(part.id, 'E'), REFERENCE, supply.ze! / 2);
        } else {
          if (!lostNeutral) join(node(part.id, 'N'), REFERENCE, supply.zln! - line);
          if (!tt) join(node(part.id, 'E'), REFERENCE, supply.ze! / 2);
        }
        break;
      }
      case 'inverter': {
        join(node(part.id, 'in.E'), node(part.id, 'out.E'), CONTACT);
        const battery = tookOver || condition !== 'mains';
        if (!battery || part.neutral === 'through') join(node(part.id, 'in.N'), node(part.id, 'out.N'), CONTACT);
        if (!battery) {
          join(node(part.id, 'in.L'), node(part.id, 'out.L'), CONTACT);
          // A charger of 20 A on 12 V by 0.85: what a mains load it is
          load(part.id, (part.charge! * 12) / part.efficiency!, 1, ['in.L', 'in.N']);
        } else {
          const inside = 1e-3;
          join(node(part.id, 'out.L'), node(part.id, 'out.N'), inside);
          push(node(part.id, 'out.L'), supply.voltage / inside);
          push(node(part.id, 'out.N'), -supply.voltage / inside);
          if (part.bond) join(node(part.id, 'out.N'), node(part.id, 'out.E'), CONTACT);
        }
        break;
      }
      default:
        break;
    }
  }
  for (const { kind, at } of faults) {
    const ends = { 'line-to-case': ['L', 'E'], 'line-to-neutral': ['L', 'N'], 'neutral-to-earth': ['N', 'E'] } as const;
    // An inverter's case and output are meant.
    const end = (mark: string) => node(at, doc.parts.some(({ id, kind: is }) => id === at && is === 'inverter') ? `out.${mark}` : mark);
    if (kind !== 'neutral-open') join(end(ends[kind][0]), end(ends[kind][1]), CONTACT);
  }
  for (let each = 0; each < index.size; each++) join(each, REFERENCE, INSULATION);
  return { network: { name, size: index.size, branches, held: new Map(), pushed }, node };
}
