import type { End } from '../document/schema';
import type { Severity } from '../rules/types';

/** What an item of the outline stands for. */
export type OutlineKind = 'sheet' | 'board' | 'way' | 'room' | 'part' | 'terminal' | 'wire' | 'finding';

/** One item of the outline: a line that is read aloud, and what it stands for on the sheet. */
export interface OutlineItem {
  /** the same as long as the thing is drawn: "part Q3", "end Q3 2" */
  key: string;
  kind: OutlineKind;
  /** "Way 3, 16 A type C: Study: switch, lamp 9 W" */
  words: string;
  /** headings of the findings at this very thing */
  findings: readonly string[];
  /** keys of the findings at it and below it, each once */
  keys: readonly string[];
  /** ids on the sheet; a board and a room stand for their parts */
  parts: readonly string[];
  wires: readonly string[];
  terminal: End | null;
  /** room or intake in which it is; of a board and a room their own */
  place?: string;
  /** key of the finding, as the margin knows it */
  finding?: string;
  severity?: Severity;
  children: readonly OutlineItem[];
}
