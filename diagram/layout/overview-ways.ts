import type { Installation, Part } from '../document/schema';
import type { Way } from '../terminals/ways';
import type { Entry } from './overview-rooms';
import { isOvercurrent, walk, type OverviewTree, type TreeNode } from './overview-tree';

/** What hangs from one terminal of the column: a way with its device, or a part joined to the bar without one. */
export interface Hanging {
  /** key of its axis: the device's id, else that of the first part */
  id: string;
  /** the column's node it hangs from */
  from: TreeNode;
  /** the device at its head, where it has one */
  head: TreeNode | null;
  backup: boolean;
  /** position in the order of ways */
  order: number;
}

export interface RoomEntries {
  /** id of the place, or '' */
  place: string;
  entries: Entry[];
}

export interface WaysAndRooms {
  hanging: Hanging[];
  rooms: RoomEntries[];
  /** the entry a node belongs to */
  entryOf: Map<TreeNode, Entry>;
  /** parts that no room takes */
  tray: Part[];
}

const hangingOf = (root: TreeNode, backup: boolean, numbers: Map<string, number>): Hanging[] => {
  const found: Hanging[] = [];
  for (const node of walk(root)) {
    if (!node.column) continue;
    for (const child of node.children) {
      if (child.column) continue;
      const head = isOvercurrent(child.part.kind) ? child : null;
      found.push({
        id: child.part.id,
        from: node,
        head,
        backup,
        order: numbers.get(child.part.id) ?? Number.MAX_SAFE_INTEGER,
      });
    }
  }
  return found.sort((a, b) => a.order - b.order);
};

/** Sorts what hangs from the column and the backup bar into rooms, in the order of the ways. */
export function waysAndRooms(doc: Installation, tree: OverviewTree, ways: readonly Way[]): WaysAndRooms {
  const numbers = new Map(ways.map((way) => [way.device, way.number]));
  const places = new Set(doc.places.map((place) => place.id));
  const hanging = [
    ...(tree.mains ? hangingOf(tree.mains, false, numbers) : []),
    ...tree.backups.flatMap((root) => hangingOf(root, true, numbers)),
  ];
  const rooms = new Map<string, Entry[]>();
  const entryOf = new Map<TreeNode, Entry>();
  const placeOf = new Map<TreeNode, string>();
  const tray: Part[] = [];

  const sort = (
    root: TreeNode,
    backup: boolean,
    way: string | undefined,
    skip: TreeNode | null,
    keepUnplaced: boolean,
  ) => {
    let free = way;
    for (const node of walk(root)) {
      if (node === skip) continue;
      const own = node.part.place;
      const above = node.parent ? placeOf.get(node.parent) : undefined;
      const place = own !== undefined && places.has(own) ? own : above;
      if (place === undefined && !keepUnplaced) {
        tray.push(node.part);
        continue;
      }
      placeOf.set(node, place ?? '');
      const parentEntry = node.parent && entryOf.get(node.parent);
      if (parentEntry && placeOf.get(node.parent!) === (place ?? '')) {
        entryOf.set(node, parentEntry);
        continue;
      }
      const direct = node.parent === null || !entryOf.has(node.parent);
      const entry: Entry = { node, backup, ...(direct && free && { way: free }) };
      if (entry.way) free = undefined;
      entryOf.set(node, entry);
      const list = rooms.get(place ?? '') ?? [];
      list.push(entry);
      rooms.set(place ?? '', list);
    }
  };
  const order = (list: Hanging[]) => {
    for (const item of list) {
      const root = item.head ?? item.from.children.find((child) => child.part.id === item.id)!;
      sort(root, item.backup, item.id, item.head, true);
    }
  };
  order(hanging.filter((item) => !item.backup));
  order(hanging.filter((item) => item.backup));
  const intake = new Set(doc.places.filter((place) => place.kind === 'intake').map((place) => place.id));
  for (const root of tree.loose) {
    if (root.part.place !== undefined && places.has(root.part.place) && !intake.has(root.part.place))
      sort(root, false, undefined, null, true);
    else for (const node of walk(root)) tray.push(node.part);
  }
  // mains first, then backup; what comes from a room further left stands first, the rest in the order of the ways
  const roomOrder = new Map([...rooms.keys()].map((place, i) => [place, i]));
  const fromLeft = (entry: Entry, place: string): boolean => {
    const above = entry.node.parent && placeOf.get(entry.node.parent);
    return (
      above !== undefined &&
      above !== null &&
      roomOrder.get(above)! < roomOrder.get(place)! &&
      !(entry.backup && entry.node.part.kind === 'joint')
    );
  };
  const rank = (entry: Entry, place: string): number => (entry.backup ? 2 : 0) + (fromLeft(entry, place) ? 0 : 1);
  const sorted = [...rooms].map(([place, entries]) => ({
    place,
    entries: [...entries].sort((a, b) => rank(a, place) - rank(b, place)),
  }));
  sortChildren(hanging, placeOf, roomOrder);
  return { hanging, rooms: sorted, entryOf, tray };
}

/** What leads into a room further left stands first in its own room, what leads further right last. */
function sortChildren(
  hanging: readonly Hanging[],
  placeOf: ReadonlyMap<TreeNode, string>,
  roomOrder: ReadonlyMap<string, number>,
): void {
  for (const item of hanging) {
    const root = item.head ?? item.from.children.find((child) => child.part.id === item.id)!;
    const leads = new Map<TreeNode, number>();
    for (const node of [...walk(root)].reverse()) {
      const own = placeOf.get(node);
      let lead = 0;
      for (const child of node.children) {
        const place = placeOf.get(child);
        lead =
          place === own
            ? lead || leads.get(child)!
            : lead || Math.sign((roomOrder.get(place ?? '') ?? 0) - (roomOrder.get(own ?? '') ?? 0));
      }
      leads.set(node, lead);
      node.children.sort(
        (a, b) => (placeOf.get(a) === own ? leads.get(a)! : 0) - (placeOf.get(b) === own ? leads.get(b)! : 0),
      );
    }
  }
}
