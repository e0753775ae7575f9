import type { Condition, Source } from '../../circuit/conditions';
import type { Evaluated, Evaluation } from '../../circuit/evaluate';
import { byDesignation, nameOf } from '../../document/names';
import type { Installation, Part } from '../../document/schema';
import type { Graph } from '../../terminals/graph';
import type { Section, Way } from '../../terminals/ways';
import type { Context } from '../context';
import { figuresOf } from '../readings/figures';
import { mustBe, onlyKnown } from './beyond';
import { mergeFigures } from './merged-figures';
import { giveReadings } from './merged-readings';
import { insertInOrder, mergedMap } from './merging';
import type { Touched } from './touched';

/**
 * The whole home again, put together of what was known of it and of the branches that an edit touched, examined anew. It
 * knows what rules ask by the ids of parts: who is fed, by what, how much. Paths and nets it does not know: asked for, it
 * throws `Beyond`.
 */

function mergeEvaluated(known: Evaluated, now: Evaluated, touched: Touched): Evaluated {
  const points = mergedMap(known.points, now.points, touched);
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
    otherwise: mergedMap(known.otherwise, now.otherwise, touched),
    asDrawn: points,
  });
}

/** Sections by device; those of the trunk with what follows them now. */
function mergeSections(
  known: readonly Section[],
  now: readonly Section[],
  touched: Touched,
  spine: ReadonlySet<string>,
): Section[] {
  const of = (list: readonly Section[]) => new Map(list.map((section) => [section.device.id, section]));
  const anew = of(now);
  const merged = mergedMap(of(known), anew, touched);
  for (const id of spine) {
    const before = merged.get(id);
    mustBe((before === undefined) === !anew.has(id), 'the sections of the trunk');
    if (!before) continue;
    const next = [
      ...before.next.filter((each) => !touched.before.has(each)),
      ...anew.get(id)!.next.filter((each) => touched.after.has(each)),
    ].sort();
    mustBe((next.length === 0) === (before.next.length === 0), 'whether a feeder of the trunk is a way');
    const { device, backup, points, inverters } = before;
    merged.set(id, onlyKnown<Section>('the section', { device, backup, points, inverters, next }));
  }
  return [...merged.values()];
}

function mergeWays(known: readonly Way[], now: readonly Way[], touched: Touched, parts: ReadonlyMap<string, Part>): Way[] {
  const ways = known.filter(({ device }) => !touched.before.has(device));
  insertInOrder(
    ways,
    now.filter(({ device }) => touched.after.has(device)),
    (a, b) =>
      Number(a.backup) - Number(b.backup) || byDesignation(parts.get(a.device)!, parts.get(b.device)!),
  );
  return ways.map((way, i) => (way.number === i + 1 ? way : { ...way, number: i + 1 }));
}

/**
 * @param known of the home before the edit
 * @param now of the touched branches with what they hang on, after it
 * @param spine what of the trunk `now` has
 */
export function mergeContexts(
  document: Installation,
  known: Context,
  now: Context,
  touched: Touched,
  spine: ReadonlySet<string>,
): Context {
  const names = ({ evaluated }: Context) => evaluated.map(({ condition }) => condition.name).join();
  mustBe(names(known) === names(now), 'the conditions');
  // Where no isolator stands before the home, which device is taken for the main switch hangs on all of the branches.
  mustBe(known.mainSwitch === now.mainSwitch && now.mainSwitch?.kind === 'isolator', 'the main switch');
  const parts = mergedMap(known.graph.parts, now.graph.parts, touched);
  const evaluated = known.evaluated.map((each, i) => mergeEvaluated(each, now.evaluated[i]!, touched));
  const sections = mergeSections(known.sections, now.sections, touched, spine);
  const graph = onlyKnown<Graph>('the net', { document, parts, places: now.graph.places, loose: [] });
  const { mainSwitch, backups, practice } = now;
  const byKind = new Map<Part['kind'], Part[]>();
  const partsOf = (kind: Part['kind']) => {
    const list = byKind.get(kind) ?? document.parts.filter((part) => part.kind === kind);
    byKind.set(kind, list);
    return list;
  };
  const context = onlyKnown<Context>('the home', {
    document,
    practice,
    graph,
    evaluation: onlyKnown<Evaluation>('the evaluation', { mainSwitch, backups, evaluated }),
    evaluated,
    mainSwitch,
    backups,
    sections,
    ways: mergeWays(known.ways, now.ways, touched, parts),
    parts: (kind) => (kind ? partsOf(kind) : document.parts),
    name: (part) => nameOf(document, typeof part === 'string' ? parts.get(part)! : part),
  });
  figuresOf.give(context, mergeFigures(figuresOf(known), figuresOf(now), touched, spine));
  giveReadings(context, known, now, touched, spine);
  return context;
}
