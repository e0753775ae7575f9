import type { Patch } from '../document/patch';
import type { Context } from './context';

/** danger: can hurt someone or start a fire as drawn; defect: does not work or breaks a rule; advice: good practice. */
export type Severity = 'danger' | 'defect' | 'advice';

/** An edit that puts a finding right; offered only if the re-examined drawing loses the finding and gains none. */
export interface Remedy {
  /** what a person would say they do: "Move neutral to X3" */
  label: string;
  patch: Patch;
}

/** What a rule yields: the least set of parts and wires that a person must touch to put it right. */
export interface Violation {
  severity?: Severity;
  /** said aloud: "E7 comes home the wrong way" */
  heading: string;
  /** what is so, why it matters; a sentence or two */
  message: string;
  parts: readonly string[];
  wires?: readonly string[];
  /** names of the conditions in which it holds; all of them where left out */
  conditions?: readonly string[];
  /** a getter where they take work or read far: only who asks for the remedies of a finding has them worked out */
  remedies?: readonly Remedy[];
}

export interface Finding {
  rule: string;
  severity: Severity;
  heading: string;
  message: string;
  parts: string[];
  wires: string[];
  conditions: string[];
  clause?: string[];
  /** set when a person answers for it in the file */
  silenced?: { reason: string; by: string };
}

export interface Clause {
  /** "IEC 60364-5-53" */
  document: string;
  /** "530.3.2" */
  clause: string;
  /** true where the text was not open in front of the author: from memory */
  memory: boolean;
}

export interface RuleMeta {
  /** the file's name; never renamed once drawings refer to it */
  id: string;
  severity: Severity;
  title: string;
  clauses: readonly Clause[];
  /** one paragraph: what happens and to whom */
  lesson: string;
  remedy: string;
  group: 'polarity' | 'separation' | 'shock' | 'overload' | 'backup' | 'drawing';
  /** regions where it applies; everywhere where left out */
  practices?: readonly ('IEC' | 'IN' | 'GB')[];
}

/** A value that the drawing leaves out and a rule cannot judge without: `missing-data` says so, naming the rules that wait. */
export interface Lack {
  /** ids of the part or wire that lacks it; the supply part where the supply's data lack it */
  parts: readonly string[];
  wires?: readonly string[];
  /** ends "... cannot be judged without": "the rated current of Q11" */
  what: string;
}

export interface Rule {
  meta: RuleMeta;
  /** @param all every rule of the run, for a rule that speaks of the others */
  check(context: Context, all: readonly Rule[]): Iterable<Violation>;
  /** values that it waits for in this home; rules that need none leave it out. The same lack of several rules is one finding. */
  lacks?(context: Context): Iterable<Lack>;
}
