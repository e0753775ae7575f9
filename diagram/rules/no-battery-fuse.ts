import { batteryFuseA } from '../calculations/battery-lead';
import { dcStrings, fusesOn, type DcString } from '../circuit/dc-leads';
import type { Part, PartOf, Wire } from '../document/schema';
import { COMMON_PRACTICE, recalled } from './clauses';
import type { Context } from './context';
import { backupsOf } from './readings/figures';
import type { Remedy, Rule } from './types';
import { capital, say, sayParts } from './readings/words';

/** m of plus lead that may lie before the fuse: common practice, no source. */
const CLOSE_M = 2;

/** Edges of the plus lead from the battery up to its first fuse or breaker; all of them where there is none. */
function beforeFuse({ graph }: Context, { plus }: DcString): { edges: number[]; fused: boolean } {
  const fromBattery = [...plus].reverse();
  const at = fromBattery.findIndex((number) => fusesOn(graph, [number]).length > 0);
  return at < 0 ? { edges: fromBattery, fused: false } : { edges: fromBattery.slice(0, at), fused: true };
}

const cableLength = ({ graph }: Context, edges: readonly number[]): number =>
  edges.reduce((sum, number) => sum + (graph.cables.get(graph.edges[number]!.wire?.cable ?? '')?.length ?? 0), 0);

/** A dc fuse at the battery's plus: the lead that ends there goes on from its other side. */
function fuseIn(context: Context, inverter: PartOf<'inverter'>, string: DcString): Remedy[] {
  const { graph } = context;
  const battery = string.batteries[0]!;
  const wires = string.plus
    .map((number) => graph.edges[number]!.wire)
    .filter((wire): wire is Wire => wire !== undefined);
  const last = wires.at(-1);
  const dcAmps = backupsOf(context).find((each) => each.inverter.id === inverter.id)?.dcAmps ?? null;
  const rating = dcAmps === null ? null : batteryFuseA(dcAmps);
  if (!last || rating === null) return [];
  const id = `${battery.id}.fuse`;
  if (graph.parts.has(id) || graph.wires.has(id)) return [];
  const fuse: Part = {
    id,
    kind: 'fuse',
    rating,
    standard: 'dc',
    ...(battery.place !== undefined && { place: battery.place }),
  };
  const isBattery = ([part, mark]: readonly [string, string]) => part === battery.id && mark === '+';
  const onward: Wire = isBattery(last.from) ? { ...last, from: [id, '2'] } : { ...last, to: [id, '2'] };
  const link: Wire = {
    id,
    from: [battery.id, '+'],
    to: [id, '1'],
    role: 'dc+',
    ...(last.colour && { colour: last.colour }),
  };
  return [
    { label: `Fit a dc fuse of ${rating} A at its plus`, patch: { set: { parts: [fuse], wires: [onward, link] } } },
  ];
}

/** No dc fuse or breaker close to a battery's plus. */
export const noBatteryFuse: Rule = {
  meta: {
    id: 'no-battery-fuse',
    severity: 'danger',
    group: 'backup',
    title: 'Nothing opens a short circuit of the battery',
    clauses: [recalled('IEC 60364-4-43', '434.2'), COMMON_PRACTICE],
    lesson:
      'A battery drives thousands of amperes through a dropped spanner, and no breaker in the board sees any of ' +
      'it. Without a fuse at its plus the leads glow from end to end; with one far away, they glow up to it.',
    remedy: 'Fit a dc fuse or dc breaker right at the plus of the bank.',
  },
  *check(context) {
    for (const inverter of context.parts('inverter')) {
      if (inverter.kind !== 'inverter') continue;
      const { strings, reversed } = dcStrings(context.graph, inverter);
      for (const string of strings) {
        const { edges, fused } = beforeFuse(context, string);
        const far = fused && cableLength(context, edges) > CLOSE_M;
        // A bank the wrong way round with its fuse in the other lead is put right by turning it.
        if ((fused && !far) || (reversed.length > 0 && fusesOn(context.graph, string.edges).length > 0)) continue;
        const battery = string.batteries[0]!;
        yield {
          heading: far
            ? `The fuse of ${say(context, battery.id)} is too far away`
            : `${capital(say(context, battery.id))} has no fuse`,
          message: far
            ? `${Math.round(10 * cableLength(context, edges)) / 10} m of lead lie between the plus of ${say(context, battery.id)} and its fuse; nothing opens a fault there.`
            : `No dc fuse or breaker lies between the plus of ${sayParts(context, [battery.id])} and ${say(context, inverter.id)}. A short circuit of the leads burns until the battery is empty.`,
          parts: [battery.id],
          wires: edges.flatMap((number) => context.graph.edges[number]!.wire?.id ?? []),
          remedies:
            far || string.batteries.some((each) => reversed.includes(each)) ? [] : fuseIn(context, inverter, string),
        };
      }
    }
  },
};
