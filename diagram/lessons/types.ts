import type { Face, Installation } from '../document/schema';

/** What a rule is about in two small homes: one that it speaks of, and the same put right. */
export interface Lesson {
  wrong: Installation;
  right: Installation;
  face: Face;
  /** id of the place whose page is drawn, on the connections face */
  place?: string;
  /** ids of the parts that the drawing is cut down to; all of it where left out */
  focus?: readonly string[];
  /** the wrong drawing in words, for whoever cannot see it; ends with a full stop */
  shows: string;
  /** what is otherwise in the right one; ends with a full stop */
  difference: string;
  /** other dangers and defects of the wrong home, where the same fault cannot be drawn without them, and why */
  also?: { rules: readonly string[]; because: string };
}
