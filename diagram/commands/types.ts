import type { Patch } from '../document/patch';
import type { End } from '../document/schema';

/** One thing a person did, as data: what the history calls it, what it changes, and what is in hand after it. */
export interface Command {
  /** as the history says it: "Place way 13 to the study" */
  label: string;
  patch: Patch;
  /** the terminal from which drawing goes on */
  next?: End;
  /** parts to take in hand */
  parts?: readonly string[];
}

/** Why a command cannot be done here, in words for the person at the sheet. */
export interface Refusal {
  refused: string;
}

export const isRefusal = (outcome: object): outcome is Refusal => 'refused' in outcome;

/**
 * Ids for what a command makes: no two windows may ever make the same, so the caller brings chance and this layer stays
 * pure.
 */
export type NewId = () => string;
