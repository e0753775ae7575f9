import { REF_LETTER, isBar } from '../document/kinds';
import type { Kind, Part } from '../document/schema';

/** Designations already on the sheet, to find the next free one of a letter. */
export class Designations {
  private readonly taken = new Set<string>();

  constructor(parts: Iterable<Part>) {
    for (const { ref, board } of parts) {
      if (ref) this.taken.add(ref);
      if (board) this.taken.add(board);
    }
  }

  /** Takes the lowest free number of a letter: the main switch is Q0 and the service fuse F0, all others begin at 1. */
  next(letter: string, from = letter === 'Q' || letter === 'F' ? 0 : 1): string {
    let n = from;
    while (this.taken.has(`${letter}${n}`)) n++;
    const ref = `${letter}${n}`;
    this.taken.add(ref);
    return ref;
  }

  forKind(kind: Kind): string {
    return this.next(REF_LETTER[kind]);
  }

  release(ref: string): void {
    this.taken.delete(ref);
  }
}

/** Joints, bars and the supply are known by where they are; a neutral or earth bar may be named. */
export const isNamed = (kind: Kind): boolean =>
  kind !== 'supply' && kind !== 'electrode' && kind !== 'bond' && !isBar(kind);
