import { nameOf } from '../document/names';
import type { Installation, Part, PracticeId } from '../document/schema';
import { evaluate, type Evaluated, type Evaluation } from '../circuit/evaluate';
import { workOutEarth, type Earth } from '../circuit/earth';
import { buildGraph, type Graph } from '../terminals/graph';
import { traceFeeds, type Feeds } from '../terminals/feeds';
import { findSections, findWays, type Section, type Way } from '../terminals/ways';

/**
 * Everything a rule may look at: the document and what was worked out from it once, before any rule ran. A rule reads it
 * and yields violations; it changes nothing and keeps nothing between calls.
 *
 * To begin with:
 * - `parts(kind)` lists parts of a kind in order of designation; `name(part)` is what a person calls a part; `graph.parts`,
 *   `graph.cables`, `graph.places`, `graph.wires` look things up by id.
 * - `ways` are the outgoing devices with their wires; `sections` are the same for every overcurrent device, feeders too:
 *   `section.edges` are its line conductors (`graph.edges[n].wire`), `section.points` what it feeds, `section.next` the
 *   overcurrent devices after it.
 * - `evaluated` has one entry a condition (`mains`, `outage`, `main-off/B` ...). Its `points` say for every lamp, fan,
 *   appliance and socket whether it is fed, by which source, through which devices (`lineDevices`, from the source on), back
 *   through which (`neutralDevices`), over which edges (`lineEdges`, `neutralEdges`), under which overcurrent device and rcd.
 * - `mainSwitch`, `backups` (inverters that are on and have a battery), `earth` (what reaches the main earthing terminal).
 */
export interface Context {
  document: Installation;
  practice: PracticeId;
  graph: Graph;
  evaluation: Evaluation;
  /** conditions in order: mains, outage, main-off, each in every changeover position */
  evaluated: readonly Evaluated[];
  mainSwitch: Part | undefined;
  backups: Evaluation['backups'];
  sections: readonly Section[];
  ways: readonly Way[];
  feeds: Feeds;
  earth: Earth;
  parts(kind?: Part['kind']): readonly Part[];
  name(part: Part | string): string;
}

/** Works out once what the rules read. @param practice judged by this practice instead of the document's own */
export function buildContext(doc: Installation, practice: PracticeId = doc.practice): Context {
  const graph = buildGraph(doc);
  const evaluation = evaluate(graph);
  const apart = new Set(
    evaluation.evaluated.flatMap(({ crossed, lineLoops }) => [...crossed, ...lineLoops].map(({ edge }) => edge)),
  );
  const sections = findSections(graph, apart);
  const byKind = new Map<Part['kind'], Part[]>();
  for (const part of graph.document.parts) byKind.set(part.kind, [...(byKind.get(part.kind) ?? []), part]);
  return {
    document: graph.document,
    practice,
    graph,
    evaluation,
    evaluated: evaluation.evaluated,
    mainSwitch: evaluation.mainSwitch,
    backups: evaluation.backups,
    sections,
    ways: findWays(doc, graph, sections),
    feeds: traceFeeds(doc, graph),
    earth: workOutEarth(graph, evaluation),
    parts: (kind) => (kind ? (byKind.get(kind) ?? []) : graph.document.parts),
    name: (part) => nameOf(graph.document, typeof part === 'string' ? graph.parts.get(part)! : part),
  };
}
