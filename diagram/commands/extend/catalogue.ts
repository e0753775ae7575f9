import { hasTerminal, isBar } from '../../document/kinds';
import { byCode, type End, type Installation, type Part } from '../../document/schema';
import { practices } from '../../practices';
import { traceFeeds } from '../../terminals/feeds';
import { companionsOf } from '../companions';
import type { NewId } from '../types';
import { conductorOfMark, endKey, walkFromSources, type Walk } from '../walk';
import { backedUpWay } from './backed-up';
import { atEarthBar, backupSource, devicesAtBar, land } from './board';
import { origin } from './origin';
import { onToNextRoom, pointsInRoom } from './room';
import { loadsOfSwitch, otherTwoWay } from './switched';
import type { At, Recipe, Suggestion } from './types';
import { cablesFromBreaker, waysFromBar } from './ways';
import { wholeRooms } from './whole-room';

/** What can come next, family by family. */
const RECIPES: readonly Recipe[] = [
  land,
  origin,
  waysFromBar,
  cablesFromBreaker,
  wholeRooms,
  pointsInRoom,
  onToNextRoom,
  backedUpWay,
  loadsOfSwitch,
  otherTwoWay,
  devicesAtBar,
  backupSource,
  atEarthBar,
];

export interface SuggestOptions {
  newId: NewId;
  /** what the person has typed to narrow the list */
  typed?: string;
  hoursWanted?: number;
}

function look(doc: Installation, end: End, { newId, typed = '', hoursWanted = 0 }: SuggestOptions): At | null {
  const part = doc.parts.find((candidate) => candidate.id === end[0]);
  if (!part || !hasTerminal(part, end[1])) return null;
  const walk = walkFromSources(doc);
  const here = onNet(doc, walk, part, end);
  const step = walk.get(endKey(here));
  const own = conductorOfMark(part, end[1]);
  const conductor = step?.conductor ?? own;
  const lineEnd: End = conductor === 'L' ? here : (lineOf(doc, part.id) ?? here);
  return {
    doc,
    end,
    part,
    mark: end[1],
    walk,
    conductor,
    reached: step !== undefined,
    switched: step?.switched ?? false,
    backup: traceFeeds(doc).parts.get(part.id) === 'backup',
    feed: companionsOf(doc, walk, lineEnd),
    wires: doc.wires.filter(({ from, to }) => endKey(from) === endKey(end) || endKey(to) === endKey(end)).length,
    practice: practices[doc.practice],
    typed: typed.trim().toLowerCase(),
    hoursWanted,
    newId,
  };
}

/** A free screw of a bar is on the net of its other screws: the one that a source reaches stands for it. */
function onNet(doc: Installation, walk: Walk, part: Part, end: End): End {
  if (!isBar(part.kind)) return end;
  for (const { from, to } of doc.wires)
    for (const screw of [from, to]) if (screw[0] === part.id && walk.has(endKey(screw))) return screw;
  return end;
}

/** The line terminal of a load, whose neutral and earth its other terminals want. */
function lineOf(doc: Installation, id: string): End | null {
  const part = doc.parts.find((candidate) => candidate.id === id);
  if (!part) return null;
  if (['lamp', 'fan', 'appliance', 'socket', 'spd'].includes(part.kind)) return [id, 'L'];
  return part.kind === 'inverter' ? [id, 'in.L'] : [id, '1'];
}

/** Every word that was typed begins a word of the line. */
export function fitsWords(line: string, typed: string): boolean {
  const words = line.toLowerCase().split(/[\s,]+/);
  return typed
    .toLowerCase()
    .split(/[\s,]+/)
    .every((piece) => words.some((word) => word.startsWith(piece)));
}

/**
 * What the trade puts next at a terminal, best first: by habit, what the survey lacks before the rest.
 * @returns all that fits, and of these what begins as typed
 */
export function suggest(
  doc: Installation,
  end: End,
  options: SuggestOptions,
): { all: Suggestion[]; fitting: Suggestion[] } {
  const at = look(doc, end, options);
  if (!at) return { all: [], fitting: [] };
  const all = RECIPES.flatMap((recipe) => [...recipe(at)]);
  all.sort((a, b) => a.rank - b.rank || byCode(a.id, b.id));
  if (at.typed === '') return { all, fitting: all };
  // A room that is only typed so far stands behind everything that is known by those words.
  const fitting = all.filter((line) => fitsWords(line.what, at.typed));
  return { all, fitting: [...fitting.filter((line) => !line.newRoom), ...fitting.filter((line) => line.newRoom)] };
}
