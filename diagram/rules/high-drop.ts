import type { Drawn } from '../circuit/drawn';
import type { Fed } from '../circuit/way-paths';
import { dropLimitPercent } from '../calculations/volt-drop';
import type { Cable } from '../document/schema';
import { exceeds, percent, sayCable } from './readings/amounts';
import { recalled } from './clauses';
import type { Context } from './context';
import { fedIn, figuresOf } from './readings/figures';
import { lackOfCables, lackOfWatts } from './readings/lacking';
import { changeCables } from './readings/remedies';
import type { Remedy, Rule } from './types';
import { be, capital, sayParts } from './readings/words';

interface Dim {
  each: Drawn;
  fed: Fed;
  dropPercent: number;
  limitPercent: number;
}

/** Points that get less than the practice allows, by the cable in which most is lost: that is the one to change. */
function dimByCable(context: Context): Map<string, Dim[]> {
  const { graph, document } = context;
  const { paths, drawn, practice } = figuresOf(context);
  const { lighting, other, longRun } = practice.voltDrop;
  const found = new Map<string, Dim[]>();
  for (const each of drawn) {
    const fed = paths.fed.get(each.part.id);
    if (!each.isPoint || !fed || fed.dropV === null) continue;
    const base = each.part.kind === 'lamp' ? lighting.value : other.value;
    const limitPercent = dropLimitPercent(base, fed.lengthM, longRun.value);
    const dropPercent = (100 * fed.dropV) / document.supply.voltage;
    if (!exceeds(dropPercent, limitPercent)) continue;
    const byCable = new Map<string, number>();
    for (const [number, volts] of fed.losses) {
      const id = graph.edges[number]!.wire!.cable!;
      byCable.set(id, (byCable.get(id) ?? 0) + volts);
    }
    const [worst] = [...byCable].sort((a, b) => b[1] - a[1])[0]!;
    found.set(worst, [...(found.get(worst) ?? []), { each, fed, dropPercent, limitPercent }]);
  }
  return found;
}

/** The next size of the worst cable with which every point behind it gets enough. */
function thicker(context: Context, cable: Cable, dim: readonly Dim[]): Remedy[] {
  const { graph, document } = context;
  const { practice } = figuresOf(context);
  const lost = ({ fed }: Dim) =>
    [...fed.losses].reduce(
      (sum, [number, volts]) => sum + (graph.edges[number]!.wire!.cable === cable.id ? volts : 0),
      0,
    );
  const enough = (csa: number) =>
    dim.every((each) => {
      // Resistance falls with the area a little more than in proportion: a size that is enough by area is enough.
      const saved = lost(each) * (1 - cable.csa / csa);
      return each.dropPercent - (100 * saved) / document.supply.voltage <= each.limitPercent;
    });
  const csa = practice.csaMm2.find((size) => size > cable.csa && enough(size));
  if (csa === undefined) return [];
  const cpc = Math.max(practice.cpcMm2.value[csa] ?? csa, cable.cpc ?? 0);
  return [changeCables(`Pull ${csa} mm2 in its place`, [{ ...cable, csa, cpc }])];
}

/** Volt drop from the origin at the design currents, conductors at their limiting temperature. */
export const highDrop: Rule = {
  meta: {
    id: 'high-drop',
    severity: 'defect',
    group: 'overload',
    title: 'Too many volts are lost on the way',
    clauses: [recalled('IEC 60364-5-52', '525, Table G.52.1'), recalled('BS 7671', '525, Appendix 4 section 6.4')],
    lesson:
      'A long thin run heats itself with the volts it takes. Lamps dim when a heater starts, motors labour and ' +
      'run hot, and the current of a fault at the far end is small as well.',
    remedy: 'Pull a thicker cable where most is lost, shorten the run, or share the load between two ways.',
  },
  *check(context) {
    const { graph } = context;
    for (const [id, dim] of dimByCable(context)) {
      const worst = dim.reduce((a, b) => (b.dropPercent - b.limitPercent > a.dropPercent - a.limitPercent ? b : a));
      const cable = graph.cables.get(id)!;
      const points = dim.map(({ each }) => each.part.id);
      const ways = [...new Set(dim.flatMap(({ each }) => (each.way === null ? [] : [each.way])))];
      yield {
        heading: `${capital(sayParts(context, points, 3))} ${be(points.length)} at the end of too long a run`,
        message:
          `${percent(worst.dropPercent)} is lost up to ${sayParts(context, [worst.each.part.id])}, ${percent(worst.limitPercent)} is allowed; ` +
          `most of it in ${sayCable(cable)} of ${cable.length} m.`,
        parts: [...ways, worst.each.part.id],
        wires: [...worst.fed.losses.keys()]
          .map((number) => graph.edges[number]!.wire!)
          .filter((wire) => wire.cable === id)
          .map((wire) => wire.id),
        conditions: fedIn(
          context,
          dim.map(({ each }) => each),
        ),
        remedies: thicker(context, cable, dim),
      };
    }
  },
  *lacks(context) {
    const { drawn, ways } = figuresOf(context);
    const edges = new Set(drawn.flatMap(({ lineEdges, neutralEdges }) => [...lineEdges, ...neutralEdges]));
    yield* lackOfCables(
      context,
      [...edges].sort((a, b) => a - b),
    );
    for (const figures of ways.values()) yield* lackOfWatts(context, figures);
  },
};
