'use client';

import { useEffect, useMemo, useRef } from 'react';
import type { Hands } from '@/components/sheet/hands';
import { NOTHING, type Selection } from '@/components/sheet/store';
import { useSheet } from '@/components/sheet/use-drawing';
import { useView, useViewStore } from '@/components/sheet/view';
import { buildOutline, partKey } from '@/diagram/outline/build-outline';
import { everyItem, pathTo, rowsOf, type OutlineRow, type TreeMove } from '@/diagram/outline/rows';
import type { OutlineItem } from '@/diagram/outline/types';
import type { Finding } from '@/diagram/rules/types';

export interface Outline {
  rows: readonly OutlineRow[];
  /** the row in hand */
  at: OutlineRow;
  selection: Selection;
  move(move: TreeMove): void;
  /** takes an item in hand on the sheet; a board and a room only when they are asked for by name */
  take(item: OutlineItem): void;
  /** adds an item's parts and wires to what is in hand, or takes them out of it */
  toggle(item: OutlineItem): void;
}

/** The item that stands for what is in hand on the sheet; null where several things are, or none. */
function keyInHand({ parts, wires }: Selection, root: OutlineItem): string | null {
  if (parts.length === 1) return partKey(parts[0]!);
  if (parts.length > 0 || wires.length !== 1) return null;
  for (const item of everyItem(root)) if (item.kind === 'wire' && item.wires[0] === wires[0]) return item.key;
  return null;
}

const ONE_PART: ReadonlySet<string> = new Set(['part', 'way', 'terminal', 'finding']);

/** True where what is in hand is what the item stands for, or a part of it: then the outline stays where it is. */
const isInHand = (item: OutlineItem, { parts, wires }: Selection): boolean =>
  item.kind === 'wire'
    ? wires.length === 1 && wires[0] === item.wires[0]
    : ONE_PART.has(item.kind) && parts.length === 1 && parts[0] === item.parts[0];

/** The outline of the drawing as it stands, unfolded as it was left; what is in hand on the sheet is in hand in it. */
export function useOutline(hands: Hands, findings: readonly Finding[]): Outline {
  const view = useViewStore();
  const document = useSheet(hands.store, (state) => state.document);
  const selection = useSheet(hands.store, (state) => state.selection);
  const open = useView((state) => state.outline.open);
  const wanted = useView((state) => state.outline.at);
  const root = useMemo(() => buildOutline(document, findings), [document, findings]);
  const rows = useMemo(() => rowsOf(root, open), [root, open]);
  const path = useRef<readonly string[]>([]);

  const set = (change: Partial<ReturnType<typeof view.getState>['outline']>) =>
    view.getState().set({ outline: { ...view.getState().outline, ...change } });

  // What went from the drawing gives way to what it hung from.
  const shown = new Map(rows.map((row) => [row.item.key, row]));
  // eslint-disable-next-line react-hooks/refs -- the way to the item before is a fallback, read only when that item is gone
  const at = shown.get(wanted) ?? [...path.current].reverse().flatMap((key) => shown.get(key) ?? [])[0] ?? rows[0]!;

  const take = (item: OutlineItem) => {
    const { select } = hands.store.getState();
    if (item.terminal) select({ parts: [item.terminal[0]], wires: [], terminal: item.terminal });
    else if (item.kind === 'wire') select({ parts: [], wires: item.wires, terminal: null });
    else if (item.kind === 'part' || item.kind === 'way') hands.take(item.parts[0]!);
    else if (item.kind === 'finding') {
      view.getState().set({ finding: item.finding ?? null });
      if (item.parts[0]) hands.take(item.parts[0]);
      else if (item.wires[0]) select({ parts: [], wires: item.wires, terminal: null });
    } else select(NOTHING);
  };

  useEffect(() => {
    if (at.item.key === wanted) return;
    // What lost its feed stands elsewhere in the outline now: the line in hand goes there with it.
    const key = [...path.current].reverse().find((candidate) => pathTo(root, candidate)) ?? at.item.key;
    const item = [...everyItem(root)].find((candidate) => candidate.key === key)!;
    set({ at: key, open: new Set([...view.getState().outline.open, ...(pathTo(root, key) ?? [])]) });
    const { parts, wires } = hands.store.getState().selection;
    if (parts.length + wires.length === 0) take(item);
    // eslint-disable-next-line react-hooks/exhaustive-deps -- only when the item in hand has gone
  }, [at, wanted]);

  useEffect(() => {
    if (at.item.key === wanted) path.current = [...(pathTo(root, at.item.key) ?? []), at.item.key];
  }, [root, at, wanted]);

  useEffect(() => {
    const { outline } = view.getState();
    const here = rows.find((row) => row.item.key === outline.at);
    if (here && isInHand(here.item, selection)) return;
    const key = keyInHand(selection, root);
    const above = key === null ? null : pathTo(root, key);
    if (key === null || !above) return;
    view.getState().set({ outline: { ...outline, at: key, open: new Set([...outline.open, ...above]) } });
    // Only what is taken in hand leads the outline there: folding a line over it does not.
    // eslint-disable-next-line react-hooks/exhaustive-deps -- see above
  }, [selection, view]);

  return {
    rows,
    at,
    selection,
    take,
    move({ to, unfold = [], fold }) {
      const next = new Set([...view.getState().outline.open, ...unfold]);
      if (fold) next.delete(fold);
      set({ at: to, open: next });
      const item = shown.get(to)?.item;
      if (item && to !== at.item.key) take(item);
    },
    toggle(item) {
      const { selection: now, select } = hands.store.getState();
      const turn = (ids: readonly string[], own: readonly string[]) =>
        own.every((id) => ids.includes(id))
          ? ids.filter((id) => !own.includes(id))
          : [...ids, ...own.filter((id) => !ids.includes(id))];
      if (item.kind === 'wire') select({ wires: turn(now.wires, item.wires), terminal: null });
      else if (item.parts.length > 0) select({ parts: turn(now.parts, item.parts), terminal: null });
    },
  };
}
