import type { End, Installation, Part } from '../../document/schema';
import type { Practice } from '../../practices/types';
import type { Feed } from '../companions';
import type { Command, NewId } from '../types';
import type { Conductor, Walk } from '../walk';

/** The terminal in hand and all that a suggestion may ask about it. */
export interface At {
  doc: Installation;
  end: End;
  part: Part;
  mark: string;
  walk: Walk;
  /** what the terminal carries, or what it is made for */
  conductor: Conductor | null;
  /** a source stands behind it, or behind another screw of the same bar */
  reached: boolean;
  /** a control switch lies before it */
  switched: boolean;
  /** behind an inverter's output */
  backup: boolean;
  /** the neutral and earth that go with it */
  feed: Feed;
  /** wires at the terminal now */
  wires: number;
  practice: Practice;
  /** what the person has typed, lower case */
  typed: string;
  /** h on battery that the job asks for */
  hoursWanted: number;
  newId: NewId;
}

/** A number that can be changed before placing: metres of the run, watts of a load. */
export interface Value {
  id: string;
  label: string;
  unit: string;
  value: number;
  least: number;
  most: number;
}

/** What an assembly consists of: 0 leaves it out. */
export interface Count {
  id: string;
  label: string;
  count: number;
  most: number;
}

export type Choice = Readonly<Record<string, number>>;

/** One line of the slip: what could come next, why it is offered, and the command that places it whole. */
export interface Suggestion {
  id: string;
  /** "cable to the study, outlets" */
  what: string;
  /** "3×2.5, 24 m" */
  detail: string;
  reason: string;
  /** marked + in the list: several parts at once */
  assembly: boolean;
  /** the room is made up from what was typed */
  newRoom?: boolean;
  /** lower stands higher; trade habit in tens, what the survey lacks takes five off */
  rank: number;
  values: readonly Value[];
  counts: readonly Count[];
  place(choice: Choice): Command;
}

/** A family of suggestions: yields nothing where it does not fit. */
export type Recipe = (at: At) => Iterable<Suggestion>;
