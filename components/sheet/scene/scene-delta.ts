import type { Scene } from '@/diagram/layout/scene';

const LISTS = ['bands', 'frames', 'parts', 'runs', 'rings', 'dots', 'texts'] as const;
type List = (typeof LISTS)[number];

/** A scene as it differs from the one before: in its lists, the number of a thing there stands for that very thing. */
export type SceneDelta = Omit<Scene, List> & { [L in List]: (number | Scene[L][number])[] };

/** What a thing of a list is, in letters. A scene never changes, so that each list is read once. */
const read = new WeakMap<readonly object[], ReadonlyMap<string, number>>();
function numbersIn(list: readonly object[]): ReadonlyMap<string, number> {
  let numbers = read.get(list);
  if (!numbers) read.set(list, (numbers = new Map(list.map((item, i) => [JSON.stringify(item), i]))));
  return numbers;
}

/** How a scene differs from the one before it. */
export function deltaOf(before: Scene | null, after: Scene): SceneDelta {
  if (!before) return after;
  const lists = LISTS.map((list) => {
    const numbers = numbersIn(before[list]);
    return [list, after[list].map((item) => numbers.get(JSON.stringify(item)) ?? item)];
  });
  return { ...after, ...Object.fromEntries(lists) } as SceneDelta;
}

/** The scene after, with the very objects of the one before where nothing changed, so that only what changed is drawn again. */
export function withDelta(before: Scene | null, delta: SceneDelta): Scene {
  const lists = LISTS.map((list) => {
    const old: readonly object[] = before?.[list] ?? [];
    const items = delta[list].map((item) => (typeof item === 'number' ? old[item] : item));
    return [list, items.length === old.length && items.every((item, i) => item === old[i]) ? old : items];
  });
  return { ...delta, ...Object.fromEntries(lists) } as Scene;
}
