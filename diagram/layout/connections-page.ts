import { byDesignation } from '../document/names';
import { byCode, type Cable, type End, type Installation, type Part, type Wire } from '../document/schema';
import type { Way } from '../terminals/ways';
import { ON_BOARD, isLongBar } from './connections-page-state';
import { coreOf } from './overview-graph';
import { planOverview, type OverviewPlan } from './overview-plan';
import { walk } from './overview-tree';
import { perDocument } from './per-document';
import { lengthText, cableSize } from './wording';
import { printedRef } from './overview-labels';

/** What one page of the connections face holds: the parts of a place, their wires, and the cables that come or go. */

export interface Core {
  wire: Wire;
  /** of the run that is drawn of it here: the wire's own id, with {@link LEAVING} where it comes in on the same page too */
  run: string;
  /** the end on this page, and the one elsewhere */
  here: End;
  far: End;
  core: 'L' | 'N' | 'E';
  /** what stands at its stub: the device or bar it comes from */
  home: string;
}

export interface PageCable {
  id: string;
  cores: Core[];
  /** feeds another place from here */
  outgoing: boolean;
  /** drawn at the foot: a way leaving its board */
  atFoot: boolean;
  /** written over its brace: the first line bold */
  lines: string[];
}

/** Marks the run of a core at the foot of the board whose load stands on the same page. */
export const LEAVING = '@board';
/** A board of more ways is too wide for the cores of its own room to run past it: they leave and come in as all others. */
const FEW_WAYS = 4;

export interface Page {
  place: string;
  parts: Part[];
  inner: Wire[];
  cables: PageCable[];
}

export interface ConnectionPage {
  /** id of the place; '' for parts without one */
  place: string;
  name: string;
}

export function placeOf(places: ReadonlySet<string>, part: Part): string {
  return part.place !== undefined && places.has(part.place) ? part.place : '';
}

const placeIds = (doc: Installation): Set<string> => new Set(doc.places.map((place) => place.id));

/** The pages of the connections face: the intake first, then the places in the document's order, each if it holds a part. */
export function connectionPages(doc: Installation): ConnectionPage[] {
  const ids = placeIds(doc);
  const held = new Set(doc.parts.map((part) => placeOf(ids, part)));
  const places = [...doc.places].sort(
    (a, b) => Number(b.kind === 'intake') - Number(a.kind === 'intake') || byCode(a.id, b.id),
  );
  const pages = places.filter((place) => held.has(place.id)).map((place) => ({ place: place.id, name: place.name }));
  return held.has('') ? [...pages, { place: '', name: 'No place yet' }] : pages;
}

const CORE_ORDER = { L: 0, N: 1, E: 2 };

/** Wires of the line tree, and whether the source lies at their far end as seen from a part. */
function feedingWires(plan: OverviewPlan): Map<string, string> {
  const child = new Map<string, string>();
  const roots = [
    ...(plan.tree.mains ? [plan.tree.mains] : []),
    ...plan.tree.backups,
    ...plan.tree.batteries,
    ...plan.tree.loose,
  ];
  for (const root of roots)
    for (const node of walk(root)) for (const wire of node.via?.wires ?? []) child.set(wire, node.part.id);
  return child;
}

/** The bar or device a core comes from: straight on through joints of its own kind. */
function homes(doc: Installation, byId: ReadonlyMap<string, Part>): (wire: Wire, from: End) => string {
  const at = new Map<string, Wire[]>();
  for (const wire of doc.wires)
    for (const [id] of [wire.from, wire.to]) {
      const list = at.get(id);
      if (list) list.push(wire);
      else at.set(id, [wire]);
    }
  return (wire, from) => {
    const seen = new Set<string>();
    let queue = [from[0]];
    while (queue.length > 0) {
      const next: string[] = [];
      for (const id of queue) {
        const part = byId.get(id);
        if (!part || seen.has(id)) continue;
        seen.add(id);
        if (part.kind !== 'joint') return printedRef(part);
        for (const other of at.get(id) ?? []) {
          if (coreOf(other.role) !== coreOf(wire.role) || other.id === wire.id) continue;
          next.push(other.from[0] === id ? other.to[0] : other.from[0]);
        }
      }
      queue = next.sort(byCode);
    }
    return '';
  };
}

/** What all pages of a document are read from. */
const book = perDocument((doc) => {
  const plan = planOverview(doc);
  const ids = placeIds(doc);
  const { byId } = plan.graph;
  const pageOf = new Map([...byId].map(([id, part]) => [id, placeOf(ids, part)]));
  const wires = new Map<string, Wire[]>();
  for (const wire of [...doc.wires].sort((a, b) => byCode(a.id, b.id)))
    for (const place of new Set([pageOf.get(wire.from[0]), pageOf.get(wire.to[0])])) {
      if (place === undefined) continue;
      const list = wires.get(place);
      if (list) list.push(wire);
      else wires.set(place, [wire]);
    }
  const partsOf = new Map<string, Part[]>();
  for (const part of [...byId.values()].sort(byDesignation)) {
    const list = partsOf.get(pageOf.get(part.id)!);
    if (list) list.push(part);
    else partsOf.set(pageOf.get(part.id)!, [part]);
  }
  const wayOf = new Map<string, Way>();
  for (const way of plan.ways) for (const wire of way.wires) if (!wayOf.has(wire)) wayOf.set(wire, way);
  const heads = new Map<string, number>();
  for (const { head } of plan.content.hanging) {
    const place = pageOf.get(head?.part.id ?? '');
    if (place !== undefined) heads.set(place, (heads.get(place) ?? 0) + 1);
  }
  return {
    pageOf,
    partsOf,
    wayOf,
    heads,
    wires,
    feeds: feedingWires(plan),
    homeOf: homes(doc, byId),
    cables: new Map(doc.cables.map((cable) => [cable.id, cable])),
  };
});

/** Reads one page of a document. */
export function readPage(doc: Installation, plan: OverviewPlan, place: string): Page {
  const { byId } = plan.graph;
  const { pageOf, partsOf, wayOf, heads, wires, feeds, homeOf, cables: cablesById } = book(doc);
  const inner: Wire[] = [];
  const groups = new Map<string, Core[]>();
  const note = (key: string, wire: Wire, here: End, far: End, run = wire.id) =>
    groups.set(key, [
      ...(groups.get(key) ?? []),
      { wire, run, here, far, core: coreOf(wire.role), home: homeOf(wire, far) },
    ]);
  const ways = heads.get(place) ?? 0;
  const onBoard = ([id]: End): boolean => ON_BOARD.has(byId.get(id)!.kind) || isLongBar(byId.get(id)!.kind);
  for (const wire of wires.get(place) ?? []) {
    const [from, to] = [pageOf.get(wire.from[0]) === place, pageOf.get(wire.to[0]) === place];
    const [here, far] = from ? [wire.from, wire.to] : [wire.to, wire.from];
    if (from !== to)
      note(wire.cable ? `cable ${wire.cable}` : `to ${byId.get(far[0])?.place ?? far[0]} at ${here[0]}`, wire, here, far);
    else if (wire.cable && ways > FEW_WAYS && onBoard(here) !== onBoard(far)) {
      const [board, load] = onBoard(here) ? [here, far] : [far, here];
      note(`cable ${wire.cable}`, wire, load, board);
      note(`cable ${wire.cable}${LEAVING}`, wire, board, load, wire.id + LEAVING);
    } else inner.push(wire);
  }
  const cables = [...groups].map(([id, cores]): PageCable => {
    cores.sort((a, b) => CORE_ORDER[a.core] - CORE_ORDER[b.core] || byCode(a.wire.id, b.wire.id));
    const live = cores.find(({ core }) => core === 'L');
    const leaves = id.endsWith(LEAVING);
    const comes = groups.has(id + LEAVING);
    // with the source at the far end it comes in
    const fedHere =
      live !== undefined && feeds.get(live.wire.id) !== undefined && feeds.get(live.wire.id) !== live.here[0];
    const outgoing = leaves || (fedHere && !comes);
    const head = live && plan.content.hanging.find((item) => item.head?.part.id === live.here[0]);
    return {
      id,
      cores,
      outgoing,
      atFoot: leaves || (outgoing && live !== undefined && (head !== undefined || isBoardPart(byId.get(live.here[0])))),
      lines: cableLines(doc, plan, cores, outgoing, cablesById, wayOf),
    };
  });
  cables.sort((a, b) => byCode(a.id, b.id));
  return { place, parts: partsOf.get(place) ?? [], inner, cables };
}

const isBoardPart = (part: Part | undefined): boolean =>
  part !== undefined &&
  ['mcb', 'rcbo', 'rcd', 'isolator', 'fuse', 'inverter', 'line-bar', 'changeover'].includes(part.kind);

function cableLines(doc: Installation, plan: OverviewPlan, cores: readonly Core[],
  outgoing: boolean,
  cables: ReadonlyMap<string, Cable>,
  wayOf: ReadonlyMap<string, Way>,
): string[] {
  const first = cores[0]!;
  const cable: Cable | undefined = cables.get(first.wire.cable ?? '');
  const way = cores.map(({ wire }) => wayOf.get(wire.id)).find((found) => found !== undefined);
  const far = plan.graph.byId.get(first.far[0]);
  const here = plan.graph.byId.get(first.here[0]);
  const room = far?.place === here?.place ? undefined : doc.places.find((place) => place.id === far?.place)?.name;
  const named = way ? `way ${way.number}${way.backup ? ', backup' : ''}` : (cable?.ref ?? '');
  const data = cable ? [cableSize(cable, cores.length), lengthText(cable.length)].join(' ') : '';
  const where = far ? [outgoing ? 'to' : 'from', room ?? printedRef(far)].join(' ') : 'to nowhere';
  return [named, [data, where].filter(Boolean).join(' ')].filter(Boolean);
}
