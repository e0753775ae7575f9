/** A sheet of the set, as a tab on the paper's upper edge. */
export interface Tab {
  id: string;
  label: string;
  href: string;
  /** its number in the set; the key that turns to it. Absent for the register and the team's own sheets. */
  number?: number;
  /** stands apart from the tabs after it */
  apart?: boolean;
}

/** A key and what it does on this sheet, for the list behind `?`. */
export interface KeyHelp {
  keys: readonly string[];
  does: string;
}
