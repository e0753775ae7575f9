import { isBar } from '../document/kinds';
import type { Installation, Kind, Part, Position } from '../document/schema';
import { symbolFor } from '../symbols';
import { barLength, type BarKind } from '../symbols/bar';
import type { Page } from './connections-page';
import { m } from './overview-metrics';
import type { OverviewPlan } from './overview-plan';
import type { TreeNode } from './overview-tree';
import { perDocument } from './per-document';

/** What the steps of placing a page of the connections face share: its measures, and what stands already. */

/** 1/100 mm: the brace of an arriving cable, where its cores begin, and the first row of parts below. */
export const TOP = { text: m(3), brace: m(7), cores: m(8), first: m(18) } as const;
/** Between the terminals of a way's device and its neutral and earth cores. */
export const FOOT_CORE = m(2);
/** From one way's earth core to the next way's device: its designation stands there. */
export const FOOT_GAP = m(4);
/** From a device's lower edge to where its way's cable leaves, and the brace below. */
export const FOOT = { cores: m(7), brace: m(9) } as const;
export const LEFT = m(11);
export const ROW_GAP = m(6);
export const COLUMN_GAP = m(8);

/** Used marks of each bar and joint of a document, in number order: it is drawn with these and one free. */
export const usedMarks = perDocument((doc: Installation): ReadonlyMap<string, readonly string[]> => {
  const marks = new Map<string, Set<string>>();
  for (const wire of doc.wires)
    for (const [id, mark] of [wire.from, wire.to]) {
      const set = marks.get(id) ?? new Set();
      if (/^[1-9]\d{0,3}$/.test(mark)) set.add(mark);
      marks.set(id, set);
    }
  return new Map([...marks].map(([id, set]) => [id, [...set].sort((a, b) => Number(a) - Number(b))]));
});

/** Kinds that stand on a board, over or under its bars. */
export const ON_BOARD: ReadonlySet<Kind> = new Set<Kind>([
  'supply',
  'meter',
  'isolator',
  'mcb',
  'rcd',
  'rcbo',
  'fuse',
  'spd',
  'changeover',
  'inverter',
  'electrode',
  'bond',
]);

export const isLongBar = (kind: Kind): boolean => isBar(kind) && kind !== 'joint';

/** The size of a part on this face; a bar's length follows from its conductors and is given by the scene. */
export function sizeOf(part: Part, marks: ReadonlyMap<string, readonly string[]>): { width: number; height: number } {
  const symbol = symbolFor(part, 'connections', marks.get(part.id)?.length);
  return isBar(part.kind)
    ? { width: barLength(part.kind as BarKind, Math.max(2, marks.get(part.id)?.length ?? 2)), height: symbol.height }
    : { width: symbol.width, height: symbol.height };
}

export interface PageState {
  readonly plan: OverviewPlan;
  readonly page: Page;
  readonly positions: Map<string, Position>;
  readonly marks: ReadonlyMap<string, readonly string[]>;
  readonly own: ReadonlySet<string>;
  /** where the next block begins, and the lower edge of all so far */
  x: number;
  bottom: number;
}

export const startPage = (doc: Installation, plan: OverviewPlan, page: Page): PageState => ({
  plan,
  page,
  positions: new Map(),
  marks: usedMarks(doc),
  own: new Set(page.parts.map((part) => part.id)),
  x: LEFT,
  bottom: TOP.first,
});

/** The size of a part on this page. */
export function sizeOn(s: PageState, part: Part): { width: number; height: number } {
  return sizeOf(part, s.marks);
}

/** Puts a part by its upper left corner; tells its other edges. */
export function putPart(s: PageState, part: Part, x: number, y: number): { right: number; bottom: number } {
  s.positions.set(part.id, { x, y });
  const { width, height } = sizeOn(s, part);
  s.bottom = Math.max(s.bottom, y + height);
  return { right: x + width, bottom: y + height };
}

/** True for a node of this page that has no place yet. */
export function isOpen(s: PageState, node: TreeNode): boolean {
  return s.own.has(node.part.id) && !s.positions.has(node.part.id);
}
