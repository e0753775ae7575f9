import { addUp, type Figures, type WayFigures } from '../../circuit/way-figures';
import { workOutBackups } from '../../circuit/backup-figures';
import type { Condition, Source } from '../../circuit/conditions';
import type { Drawn } from '../../circuit/drawn';
import type { Evaluated, Evaluation, PointState } from '../../circuit/evaluate';
import { byDesignation, nameOf } from '../../document/names';
import { byCode, type Installation, type Part } from '../../document/schema';
import type { Graph } from '../../terminals/graph';
import { isPoint } from '../../terminals/roles-of-parts';
import type { Section, Way } from '../../terminals/ways';
import type { Context } from '../context';
import { liveOnMainOff } from '../live-after-main-off';
import { backupsOf, figuresOf } from '../readings/figures';
import { neutralFaults } from '../readings/neutral-faults';
import { onOwnRod } from '../readings/rcd-duty';
import { waysByPart } from '../shared-box-lines';
import { feedsByPart } from '../two-sources-unmarked';
import { breakers } from '../weak-breaking-capacity';
import { Beyond, onlyKnown } from './beyond';
import type { Touched } from './touched';

/**
 * The whole home again, put together of what was known of it and of the branches that an edit touched, examined anew. It
 * knows what rules ask by the ids of parts: who is fed, by what, how much. Paths and nets it does not know: asked for, it
 * throws `Beyond`.
 */

const mustBe = (holds: boolean, what: string): void => {
  if (!holds) throw new Beyond(what);
};

/** By id: what is known of all but the touched parts, and what is new of those. */
function mergedBy<T>(
  known: ReadonlyMap<string, T>,
  now: ReadonlyMap<string, T>,
  { before, after }: Touched,
): Map<string, T> {
  const merged = new Map<string, T>();
  for (const [id, value] of known) {
    if (!before.has(id)) merged.set(id, value);
    else if (after.has(id) && now.has(id)) merged.set(id, now.get(id)!);
  }
  const size = merged.size;
  for (const [id, value] of now) if (after.has(id)) merged.set(id, value);
  return merged.size === size ? merged : new Map([...merged].sort(([a], [b]) => byCode(a, b)));
}

function mergeEvaluated(known: Evaluated, now: Evaluated, parts: readonly Part[], { after }: Touched): Evaluated {
  const points = new Map<string, PointState>();
  const otherwise = new Map<string, readonly PointState[]>();
  for (const part of parts) {
    if (!isPoint(part)) continue;
    const from = after.has(part.id) ? now : known;
    points.set(part.id, from.points.get(part.id)!);
    const others = from.otherwise.get(part.id);
    if (others) otherwise.set(part.id, others);
  }
  const { name, base, positions, onBattery, sources } = now.condition;
  const condition = onlyKnown<Condition>('the condition', {
    name,
    base,
    positions,
    onBattery,
    sources: sources.map(({ part, kind }) => onlyKnown<Source>('the source', { part, kind })),
  });
  return onlyKnown<Evaluated>('the evaluation', {
    condition,
    crossed: [],
    lineLoops: [],
    neutralLoops: [],
    points,
    otherwise,
    asDrawn: points,
  });
}

/** Sections by device; those of the trunk with what follows them now. */
function mergeSections(
  known: readonly Section[],
  now: readonly Section[],
  touched: Touched,
  trunk: ReadonlySet<string>,
): Section[] {
  const of = (list: readonly Section[]) => new Map(list.map((section) => [section.device.id, section]));
  const anew = of(now);
  const merged = mergedBy(of(known), anew, touched);
  for (const id of trunk) {
    const before = merged.get(id);
    mustBe((before === undefined) === !anew.has(id), 'the sections of the trunk');
    if (!before) continue;
    const next = [
      ...before.next.filter((each) => !touched.before.has(each)),
      ...anew.get(id)!.next.filter((each) => touched.after.has(each)),
    ].sort();
    mustBe((next.length === 0) === (before.next.length === 0), 'whether a feeder of the trunk is a way');
    merged.set(id, onlyKnown<Section>('the section', { device: before.device, backup: before.backup, points: before.points, inverters: before.inverters, next }));
  }
  return [...merged.values()];
}

function mergeWays(known: readonly Way[], now: readonly Way[], touched: Touched, parts: ReadonlyMap<string, Part>, refs: ReadonlyMap<string, Part>): Way[] {
  const anew = new Map(now.filter(({ device }) => touched.after.has(device)).map((way) => [way.device, way]));
  const stays = ({ device, backup }: Way) =>
    anew.get(device)?.backup === backup && parts.get(device)!.ref === refs.get(device)!.ref;
  const here = known.filter(({ device }) => touched.before.has(device));
  // In the same order as before the numbers stay; to sort designations is dear.
  if (here.length === anew.size && here.every(stays))
    return known.map((way) => ({ ...(anew.get(way.device) ?? way), number: way.number }));
  const all = [...known.filter(({ device }) => !touched.before.has(device)), ...anew.values()];
  all.sort((a, b) => byCode(a.device, b.device));
  all.sort((a, b) => Number(a.backup) - Number(b.backup) || byDesignation(parts.get(a.device)!, parts.get(b.device)!));
  return all.map((way, i) => ({ ...way, number: i + 1 }));
}

const devicesOf = (drawn: readonly Drawn[], trunk: ReadonlySet<string>): string =>
  [...new Set(drawn.flatMap(({ lineDevices, neutralDevices }) => [...lineDevices, ...neutralDevices]))]
    .filter((id) => trunk.has(id))
    .sort()
    .join(' ');

function mergeFigures(known: Figures, now: Figures, touched: Touched, trunk: ReadonlySet<string>): Figures {
  const { practice } = known;
  const points = ({ drawn }: Figures) =>
    new Map(drawn.filter(({ isPoint: is }) => is).map((each) => [each.part.id, each] as const));
  const drawn = [
    ...mergedBy(points(known), points(now), touched).values(),
    ...now.drawn.filter(({ isPoint: is }) => !is),
  ];
  mustBe(devicesOf(known.drawn, trunk) === devicesOf(drawn, trunk), 'what the trunk feeds');
  const loads = mergedBy(known.loads, now.loads, touched);
  const together = addUp(drawn, loads, practice);
  const ways = mergedBy(known.ways, now.ways, touched);
  for (const [id, figures] of ways)
    if (trunk.has(id)) ways.set(id, { ...figures, ...together.carriedBy(id) } satisfies WayFigures);
  return onlyKnown<Figures>('the figures', { practice, drawn, loads, ways, ...together });
}

/** Puts down the readings that go by the id of a part. */
function giveReadings(context: Context, known: Context, now: Context, touched: Touched, trunk: ReadonlySet<string>): void {
  neutralFaults.give(context, []);
  onOwnRod.give(
    context,
    new Set([
      ...[...onOwnRod(known)].filter((id) => !touched.before.has(id)),
      ...[...onOwnRod(now)].filter((id) => touched.after.has(id)),
    ]),
  );
  waysByPart.give(context, mergedBy(waysByPart(known), waysByPart(now), touched));
  breakers.give(context, [
    ...mergedBy(
      new Map(breakers(known).map((each) => [each.device.id, each])),
      new Map(breakers(now).map((each) => [each.device.id, each])),
      touched,
    ).values(),
  ]);
  const kinds = (feeds: readonly string[] = []) => [...new Set(feeds)].sort().join(' ');
  for (const id of trunk)
    mustBe(kinds(feedsByPart(known).get(id)) === kinds(feedsByPart(now).get(id)), 'what feeds the trunk');
  feedsByPart.give(context, mergedBy(feedsByPart(known), feedsByPart(now), touched));
  const live = new Map(
    [...liveOnMainOff(known)].map(([inverter, before]) => {
      const anew = liveOnMainOff(now).get(inverter)!;
      mustBe(before.conditions.join() === anew.conditions.join(), 'when the backup feeds');
      const ids = [
        ...[...before.live].filter((id) => !touched.before.has(id)),
        ...[...anew.live].filter((id) => touched.after.has(id)),
      ];
      return [inverter, { live: new Set(ids), conditions: before.conditions }] as const;
    }),
  );
  liveOnMainOff.give(context, live);
  backupsOf.give(context, workOutBackups(now.graph, context.evaluation, figuresOf(context).drawn));
}

/** @param known of the home before the edit  @param now of the trunk and the touched branches after it */
export function mergeContexts(
  document: Installation,
  known: Context,
  now: Context,
  touched: Touched,
  trunk: ReadonlySet<string>,
): Context {
  const names = ({ evaluated }: Context) => evaluated.map(({ condition }) => condition.name).join();
  mustBe(names(known) === names(now), 'the conditions');
  mustBe(known.mainSwitch === now.mainSwitch, 'the main switch');
  const parts = new Map(document.parts.map((part) => [part.id, part]));
  const byKind = new Map<Part['kind'], Part[]>();
  for (const part of document.parts) {
    const same = byKind.get(part.kind);
    if (same) same.push(part);
    else byKind.set(part.kind, [part]);
  }
  const evaluated = known.evaluated.map((each, i) => mergeEvaluated(each, now.evaluated[i]!, document.parts, touched));
  const sections = mergeSections(known.sections, now.sections, touched, trunk);
  const graph = onlyKnown<Graph>('the net', {
    document,
    parts,
    places: now.graph.places,
    cables: new Map(document.cables.map((cable) => [cable.id, cable])),
    wires: new Map(document.wires.map((wire) => [wire.id, wire])),
    loose: [],
  });
  const { mainSwitch, backups, practice } = now;
  const context = onlyKnown<Context>('the home', {
    document,
    practice,
    graph,
    evaluation: onlyKnown<Evaluation>('the evaluation', { mainSwitch, backups, evaluated }),
    evaluated,
    mainSwitch,
    backups,
    sections,
    ways: mergeWays(known.ways, now.ways, touched, parts, known.graph.parts),
    parts: (kind) => (kind ? (byKind.get(kind) ?? []) : document.parts),
    name: (part) => nameOf(document, typeof part === 'string' ? parts.get(part)! : part),
  });
  figuresOf.give(context, mergeFigures(figuresOf(known), figuresOf(now), touched, trunk));
  giveReadings(context, known, now, touched, trunk);
  return context;
}
