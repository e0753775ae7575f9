import type { Installation } from '@/diagram/document/schema';
import type { Scene } from '@/diagram/layout/scene';
import { middle } from '../canvas/pick';
import type { Finding } from '@/diagram/rules/types';
import type { Condition } from '../view';

/** A finding as it stands in the margin: with its letter, and the parts of this face to which it is tied. */
export interface MarkedNote {
  key: string;
  letter: string;
  finding: Finding;
  /** ids of parts that this face draws; empty where the place is not on it */
  parts: string[];
  /** "B6": column and row of the sheet */
  grid: string | null;
}

export const keyOf = ({ rule, parts, wires }: Pick<Finding, 'rule' | 'parts' | 'wires'>): string =>
  [rule, ...parts, ...wires].join(' ');

/** a, b ... z, aa, ab ... */
export function letterOf(index: number): string {
  const last = String.fromCharCode(97 + (index % 26));
  return index < 26 ? last : letterOf(Math.floor(index / 26) - 1) + last;
}

/** The parts of a face that stand for a finding: its own, else those at its wires, else what is wired to them. */
function anchors(doc: Installation, drawn: ReadonlySet<string>, finding: Finding): string[] {
  const own = finding.parts.filter((id) => drawn.has(id));
  if (own.length > 0) return own;
  const named = new Set(finding.wires);
  const atWires = doc.wires.filter((wire) => named.has(wire.id)).flatMap((wire) => [wire.to[0], wire.from[0]]);
  const found = atWires.filter((id) => drawn.has(id));
  if (found.length > 0) return [found[0]!];
  const lost = new Set([...finding.parts, ...atWires]);
  for (const { from, to } of doc.wires) {
    if (lost.has(from[0]) && drawn.has(to[0])) return [to[0]];
    if (lost.has(to[0]) && drawn.has(from[0])) return [from[0]];
  }
  return [];
}

function gridOf(scene: Scene, id: string | undefined): string | null {
  const part = scene.parts.find((candidate) => candidate.id === id);
  if (!part) return null;
  const at = middle(part);
  const column = Math.min(8, 1 + Math.floor((8 * at.x) / scene.width));
  const row = 'ABCDEF'[Math.min(5, Math.max(0, Math.floor((6 * at.y) / scene.height)))];
  return `${row}${Math.max(1, column)}`;
}

const holdsIn = (finding: Finding, condition: Condition): boolean =>
  condition === 'all' ||
  finding.conditions.length === 0 ||
  finding.conditions.some((name) => name.split('/')[0] === condition);

const ORDER = { danger: 0, defect: 1, advice: 2 } as const;

export interface NoteFilter {
  condition: Condition;
  severities: ReadonlySet<Finding['severity']>;
  /** id of a place; null: all of them */
  room: string | null;
}

/** Places that a finding speaks of: those of its parts and of what its wires end at. */
export function placesOf(doc: Installation, finding: Pick<Finding, 'parts' | 'wires'>): Set<string> {
  const wires = new Set(finding.wires);
  const ids = new Set(finding.parts);
  for (const { id, from, to } of doc.wires) if (wires.has(id)) ids.add(from[0]).add(to[0]);
  return new Set(doc.parts.flatMap((part) => (ids.has(part.id) && part.place ? [part.place] : [])));
}

/** Findings as notes, the gravest first; those that somebody answers for come last and bear no letter on the sheet. */
export function notesOf(
  findings: readonly Finding[],
  doc: Installation,
  scene: Scene,
  { condition, severities, room }: NoteFilter,
): MarkedNote[] {
  const drawn = new Set(scene.parts.map((part) => part.id));
  const open = findings.filter((finding) => !finding.silenced);
  const sorted = [...open].sort((a, b) => ORDER[a.severity] - ORDER[b.severity]);
  return sorted
    .filter((finding) => severities.has(finding.severity) && holdsIn(finding, condition))
    .filter((finding) => room === null || placesOf(doc, finding).has(room))
    .map((finding, i) => {
      const parts = anchors(doc, drawn, finding);
      return { key: keyOf(finding), letter: letterOf(i), finding, parts, grid: gridOf(scene, parts[0]) };
    });
}
