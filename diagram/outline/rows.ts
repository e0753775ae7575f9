import type { OutlineItem } from './types';

/** The outline as rows on a screen: what is unfolded, in order, with what a screen reader is told of each. */
export interface OutlineRow {
  item: OutlineItem;
  /** from 1 */
  level: number;
  setSize: number;
  /** from 1 */
  position: number;
  /** null: nothing below it */
  expanded: boolean | null;
  parent: string | null;
}

/** Rows in sight when the items of `open` are unfolded. */
export function rowsOf(root: OutlineItem, open: ReadonlySet<string>): OutlineRow[] {
  const rows: OutlineRow[] = [];
  const visit = (item: OutlineItem, level: number, setSize: number, position: number, parent: string | null) => {
    const expanded = item.children.length === 0 ? null : open.has(item.key);
    rows.push({ item, level, setSize, position, expanded, parent });
    if (expanded)
      item.children.forEach((child, i) => visit(child, level + 1, item.children.length, i + 1, item.key));
  };
  visit(root, 1, 1, 1, null);
  return rows;
}

/** Keys of the items above one, from the root; null where it is not in the outline. */
export function pathTo(root: OutlineItem, key: string): string[] | null {
  const path: string[] = [];
  const visit = (item: OutlineItem): boolean => {
    if (item.key === key) return true;
    path.push(item.key);
    if (item.children.some(visit)) return true;
    path.pop();
    return false;
  };
  return visit(root) ? path : null;
}

/** Every item, from the root down. */
export function* everyItem(item: OutlineItem): Iterable<OutlineItem> {
  yield item;
  for (const child of item.children) yield* everyItem(child);
}

export type TreeKey = 'ArrowUp' | 'ArrowDown' | 'ArrowLeft' | 'ArrowRight' | 'Home' | 'End' | '*';

/** What a key of the tree pattern does: another item in hand, and items to fold or unfold. */
export interface TreeMove {
  to: string;
  unfold?: readonly string[];
  fold?: string;
}

/** One step by the keys of the ARIA tree pattern. @returns null where the key leads nowhere */
export function treeMove(rows: readonly OutlineRow[], at: string, key: TreeKey): TreeMove | null {
  const index = rows.findIndex((row) => row.item.key === at);
  const row = rows[index];
  if (!row) return rows[0] ? { to: rows[0].item.key } : null;
  const step = (to: OutlineRow | undefined): TreeMove | null => (to ? { to: to.item.key } : null);
  switch (key) {
    case 'ArrowUp':
      return step(rows[index - 1]);
    case 'ArrowDown':
      return step(rows[index + 1]);
    case 'Home':
      return step(rows[0]);
    case 'End':
      return step(rows.at(-1));
    case 'ArrowRight':
      if (row.expanded === null) return null;
      return row.expanded ? step(rows[index + 1]) : { to: at, unfold: [at] };
    case 'ArrowLeft':
      if (row.expanded) return { to: at, fold: at };
      return row.parent === null ? null : { to: row.parent };
    case '*': {
      const siblings = rows.filter((other) => other.parent === row.parent && other.expanded === false);
      return siblings.length > 0 ? { to: at, unfold: siblings.map((other) => other.item.key) } : null;
    }
  }
}

/**
 * The next item in sight that begins as typed, else the next with a word that does: "3" finds way 3. A single letter
 * pressed again goes on to the one after.
 */
export function typeAhead(rows: readonly OutlineRow[], at: string, typed: string): string | null {
  const index = Math.max(0, rows.findIndex((row) => row.item.key === at));
  const wanted = /^(.)\1*$/.test(typed) ? typed.charAt(0) : typed;
  // While a word grows the item in hand may still be meant; a single letter asks for another one.
  const from = wanted.length === 1 ? index + 1 : index;
  const around = [...rows.slice(from), ...rows.slice(0, from)];
  const piece = wanted.trim().toLowerCase();
  const words = ({ item }: OutlineRow) => item.words.toLowerCase();
  const begins = /^\d+$/.test(piece) ? `way ${piece},` : piece;
  const found =
    around.find((row) => words(row).startsWith(begins)) ?? around.find((row) => ` ${words(row)}`.includes(` ${piece}`));
  return found?.item.key ?? null;
}
