import { DocumentSchema, canonical, emptyDocument, type DocumentError, type Installation } from './schema';

/** Reading what can be read of a file that is no whole drawing: broken, cut off, or written by a later version. */

const LISTS = ['places', 'parts', 'wires', 'cables', 'notices', 'silenced', 'survey', 'plans'] as const;
type List = (typeof LISTS)[number];
type Bag = Record<string, unknown>;

const NO_TITLE = 'Drawing that could not be read whole';
const DEFAULTS = emptyDocument(NO_TITLE, 'IEC', { system: 'TN-S', voltage: 230, frequency: 50 });
/** rounds of leaving out: the second finds what the first uncovers, such as an id that is used twice */
const ROUNDS = 8;

const isBag = (value: unknown): value is Bag => typeof value === 'object' && value !== null && !Array.isArray(value);
const isList = (key: unknown): key is List => (LISTS as readonly unknown[]).includes(key);

/** A copy whose items remember where in the file they stood. */
interface Work {
  file: Bag;
  places: Map<object, number>;
}

function begin(data: Bag): Work {
  const file = structuredClone(data);
  const places = new Map<object, number>();
  for (const list of LISTS) {
    const items = file[list];
    if (Array.isArray(items)) items.forEach((item, i) => typeof item === 'object' && item && places.set(item, i));
  }
  return { file, places };
}

/** What is left out for the sake of one fault; said in words. */
class Cut {
  /** items to be dropped when all faults of a round are known */
  private readonly drops = new Map<List, Set<number>>();

  constructor(private readonly work: Work) {}

  private item([list, index]: readonly PropertyKey[]): unknown {
    return isList(list) && typeof index === 'number' ? (this.work.file[list] as unknown[])[index] : undefined;
  }

  /** The path as the file has it: items that were dropped before have moved the others up. */
  where(path: readonly PropertyKey[]): string {
    if (path.length === 0) return '(file)';
    const item = this.item(path);
    const origin = isBag(item) ? this.work.places.get(item) : undefined;
    return (origin === undefined ? path : [path[0], origin, ...path.slice(2)]).join('.');
  }

  private nameOf(path: readonly PropertyKey[]): string {
    const item = this.item(path);
    return isBag(item) && typeof item.id === 'string' ? item.id : 'it';
  }

  /** @returns what has been done about it, in words */
  at(path: readonly PropertyKey[], unknownKeys: readonly string[] | undefined): string {
    const { file } = this.work;
    const [first, second, third] = path;
    if (unknownKeys) {
      const holder = path.reduce<unknown>((value, key) => (value as Bag)[key as string], file) as Bag;
      for (const key of unknownKeys) delete holder[key];
      return 'not known to this version, left out';
    }
    if (isList(first)) {
      if (typeof second === 'number') {
        this.drops.set(first, (this.drops.get(first) ?? new Set()).add(second));
        return `${this.nameOf(path)} is left out of what is shown`;
      }
      if (first in DEFAULTS) file[first] = [];
      else delete file[first];
      return 'the whole list is left out';
    }
    if (first === 'sheet' && isBag(file.sheet)) {
      const face = file.sheet[second as string];
      if (third !== undefined && isBag(face)) delete face[third as string];
      else if (second !== undefined) delete file.sheet[second as string];
      else delete file.sheet;
      return 'placed by the sheet instead';
    }
    if (first === 'sheet') {
      delete file.sheet;
      return 'placed by the sheet instead';
    }
    if (first === 'supply' && isBag(file.supply) && second !== undefined) {
      const standard = (DEFAULTS.supply as Bag)[second as string];
      if (standard === undefined) delete file.supply[second as string];
      else file.supply[second as string] = standard;
      return standard === undefined ? 'left out' : `taken as ${String(standard)}`;
    }
    const standard = (DEFAULTS as unknown as Bag)[first as string];
    file[first as string] = standard;
    return isBag(standard) ? 'taken as the usual one' : `taken as ${String(standard)}`;
  }

  finish(): void {
    for (const [list, indices] of this.drops)
      this.work.file[list] = (this.work.file[list] as unknown[]).filter((_, i) => !indices.has(i));
  }
}

/**
 * Reads unknown data as far as it goes: whatever is wrong is left out or taken as usual, and listed by its place.
 * @returns the document, and every fault with its path and what was done; no fault where the data is a whole drawing
 */
export function readWhatCan(data: unknown): { document: Installation; errors: DocumentError[] } {
  if (!isBag(data)) return { document: DEFAULTS, errors: [{ path: '(file)', message: 'This is no drawing.' }] };
  const work = begin(data);
  const errors: DocumentError[] = [];
  for (let round = 0; round < ROUNDS; round++) {
    const read = DocumentSchema.safeParse(work.file);
    if (read.success) return { document: canonical(read.data), errors };
    const cut = new Cut(work);
    for (const issue of read.error.issues) {
      const path = cut.where(issue.path);
      const done = cut.at(issue.path, issue.code === 'unrecognized_keys' ? issue.keys : undefined);
      errors.push({ path, message: `${issue.message}: ${done}` });
    }
    cut.finish();
  }
  return { document: DEFAULTS, errors };
}
