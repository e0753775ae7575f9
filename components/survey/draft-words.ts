import type { Patch } from '@/diagram/document/patch';
import type { Installation } from '@/diagram/document/schema';

const counted = (count: number, what: string) => `${count} ${what}${count === 1 ? '' : 's'}`;

/** What a change draws, in words: "12 parts, 31 wires, 4 cables". */
export function draftWords(document: Installation, { set = {}, remove = {} }: Patch): string {
  const lists = ['parts', 'wires', 'cables'] as const;
  const words = lists.flatMap((list) => {
    const before = new Set((document[list] as readonly { id: string }[]).map(({ id }) => id));
    const added = (set[list] ?? []).filter(({ id }) => !before.has(id)).length;
    const changed = (set[list] ?? []).length - added;
    const what = list.slice(0, -1);
    return [
      added > 0 && counted(added, `new ${what}`),
      changed > 0 && `${counted(changed, what)} changed`,
      remove[list]?.length && `${counted(remove[list].length, what)} removed`,
    ].filter((word): word is string => typeof word === 'string');
  });
  return words.join(', ');
}
